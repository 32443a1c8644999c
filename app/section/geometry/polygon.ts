import type { Point } from '../types'

/** Area of an outline, m², positive when its vertices run against the clock. */
export function areaOf(outline: readonly Point[]): number {
  const origin = outline[0]
  if (!origin) return 0
  let sum = 0
  // Relative to the first vertex: far from the origin the plain formula loses all its figures.
  for (let i = 1; i < outline.length - 1; i++) {
    const a = outline[i]
    const b = outline[i + 1]
    if (a && b) sum += (a[0] - origin[0]) * (b[1] - origin[1]) - (b[0] - origin[0]) * (a[1] - origin[1])
  }
  return sum / 2
}

/** The box round some points; null without points. */
export function boxOf(points: readonly Point[]): { x0: number; x1: number; z0: number; z1: number } | null {
  if (points.length === 0) return null
  const box = { x0: Infinity, x1: -Infinity, z0: Infinity, z1: -Infinity }
  for (const [x, z] of points) {
    box.x0 = Math.min(box.x0, x)
    box.x1 = Math.max(box.x1, x)
    box.z0 = Math.min(box.z0, z)
    box.z1 = Math.max(box.z1, z)
  }
  return box
}

/** Whether a point lies inside an outline (even-odd rule). On the outline itself either answer may come. */
export function contains(outline: readonly Point[], [x, z]: Point): boolean {
  let inside = false
  outline.forEach(([ax, az], i) => {
    const [bx, bz] = outline[(i + 1) % outline.length] ?? [ax, az]
    if (az > z !== bz > z && x < ax + ((bx - ax) * (z - az)) / (bz - az)) inside = !inside
  })
  return inside
}

/** The stretches of the vertical at x that lie inside an outline, [bottom, top], upward. At a vertex: as just right of it. */
export function verticalAt(outline: readonly Point[], x: number): [bottom: number, top: number][] {
  const heights: number[] = []
  outline.forEach(([ax, az], i) => {
    const [bx, bz] = outline[(i + 1) % outline.length] ?? [ax, az]
    if (ax <= x !== bx <= x) heights.push(az + ((bz - az) * (x - ax)) / (bx - ax))
  })
  heights.sort((a, b) => a - b)
  const stretches: [number, number][] = []
  for (let i = 0; i + 1 < heights.length; i += 2) stretches.push([heights[i] ?? 0, heights[i + 1] ?? 0])
  return stretches
}

/** The part of an outline between two verticals. May run along them; empty when nothing lies between. */
export function clipToStrip(outline: readonly Point[], from: number, to: number): Point[] {
  return cutAt(cutAt(outline, from, 1), to, -1)
}

function cutAt(outline: readonly Point[], x: number, keep: 1 | -1): Point[] {
  const out: Point[] = []
  outline.forEach((a, i) => {
    const b = outline[(i + 1) % outline.length] ?? a
    const [inA, inB] = [(a[0] - x) * keep >= 0, (b[0] - x) * keep >= 0]
    if (inA) out.push([a[0], a[1]])
    if (inA !== inB) out.push([x, a[1] + ((b[1] - a[1]) * (x - a[0])) / (b[0] - a[0])])
  })
  return out
}

type Edge = { a: Point; b: Point; at: number; low: number; high: number }

/**
 * Where an outline crosses or touches itself: the number of the vertex its first offending edge starts at, and a spot near it.
 * null for a simple outline. Neighbouring vertices on one spot count as one.
 */
export function crossingOf(outline: readonly Point[]): { vertex: number; at: Point } | null {
  const kept = outline
    .map((point, at) => ({ point, at }))
    .filter(({ point }, i, all) => {
      const before = all[(i + all.length - 1) % all.length]?.point
      return all.length === 1 || !before || point[0] !== before[0] || point[1] !== before[1]
    })
  const edges: Edge[] = kept.map(({ point: a, at }, i) => {
    const b = kept[(i + 1) % kept.length]?.point ?? a
    return { a, b, at, low: Math.min(a[0], b[0]), high: Math.max(a[0], b[0]) }
  })
  for (let i = 0; i < edges.length; i++) {
    const [one, next] = [edges[i], edges[(i + 1) % edges.length]]
    if (one && next && foldsBack(one, next)) return { vertex: next.at, at: next.a }
  }
  const order = edges.map((_, i) => i).sort((i, j) => (edges[i]?.low ?? 0) - (edges[j]?.low ?? 0))
  let active: number[] = []
  for (const i of order) {
    const edge = edges[i]
    if (!edge) continue
    active = active.filter((j) => (edges[j]?.high ?? 0) >= edge.low)
    for (const j of active) {
      const other = edges[j]
      const apart = Math.abs(i - j)
      if (!other || apart === 1 || apart === edges.length - 1) continue
      const at = meeting(edge, other)
      if (at) return { vertex: Math.min(edge.at, other.at), at }
    }
    active.push(i)
  }
  return null
}

const turn = (a: Point, b: Point, c: Point) => (b[0] - a[0]) * (c[1] - a[1]) - (b[1] - a[1]) * (c[0] - a[0])

function foldsBack({ a, b }: Edge, { b: c }: Edge): boolean {
  return turn(a, b, c) === 0 && (a[0] - b[0]) * (c[0] - b[0]) + (a[1] - b[1]) * (c[1] - b[1]) > 0
}

function meeting(one: Edge, other: Edge): Point | null {
  const [p, q, r, s] = [one.a, one.b, other.a, other.b]
  const [d1, d2, d3, d4] = [turn(p, q, r), turn(p, q, s), turn(r, s, p), turn(r, s, q)]
  if (((d1 > 0 && d2 < 0) || (d1 < 0 && d2 > 0)) && ((d3 > 0 && d4 < 0) || (d3 < 0 && d4 > 0))) {
    const t = d3 / (d3 - d4)
    return [p[0] + t * (q[0] - p[0]), p[1] + t * (q[1] - p[1])]
  }
  if (d1 === 0 && within(one, r)) return r
  if (d2 === 0 && within(one, s)) return s
  if (d3 === 0 && within(other, p)) return p
  if (d4 === 0 && within(other, q)) return q
  return null
}

const within = ({ a, b }: Edge, [x, z]: Point) =>
  x >= Math.min(a[0], b[0]) && x <= Math.max(a[0], b[0]) && z >= Math.min(a[1], b[1]) && z <= Math.max(a[1], b[1])
