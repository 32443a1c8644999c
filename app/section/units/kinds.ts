/** What a number is, which decides the units it may be typed in and how it is shown. Stored in metres and days. */
export type QuantityKind =
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
  | 'time'

export type UnitSet = 'si' | 'us'

/** How a kind is shown in a set of units: the unit, how many of it make one metre or day, and how it is rounded. */
export type Shape = { unit: string; times: number; decimals?: number; figures?: number }

export const FOOT = 0.3048
export const INCH = FOOT / 12
export const MILE = 5280 * FOOT
/** A year is 365.25 days (Julian), in every conversion of Doab. */
export const YEAR = 365.25

const SHAPES: Record<QuantityKind, Record<UnitSet, Shape>> = {
  distance: { si: { unit: 'm', times: 1, decimals: 1 }, us: { unit: 'ft', times: 1 / FOOT, decimals: 1 } },
  elevation: { si: { unit: 'm', times: 1, decimals: 2 }, us: { unit: 'ft', times: 1 / FOOT, decimals: 2 } },
  length: { si: { unit: 'm', times: 1, decimals: 2 }, us: { unit: 'ft', times: 1 / FOOT, decimals: 2 } },
  'small-length': { si: { unit: 'mm', times: 1000, figures: 2 }, us: { unit: 'in', times: 1 / INCH, figures: 2 } },
  conductivity: { si: { unit: 'm/d', times: 1, figures: 4 }, us: { unit: 'ft/d', times: 1 / FOOT, figures: 4 } },
  recharge: {
    si: { unit: 'mm/yr', times: 1000 * YEAR, figures: 4 },
    us: { unit: 'in/yr', times: YEAR / INCH, figures: 4 },
  },
  flow: { si: { unit: 'm²/d', times: 1, figures: 3 }, us: { unit: 'ft²/d', times: 1 / FOOT ** 2, figures: 3 } },
  'km-flow': {
    si: { unit: 'm³/d per km', times: 1000, figures: 3 },
    us: { unit: 'ft³/d per mile', times: MILE / FOOT ** 3, figures: 3 },
  },
  conductance: { si: { unit: 'm/d', times: 1, figures: 4 }, us: { unit: 'ft/d', times: 1 / FOOT, figures: 4 } },
  ratio: { si: { unit: '', times: 1, figures: 4 }, us: { unit: '', times: 1, figures: 4 } },
  time: { si: { unit: 'd', times: 1, figures: 3 }, us: { unit: 'd', times: 1, figures: 3 } },
}
export const shapeOf = (kind: QuantityKind, set: UnitSet): Shape => SHAPES[kind][set]
