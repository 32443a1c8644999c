import type { QuantityKind, UnitSet } from './kinds'
import type { Quantity } from './parse'

/** Loads the parser of quantities, and mathjs with it; call it early where a number field is about to be used. */
export const loadUnits = () => import('./parse')

/** As `parseQuantity` of ./parse, loading it when it is needed first. */
export async function parseQuantity(typed: string, kind: QuantityKind, options: { set: UnitSet }): Promise<Quantity> {
  const units = await loadUnits()
  return units.parseQuantity(typed, kind, options)
}

export { type FormatOptions, formatQuantity, formatTime, plainNumber } from './format'
export { FOOT, INCH, MILE, type QuantityKind, type Shape, shapeOf, type UnitSet, YEAR } from './kinds'
export type { Quantity } from './parse'
