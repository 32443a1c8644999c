import { useSheetState } from '../../shell/use-sheet'
import type { UnitSet } from '../../state'

/** What a number is, which decides its units, how it is rounded and how far an arrow key steps it. Stored in metres and days. */
export type Kind =
  | 'distance'
  | 'elevation'
  | 'length'
  | 'small-length'
  | 'conductivity'
  | 'recharge'
  | 'flow'
  | 'km-flow'
  | 'conductance'
  | 'ratio'

type Shape = { unit: string; times: number; decimals?: number; figures?: number }
const FOOT = 0.3048
const MILE = 1609.344
const YEAR = 365.25

const SHAPES: Record<Kind, Record<UnitSet, Shape>> = {
  distance: { si: { unit: 'm', times: 1, decimals: 1 }, us: { unit: 'ft', times: 1 / FOOT, decimals: 1 } },
  elevation: { si: { unit: 'm', times: 1, decimals: 2 }, us: { unit: 'ft', times: 1 / FOOT, decimals: 2 } },
  length: { si: { unit: 'm', times: 1, decimals: 2 }, us: { unit: 'ft', times: 1 / FOOT, decimals: 2 } },
  'small-length': { si: { unit: 'mm', times: 1000, figures: 2 }, us: { unit: 'in', times: 12 / FOOT, figures: 2 } },
  conductivity: { si: { unit: 'm/d', times: 1, figures: 4 }, us: { unit: 'ft/d', times: 1 / FOOT, figures: 4 } },
  recharge: {
    si: { unit: 'mm/yr', times: 1000 * YEAR, figures: 4 },
    us: { unit: 'in/yr', times: (12 * YEAR) / FOOT, figures: 4 },
  },
  flow: { si: { unit: 'm²/d', times: 1, figures: 3 }, us: { unit: 'ft²/d', times: 1 / FOOT ** 2, figures: 3 } },
  'km-flow': {
    si: { unit: 'm³/d per km', times: 1000, figures: 3 },
    us: { unit: 'ft³/d per mile', times: MILE / FOOT ** 3, figures: 3 },
  },
  conductance: { si: { unit: 'm/d', times: 1, figures: 4 }, us: { unit: 'ft/d', times: 1 / FOOT, figures: 4 } },
  ratio: { si: { unit: '', times: 1, figures: 4 }, us: { unit: '', times: 1, figures: 4 } },
}
export const shapeOf = (kind: Kind, units: UnitSet): Shape => SHAPES[kind][units]

/** A number in words a person reads: no exponent in the usual range, a true minus sign, no "-0". */
export function plain(value: number, figures = 3): string {
  if (value === 0) return '0'
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
    .replace(/\.?0+e/, 'e')
    .replace('e+', 'e')

function rounded(value: number, shape: Shape): string {
  const scaled = value * shape.times
  if (shape.decimals === undefined) return plain(scaled, shape.figures)
  const text = Math.abs(scaled).toFixed(shape.decimals)
  return (scaled < 0 && Number(text) !== 0 ? '−' : '') + text
}

/** Value with its unit, as read on the sheet. `show.unit` the unit alone, `show.signed` with its sign and no unit. */
export const show = Object.assign(
  (value: number, kind: Kind, units: UnitSet, withUnit = true): string => {
    const shape = shapeOf(kind, units)
    return withUnit && shape.unit ? `${rounded(value, shape)} ${shape.unit}` : rounded(value, shape)
  },
  {
    unit: (kind: Kind, units: UnitSet): string => shapeOf(kind, units).unit,
    signed: (value: number, kind: Kind, units: UnitSet): string => {
      const text = rounded(value, shapeOf(kind, units))
      return Number(text) > 0 ? `+${text}` : text
    },
  },
)

/** The value as it stands in a field being typed in: all its figures, in the unit shown. */
export function editable(value: number, kind: Kind, units: UnitSet): string {
  const shape = shapeOf(kind, units)
  const number = String(Number((value * shape.times).toPrecision(10)))
  return shape.unit ? `${number} ${shape.unit}` : number
}

/** A time in the unit a person would say it in. */
export function showTime(days: number): string {
  if (!Number.isFinite(days)) return 'never leaves'
  if (days < 2) return `${plain(days * 24, 2)} h`
  if (days < 2 * YEAR) return `${plain(days, 3)} d`
  return `${plain(days / YEAR, 3)} yr`
}

export const useUnits = (): UnitSet => useSheetState((state) => state.units)
