import { readAt } from '../steady/read'
import type { Solved } from '../types'
import { type Stack, stackAt } from './stack'

/**
 * Dupuit stream function inside a section (METHODS §3): ψ(x,z) = −q(x)·F(x,z) with F the share of the transmissivity below z.
 * F runs from 0 at the base to 1 at the water table; |q|·F is the flow that passes below z, and is constant along a flow line.
 */
export type Station = {
  x: number
  /** Head, base, saturated thickness, m. */
  head: number
  base: number
  saturated: number
  /** Discharge, m²/d, + to the right. */
  flow: number
  stack: Stack
  /** m²/d. */
  transmissivity: number
}

/** State of the section just left or right of x (the sides differ at sinks, walls and contacts). */
export function stationAt(solution: Solved, x: number, side: 'left' | 'right'): Station {
  const reading = readAt(solution, x)
  const sided = (side === 'left' ? reading.left : reading.right) ?? reading
  const stack = stackAt(solution, x, side)
  const base = reading.base
  const head = Math.max(sided.head, base)
  return { x, head, base, saturated: head - base, flow: sided.flow, stack, transmissivity: below(stack, base, head) }
}

/** ∫ K dz from the base up to z, m²/d. */
export function below(stack: Stack, base: number, z: number): number {
  let from = base
  let sum = 0
  for (const layer of stack) {
    if (z <= from) break
    const to = Math.min(layer.to, z)
    if (to > from) {
      sum += layer.k * (to - from)
      from = to
    }
  }
  return sum
}

/** Share of the transmissivity below z: 0 at the base, 1 at the water table. */
export function shareBelow(station: Station, z: number): number {
  if (station.transmissivity <= 0) return 0
  return Math.min(1, below(station.stack, station.base, Math.min(z, station.head)) / station.transmissivity)
}

/** Elevation below which the given share of the transmissivity lies: the inverse of `shareBelow`. */
export function heightOf(station: Station, share: number): number {
  let left = Math.max(0, Math.min(1, share)) * station.transmissivity
  let from = station.base
  for (const layer of station.stack) {
    const to = Math.min(layer.to, station.head)
    if (to <= from) continue
    const holds = layer.k * (to - from)
    if (holds >= left || to >= station.head) return layer.k > 0 ? Math.min(station.head, from + left / layer.k) : from
    left -= holds
    from = to
  }
  return station.head
}

/** Conductivity (m/d) and effective porosity (null when not given) at height z. */
export function materialAt(station: Station, z: number): { k: number; porosity: number | null } {
  const layer = station.stack.find(({ to }) => z < to) ?? station.stack[station.stack.length - 1]
  return { k: layer?.k ?? 0, porosity: layer?.porosity ?? null }
}

/** ∫ n dz over the saturated thickness, m; null when a material met has no porosity. */
export function storedWater(station: Station): number | null {
  let from = station.base
  let sum = 0
  for (const layer of station.stack) {
    const to = Math.min(layer.to, station.head)
    if (to > from) {
      if (layer.porosity === null) return null
      sum += layer.porosity * (to - from)
      from = to
    }
    if (layer.to >= station.head) break
  }
  return sum
}
