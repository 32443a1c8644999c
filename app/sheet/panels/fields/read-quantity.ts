import type { UnitSet } from '../../state'
import type { Kind } from './quantities'
import { shapeOf } from './quantities'

export type ReadQuantity = { ok: true; value: number } | { ok: false; message: string }

export async function readQuantity(text: string, kind: Kind, units: UnitSet): Promise<ReadQuantity> {
  const value = Number(text)
  return Number.isFinite(value)
    ? { ok: true, value: value / shapeOf(kind, units).times }
    : { ok: false, message: 'This is no number.' }
}
export function warmUnits() {}
