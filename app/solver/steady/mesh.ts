// biome-ignore-all lint/style/noNonNullAssertion: the loops keep every index inside its array.
import type { Ground } from '../ground/ground'
import type { Cells } from './net'

/** One cell per panel: all that the exact path needs. */
export function coarsest(ground: Ground): Cells {
  return { x: ground.x, panel: Int32Array.from({ length: ground.x.length - 1 }, (_, p) => p) }
}

/** Places 0 … 1 of `count` cells, closer together towards both ends (half cosine, half even). */
const graded = (i: number, count: number): number => {
  const t = i / count
  return 0.5 * t + 0.25 * (1 - Math.cos(Math.PI * t))
}

/** About `count` cells in all, shared out by panel width but at least `least` in each, graded towards every break. */
export function firstCells(ground: Ground, count: number, least: number, even = false): Cells {
  const panels = ground.x.length - 1
  const whole = ground.x[panels]! - ground.x[0]!
  const x: number[] = []
  const panel: number[] = []
  for (let p = 0; p < panels; p++) {
    const xl = ground.x[p]!
    const wide = ground.x[p + 1]! - xl
    const cells = Math.max(least, Math.round((count * wide) / whole))
    for (let i = 0; i < cells; i++) {
      x.push(i === 0 ? xl : xl + wide * (even ? i / cells : graded(i, cells)))
      panel.push(p)
    }
  }
  x.push(ground.x[panels]!)
  return { x: Float64Array.from(x), panel: Int32Array.from(panel) }
}

/** Cuts cell c into parts[c] equal parts. */
export function cut(cells: Cells, parts: Int32Array): Cells {
  let total = 0
  for (const p of parts) total += p
  const x = new Float64Array(total + 1)
  const panel = new Int32Array(total)
  let at = 0
  for (let c = 0; c < parts.length; c++) {
    const xl = cells.x[c]!
    const wide = cells.x[c + 1]! - xl
    const m = parts[c]!
    for (let i = 0; i < m; i++) {
      x[at] = i === 0 ? xl : xl + (wide * i) / m
      panel[at] = cells.panel[c]!
      at++
    }
  }
  x[at] = cells.x[cells.x.length - 1]!
  return { x, panel }
}
