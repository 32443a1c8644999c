import { ADVANCES } from './advances'

type Weight = 400 | 500 | 600
const tables = new Map<Weight, Map<number, number>>()
function tableOf(weight: Weight): Map<number, number> {
  let table = tables.get(weight)
  if (!table) {
    table = new Map()
    for (const entry of ADVANCES[weight].split(' ')) {
      const [code = '', width = ''] = entry.split(':')
      table.set(Number.parseInt(code, 36), Number(width))
    }
    tables.set(weight, table)
  }
  return table
}
/** What a sign that Work Sans lacks takes: about a wide letter; ideographs and emoji a full square. */
const stand = (code: number) => (code > 0x2e80 ? 1000 : 640)

/**
 * Width of a text in Work Sans at a size, in the size's unit, from the advance widths of the files we ship: canvas, SVG and
 * server agree to the rounding of the table (a thousandth of the size a sign).
 */
export function textWidth(text: string, size: number, weight: Weight = 400): number {
  const table = tableOf(weight)
  let sum = 0
  for (const sign of text) {
    const code = sign.codePointAt(0) ?? 32
    sum += table.get(code) ?? stand(code)
  }
  return (sum * size) / 1000
}

/** The text cut to a width with an ellipsis; "" when not even that fits. */
export function fitText(text: string, width: number, size: number, weight: Weight = 400): string {
  if (textWidth(text, size, weight) <= width) return text
  const room = width - textWidth('…', size, weight)
  let kept = ''
  let used = 0
  for (const sign of text) {
    used += textWidth(sign, size, weight)
    if (used > room) break
    kept += sign
  }
  return room > 0 ? `${kept.trimEnd()}…` : ''
}

/** The text in lines no wider than `width`, broken between words. */
export function wrapText(text: string, width: number, size: number, weight: Weight = 400): string[] {
  const lines: string[] = []
  for (const word of text.split(' ')) {
    const last = lines[lines.length - 1]
    if (last !== undefined && textWidth(`${last} ${word}`, size, weight) <= width)
      lines[lines.length - 1] = `${last} ${word}`
    else lines.push(word)
  }
  return lines
}
