export type Token = { is: 'number'; text: string } | { is: 'word'; text: string } | { is: 'sign'; text: string }
export type Tokens = { ok: true; tokens: Token[] } | { ok: false; message: string }

const SIGNS: Record<string, string> = { '−': '-', '–': '-', '×': '*', '·': '*', '⋅': '*', '÷': '/', '^': '^' }
const RAISED: Record<string, string> = { '¹': '1', '²': '2', '³': '3', '⁴': '4', '⁻': '-' }

/**
 * Splits what somebody typed into numbers, words and signs. A comma is a decimal comma or a separator of thousands where only one
 * of the two can be meant; otherwise it is asked about.
 */
export function tokensOf(typed: string): Tokens {
  const text = typed
    .normalize('NFC')
    .replace(/[\u00a0\u202f\u2009]/g, ' ')
    .replace(/(?<=\d) (?=\d{3}(?!\d))/g, '')
  const tokens: Token[] = []
  let at = 0
  while (at < text.length) {
    const rest = text.slice(at)
    const number = /^(?:\d+(?:[.,]\d+)*|[.,]\d+)(?:\.(?!\d))?(?:[eE][+\-−]?\d+(?![\p{L}\d]))?/u.exec(rest)?.[0]
    const word = /^[\p{L}µ%°]+(?:[23](?![\d.]))?/u.exec(rest)?.[0]
    const sign = rest.charAt(0)
    if (number !== undefined) {
      const read = readNumber(number)
      if ('message' in read) return { ok: false, message: read.message }
      tokens.push({ is: 'number', text: read.text })
      at += number.length
    } else if (word !== undefined) {
      tokens.push({ is: 'word', text: word })
      at += word.length
    } else {
      at += 1
      if (sign.trim() === '') continue
      if (sign in RAISED) {
        const raised = /^[¹²³⁴⁻]+/.exec(rest)?.[0] ?? sign
        at += raised.length - 1
        tokens.push({ is: 'sign', text: '^' }, { is: 'number', text: [...raised].map((one) => RAISED[one]).join('') })
      } else if ('+-*/()'.includes(sign) || sign in SIGNS) tokens.push({ is: 'sign', text: SIGNS[sign] ?? sign })
      else
        return {
          ok: false,
          message: `“${sign}” has no meaning here. Type a number with a unit, or a sum like = 0.35*820 mm/yr.`,
        }
    }
  }
  return { ok: true, tokens }
}

function readNumber(typed: string): { text: string } | { message: string } {
  const [, digits = typed, power = ''] = /^([\d.,]+)(.*)$/.exec(typed.replace('−', '-')) ?? []
  const commas = digits.split(',').length - 1
  const dots = digits.split('.').length - 1
  const grouped = (text: string, mark: string) =>
    text.split(mark).every((part, i) => (i === 0 ? /^\d{1,3}$/ : /^\d{3}$/).test(part))
  const unclear = {
    message: `“${digits}” can be read in two ways. Write a point before the decimals and nothing between the thousands.`,
  }
  if (commas === 0 && dots <= 1) return { text: digits + power }
  if (commas === 1 && dots === 0) {
    const [whole = '', decimals = ''] = digits.split(',')
    const either = decimals.length === 3 && /^[1-9]\d{0,2}$/.test(whole)
    return either ? unclear : { text: `${whole || '0'}.${decimals}${power}` }
  }
  if (commas === 0 || dots === 0) {
    const mark = commas > 0 ? ',' : '.'
    return grouped(digits, mark) ? { text: digits.replaceAll(mark, '') + power } : unclear
  }
  const [group, decimal] = digits.lastIndexOf('.') > digits.lastIndexOf(',') ? [',', '.'] : ['.', ',']
  const [whole = '', ...decimals] = digits.split(decimal)
  if (decimals.length !== 1 || !grouped(whole, group)) return unclear
  return { text: `${whole.replaceAll(group, '')}.${decimals[0] ?? ''}${power}` }
}
