import type { Edit } from '~/live'
import { isLine, lineOf, vertexOf, vertexPath } from './paths'
import type { At, Surface } from './types'

/** A new vertex on the edge of a line or outline that passes nearest to the pointer; it is picked. False when there is none. */
export function insertOn(surface: Surface, path: string, at: At): boolean {
  const { sheet } = surface
  const line = isLine(path) ? path : null
  if (!line || vertexOf(path) || sheet.get().may !== 'write') return false
  const { points, keys, closed } = lineOf(sheet.stored(), line)
  const scale = surface.scale()
  let best: { after: number; x: number; z: number; far: number } | null = null
  const edges = closed ? points.length : points.length - 1
  for (let i = 0; i < edges; i++) {
    const a = points[i]
    const b = points[(i + 1) % points.length]
    if (!a || !b) continue
    // Measured on the screen: the exaggeration would make the nearest edge in metres a wrong one.
    const [ax, az, bx, bz] = [a[0] / scale.x, a[1] / scale.z, b[0] / scale.x, b[1] / scale.z]
    const length = (bx - ax) ** 2 + (bz - az) ** 2
    if (length === 0) continue
    const t = Math.min(1, Math.max(0, ((at.x / scale.x - ax) * (bx - ax) + (at.z / scale.z - az) * (bz - az)) / length))
    const far = Math.hypot(at.x / scale.x - ax - t * (bx - ax), at.z / scale.z - az - t * (bz - az))
    if (t > 0 && t < 1 && (best === null || far < best.far))
      best = { after: i, x: a[0] + t * (b[0] - a[0]), z: a[1] + t * (b[1] - a[1]), far }
  }
  if (!best) return false
  const spot = surface.tidy(best)
  const [a, b] = [points[best.after], points[best.after + 1]]
  if (!closed && a && b && (spot.x <= a[0] || spot.x >= b[0])) return false
  const key = surface.id('v')
  const insert = {
    do: 'insert-vertex',
    line,
    key,
    at: [spot.x, spot.z],
    after: keys[best.after] ?? null,
  } satisfies Edit
  sheet.edit([insert], undefined, [vertexPath(line, key)])
  return true
}
