import { type QuantityKind, type Shape, shapeOf, type UnitSet, YEAR } from './kinds'

export type FormatOptions = {
  /** With its unit (default) or the number alone. */
  unit?: boolean
  /** With a plus sign where it is more than 0. */
  signed?: boolean
  /** For a field being typed in: ten figures instead of those that are read. */
  exact?: boolean
}

/** A number a person reads: no exponent in the usual range, a true minus sign, no "−0". */
export function plainNumber(value: number, figures = 3): string {
  if (value === 0) return '0'
  if (!Number.isFinite(value)) return Number.isNaN(value) ? '–' : value > 0 ? '∞' : '−∞'
  const size = Math.abs(value)
  const text = size >= 1e6 || size < 1e-4 ? exponent(size, figures) : trimmed(size, figures)
  return (value < 0 ? '−' : '') + text
}
function trimmed(size: number, figures: number): string {
  const whole = Math.floor(Math.log10(size)) + 1
  return String(Number(size.toFixed(Math.max(0, Math.min(10, figures - whole)))))
}
const exponent = (size: number, figures: number) =>
  size
    .toExponential(figures - 1)
    .replace(/(\.\d*?)0+e/, '$1e')
    .replace('.e', 'e')
    .replace('e+', 'e')

function rounded(value: number, { times, decimals, figures }: Shape): string {
  const scaled = value * times
  if (decimals === undefined || !Number.isFinite(scaled)) return plainNumber(scaled, figures)
  const text = Math.abs(scaled).toFixed(decimals)
  return (scaled < 0 && Number(text) !== 0 ? '−' : '') + text
}

/**
 * A value (metres and days) as it is read on the sheet in a set of units: "9.10 m", "329 mm/yr", "0.35". Rates per year count
 * 365.25 days.
 */
export function formatQuantity(value: number, kind: QuantityKind, set: UnitSet, options: FormatOptions = {}): string {
  const shape = shapeOf(kind, set)
  const number = options.exact ? String(Number((value * shape.times).toPrecision(10))) : rounded(value, shape)
  const sign = options.signed && Number(number) > 0 ? '+' : ''
  return options.unit === false || shape.unit === '' ? sign + number : `${sign}${number} ${shape.unit}`
}

/** A time, days, in the unit a person would say it in. */
export function formatTime(days: number): string {
  if (!Number.isFinite(days)) return 'never leaves'
  if (days < 2) return `${plainNumber(days * 24, 2)} h`
  if (days < 2 * YEAR) return `${plainNumber(days, 3)} d`
  return `${plainNumber(days / YEAR, 3)} yr`
}
