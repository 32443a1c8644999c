import { env } from '../env.server'

const production = env.NODE_ENV === 'production'
const secure = env.APP_URL.startsWith('https:')

/** Where a page may open its live connection: the sidecar under the name the page itself was asked for. */
function liveOrigins(request: Request): string[] {
  if (env.REALTIME_URL) {
    const url = new URL(env.REALTIME_URL)
    return [url.origin === 'null' ? `${url.protocol}//${url.host}` : url.origin.replace(/^http/, 'ws')]
  }
  const { hostname } = new URL(request.url)
  return [`ws://${hostname}:${env.REALTIME_PORT}`, `wss://${hostname}:${env.REALTIME_PORT}`]
}

/**
 * The address holds a token: no other site may be told it in a Referer, no search engine list it. ("no-referrer" would do that
 * too, but makes browsers send forms with `Origin: null`, which React Router refuses.)
 */
const holdsToken = (path: string) => path.startsWith('/s/') || path.startsWith('/reset')

/** Headers of every answer, pages and data alike; the web server writes them. */
export function commonHeaders(path: string): [string, string][] {
  const headers: [string, string][] = [
    ['x-content-type-options', 'nosniff'],
    ['x-frame-options', 'DENY'],
    ['referrer-policy', holdsToken(path) ? 'same-origin' : 'strict-origin-when-cross-origin'],
    ['permissions-policy', 'camera=(), microphone=(), geolocation=(), payment=(), usb=()'],
    ['cross-origin-opener-policy', 'same-origin'],
  ]
  if (holdsToken(path)) headers.push(['x-robots-tag', 'noindex, nofollow'])
  if (secure) headers.push(['strict-transport-security', 'max-age=31536000'])
  return headers
}

/**
 * Further headers of a page. Scripts run only from our own files or with this page's one-time number; styles may be inline, because
 * drawings carry them. The development server injects scripts of its own, so there the policy stays off.
 */
export function documentHeaders(request: Request, nonce: string | undefined): [string, string][] {
  const headers: [string, string][] = [['cache-control', 'private, no-cache']]
  if (!production || !nonce) return headers
  const policy = [
    "default-src 'self'",
    `script-src 'self' 'nonce-${nonce}'`,
    "style-src 'self' 'unsafe-inline'",
    "img-src 'self' data: blob:",
    "font-src 'self' data:",
    `connect-src 'self' ${liveOrigins(request).join(' ')}`,
    "worker-src 'self' blob:",
    "object-src 'none'",
    "base-uri 'self'",
    "form-action 'self'",
    "frame-ancestors 'none'",
  ]
  headers.push(['content-security-policy', policy.join('; ')])
  return headers
}
