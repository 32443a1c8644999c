import type { Point } from '../types'

/**
 * Elevation of a line (x strictly increasing) at x, m. Beyond its ends the line goes on level. NaN for a line without points.
 */
export function lineAt(line: readonly Point[], x: number): number {
  const first = line[0]
  const last = line.at(-1)
  if (!first || !last) return Number.NaN
  if (x <= first[0]) return first[1]
  if (x >= last[0]) return last[1]
  let low = 0
  let high = line.length - 1
  while (high - low > 1) {
    const middle = (low + high) >> 1
    if ((line[middle]?.[0] ?? 0) <= x) low = middle
    else high = middle
  }
  const [x0, z0] = line[low] ?? first
  const [x1, z1] = line[high] ?? last
  return x1 > x0 ? z0 + ((z1 - z0) * (x - x0)) / (x1 - x0) : z0
}

/** Every x at which one of the lines has a vertex, increasing, each once. */
export function breaksOf(...lines: readonly (readonly Point[])[]): number[] {
  return [...new Set(lines.flatMap((line) => line.map(([x]) => x)))].sort((a, b) => a - b)
}

/** Where `under` reaches up to or above `over`: the first stretch of it, widest difference, or null. Touching at one x is none. */
export function aboveAt(
  under: readonly Point[],
  over: readonly Point[],
  slack = 1e-9,
): { from: number; to: number; at: number; by: number } | null {
  let before: { x: number; gap: number } | null = null
  let found: { from: number; to: number; at: number; by: number } | null = null
  // Both lines are walked along together: i and j are the next vertices of each.
  let [i, j] = [0, 0]
  while (i < under.length || j < over.length) {
    const x = Math.min(under[i]?.[0] ?? Infinity, over[j]?.[0] ?? Infinity)
    const gap = heightIn(over, j, x) - heightIn(under, i, x)
    while (i < under.length && (under[i]?.[0] ?? x) <= x) i++
    while (j < over.length && (over[j]?.[0] ?? x) <= x) j++
    const pierces = gap < -slack
    // Two neighbours that touch: the lines run together between them.
    const touches = gap <= slack && before !== null && before.gap <= slack
    if (pierces || touches) {
      if (!found) found = { from: touches && before ? before.x : x, to: x, at: x, by: -gap }
      else {
        found.to = x
        if (-gap > found.by) [found.at, found.by] = [x, -gap]
      }
    } else if (found) return found
    before = { x, gap }
  }
  return found
}

/** Height at x on the edge that ends at vertex i; level beyond the ends. */
function heightIn(line: readonly Point[], i: number, x: number): number {
  const [b, a] = [line[i], line[i - 1]]
  if (!b) return a?.[1] ?? Number.NaN
  return !a || x >= b[0] || b[0] <= a[0] ? b[1] : a[1] + ((b[1] - a[1]) * (x - a[0])) / (b[0] - a[0])
}
