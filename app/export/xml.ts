/** Without what XML 1.0 cannot hold: control signs and lone surrogates. */
export function clean(text: string): string {
  let out = ''
  for (const sign of text) {
    const code = sign.codePointAt(0) ?? 0
    const held =
      code === 9 ||
      code === 10 ||
      code === 13 ||
      (code >= 32 && code <= 0xd7ff) ||
      (code >= 0xe000 && code <= 0xfffd) ||
      code >= 0x10000
    out += held ? sign : '\uFFFD'
  }
  return out
}

const ENTITIES: Record<string, string> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', "'": '&#39;' }
/** Text for an element or an attribute in double quotes. */
export const escapeXml = (text: string): string => clean(text).replace(/[&<>"']/g, (sign) => ENTITIES[sign] ?? sign)
