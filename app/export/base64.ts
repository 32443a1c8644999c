const SIGNS = 'ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz0123456789+/'

/** Base64 of bytes without Node's Buffer or the page's btoa: this room knows neither. */
export function base64(bytes: Uint8Array): string {
  const parts: string[] = []
  for (let i = 0; i < bytes.length; i += 3) {
    const triple = ((bytes[i] ?? 0) << 16) | ((bytes[i + 1] ?? 0) << 8) | (bytes[i + 2] ?? 0)
    const kept = Math.min(3, bytes.length - i)
    let four = ''
    for (let n = 0; n < 4; n++) four += n <= kept ? SIGNS.charAt((triple >> (18 - 6 * n)) & 63) : '='
    parts.push(four)
  }
  return parts.join('')
}
