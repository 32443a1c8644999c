/** Control signs, lone surrogates and the two non-characters that XML 1.0 cannot hold, not even escaped. */
// biome-ignore lint/suspicious/noControlCharactersInRegex: these are what is taken out.
const FORBIDDEN = /[\u0000-\u0008\u000b\u000c\u000e-\u001f\u007f-\u009f\ufffe\uffff]/g
const LONE = /[\ud800-\udbff](?![\udc00-\udfff])|(?<![\ud800-\udbff])[\udc00-\udfff]/g
/** Signs that turn the direction of whatever stands after them: what people type must not turn the sheet around it. */
const TURNING = /[\u202a-\u202e\u2066-\u2069]/g
const ENTITIES: Record<string, string> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', "'": '&#39;' }

/** Any text as XML character data or attribute value: valid whatever people typed. */
export const xml = (text: string): string =>
  text
    .replace(FORBIDDEN, '')
    .replace(LONE, '\ufffd')
    .replace(TURNING, '')
    .replace(/[\t\r\n\u2028\u2029]+/g, ' ')
    .replace(/[&<>"']/g, (sign) => ENTITIES[sign] ?? sign)

/** A number for a path or attribute: at most three decimals, no "-0", nothing that is no number. */
export function num(value: number): string {
  const rounded = Math.round(value * 1000) / 1000
  return Number.isFinite(rounded) && rounded !== 0 ? String(rounded) : '0'
}

/** An id that XML takes, from any text; different texts give different ids. */
export const idOf = (text: string): string =>
  `i-${text.replace(/[^A-Za-z0-9-]/g, (sign) => `_${sign.charCodeAt(0).toString(36)}`)}`
