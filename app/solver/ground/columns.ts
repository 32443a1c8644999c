// biome-ignore-all lint/style/noNonNullAssertion: the loops keep every index inside its array.
import { type Ground, panelAt, shareOf } from './ground'

/**
 * Columns of layers, many in one set of arrays. Layers of column c are start[c] … start[c+1]−1 from the base up; the last one
 * continues upward. `t` and `p` are T and ∫T dh at the underside of each layer, so that both cost one search and one product:
 *   T(h) = ∫ K dz from the base to h (m²/d),   P(h) = ∫ T dh from the base to h (m³/d; over level layers Girinskii's
 * potential, with one material K s²/2). Both are 0 at and below the base.
 */
export type Columns = {
  count: number
  start: Int32Array
  z: Float64Array
  k: Float64Array
  t: Float64Array
  p: Float64Array
}

export function makeColumns(columns: number, layers: number): Columns {
  return {
    count: 0,
    start: new Int32Array(columns + 1),
    z: new Float64Array(layers),
    k: new Float64Array(layers),
    t: new Float64Array(layers),
    p: new Float64Array(layers),
  }
}

/** Adds the column at `share` (0 … 1) of a panel's width; the arrays must have room. */
export function addColumn(columns: Columns, ground: Ground, panel: number, share: number): void {
  const c = columns.count
  let at = columns.start[c]!
  const first = at
  for (let layer = ground.start[panel]!; layer < ground.start[panel + 1]!; layer++, at++) {
    const z = ground.zl[layer]! + (ground.zr[layer]! - ground.zl[layer]!) * share
    columns.k[at] = ground.k[layer]!
    if (at === first) {
      columns.z[at] = z
      columns.t[at] = 0
      columns.p[at] = 0
    } else {
      const d = Math.max(0, z - columns.z[at - 1]!)
      const k = columns.k[at - 1]!
      const t = columns.t[at - 1]!
      columns.z[at] = columns.z[at - 1]! + d
      columns.t[at] = t + k * d
      columns.p[at] = columns.p[at - 1]! + (t + (k * d) / 2) * d
    }
  }
  columns.start[c + 1] = at
  columns.count = c + 1
}

/** Adds a column of one material on a base: a wall is such a column as long as the wall is thick. */
export function addPlainColumn(columns: Columns, base: number, k: number): void {
  const at = columns.start[columns.count]!
  columns.z[at] = base
  columns.k[at] = k
  columns.t[at] = 0
  columns.p[at] = 0
  columns.count++
  columns.start[columns.count] = at + 1
}

/** T(h) of column c, m²/d. */
export function transmissivity(columns: Columns, c: number, h: number): number {
  const first = columns.start[c]!
  let e = columns.start[c + 1]! - 1
  while (e > first && h <= columns.z[e]!) e--
  const d = h - columns.z[e]!
  return d > 0 ? columns.t[e]! + columns.k[e]! * d : columns.t[e]!
}

/** P(h) = ∫ T dh of column c, m³/d. */
export function potential(columns: Columns, c: number, h: number): number {
  const first = columns.start[c]!
  let e = columns.start[c + 1]! - 1
  while (e > first && h <= columns.z[e]!) e--
  const d = h - columns.z[e]!
  return d > 0 ? columns.p[e]! + (columns.t[e]! + (columns.k[e]! * d) / 2) * d : columns.p[e]!
}

/** The h whose P(h) is given, m; the base for P ≤ 0. */
export function headOfPotential(columns: Columns, c: number, p: number): number {
  const first = columns.start[c]!
  let e = columns.start[c + 1]! - 1
  while (e > first && p <= columns.p[e]!) e--
  const rest = p - columns.p[e]!
  if (rest <= 0) return columns.z[e]!
  const t = columns.t[e]!
  return columns.z[e]! + (2 * rest) / (t + Math.sqrt(t * t + 2 * columns.k[e]! * rest))
}

/** ∫ K dz from the base to z of column c over T(h): Dupuit's share F of the flow below z, 0 … 1. */
export function shareBelow(columns: Columns, c: number, z: number, h: number): number {
  const all = transmissivity(columns, c, h)
  return all > 0 ? Math.min(1, transmissivity(columns, c, Math.min(z, h)) / all) : 0
}

/** One column as a set of its own: for reading at any x. At a break `side` picks the panel. */
export function columnAt(ground: Ground, x: number, side: 'left' | 'right' = 'right'): Columns {
  const panel = panelAt(ground, x, side)
  const columns = makeColumns(1, ground.start[panel + 1]! - ground.start[panel]!)
  addColumn(columns, ground, panel, shareOf(ground, panel, x))
  return columns
}

/** A column layer by layer for people who need the materials: undersides z (m), K (m/d), place in section.materials. */
export function layersAt(
  ground: Ground,
  x: number,
  side: 'left' | 'right' = 'right',
): { z: number; k: number; material: number }[] {
  const panel = panelAt(ground, x, side)
  const share = shareOf(ground, panel, x)
  const layers: { z: number; k: number; material: number }[] = []
  for (let layer = ground.start[panel]!; layer < ground.start[panel + 1]!; layer++) {
    const z = ground.zl[layer]! + (ground.zr[layer]! - ground.zl[layer]!) * share
    layers.push({ z, k: ground.k[layer]!, material: ground.material[layer]! })
  }
  return layers
}
