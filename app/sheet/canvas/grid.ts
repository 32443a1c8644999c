import type { PanelFrame } from '~/drawing'
import type { UnitSet } from '../state'
import type { Spot } from '../tools/types'

const FOOT = 0.3048

/** The smallest 1, 2 or 5 times a power of ten not below a size. */
export function stepAbove(size: number): number {
  const power = 10 ** Math.floor(Math.log10(size))
  const times = size / power
  return (times <= 1 ? 1 : times <= 2 ? 2 : times <= 5 ? 5 : 10) * power
}

/** Spacing of the round numbers that dragged things catch: no nearer than some 24 px, whole in the units on show. m. */
export function gridOf({ bx, by }: PanelFrame, units: UnitSet): Spot {
  const unit = units === 'us' ? FOOT : 1
  return { x: stepAbove(24 / bx / unit) * unit, z: stepAbove(24 / Math.abs(by) / unit) * unit }
}
