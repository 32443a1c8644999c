import type { Spot } from '../types'

const turn = (a: Spot, b: Spot, c: Spot) => Math.sign((b.x - a.x) * (c.z - a.z) - (b.z - a.z) * (c.x - a.x))

/** Do two edges cross, or lie on one another? Edges that share a corner are not asked about. */
function cross(a: Spot, b: Spot, c: Spot, d: Spot): boolean {
  const [p, q, r, s] = [turn(a, b, c), turn(a, b, d), turn(c, d, a), turn(c, d, b)]
  if (p !== q && r !== s) return true
  if (p !== 0 || q !== 0) return false
  return (
    Math.max(a.x, b.x) >= Math.min(c.x, d.x) &&
    Math.max(c.x, d.x) >= Math.min(a.x, b.x) &&
    Math.max(a.z, b.z) >= Math.min(c.z, d.z) &&
    Math.max(c.z, d.z) >= Math.min(a.z, b.z)
  )
}

/** Where an outline crosses itself, as the number of the edge that does; null when it is simple. */
export function crossing(outline: Spot[]): number | null {
  const n = outline.length
  for (let i = 0; i < n; i++)
    for (let j = i + 2; j < n; j++) {
      if (i === 0 && j === n - 1) continue
      const [a, b, c, d] = [outline[i], outline[i + 1], outline[j], outline[(j + 1) % n]]
      if (a && b && c && d && cross(a, b, c, d)) return j
    }
  return null
}

/** Twice the signed area; 0 for corners on one line. */
export const area2 = (outline: Spot[]) =>
  outline.reduce((sum, a, i) => {
    const b = outline[(i + 1) % outline.length]
    return b ? sum + a.x * b.z - b.x * a.z : sum
  }, 0)
