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
export const xml = escapeXml

/** A number as short as three decimals allow. */
export const num = (value: number): string => String(Math.round(value * 1000) / 1000 + 0)

/** An id that XML takes, from any text. */
export const idOf = (text: string): string => text.replace(/[^\w.-]/g, '_').replace(/^[^A-Za-z_]/, '_$&')
export { base64 } from './base64'
