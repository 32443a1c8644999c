/** A path of our own to go to after signing in; anything that could lead to another site becomes the fallback. */
export function safePath(wanted: unknown, fallback = '/home'): string {
  if (typeof wanted !== 'string' || !wanted.startsWith('/')) return fallback
  // "//host" and "/\host" leave for another site; control characters are dropped by browsers and could hide either.
  const base = 'http://doab.invalid'
  for (const char of wanted) if (char < ' ' || char === '\\') return fallback
  if (!URL.canParse(wanted, base)) return fallback
  const url = new URL(wanted, base)
  if (url.origin !== base || wanted.startsWith('//')) return fallback
  return url.pathname + url.search + url.hash
}
