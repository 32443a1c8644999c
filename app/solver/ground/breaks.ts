import type { Point, Section } from '~/section'

/** A straight piece of a body's outline, the base or the ground, left to right; `body` is −1 for base and ground. */
export type Edge = { xl: number; zl: number; xr: number; zr: number; body: number }

/** z of a straight edge at x, m. */
export const edgeAt = (edge: Edge, x: number): number =>
  edge.zl + ((edge.zr - edge.zl) * (x - edge.xl)) / (edge.xr - edge.xl)

/** z of a line (x strictly increasing) at x, m; its end values beyond its ends. */
export function lineAt(line: Point[], x: number): number {
  const last = line.length - 1
  const first = line[0]
  const end = line[last]
  if (!first || !end) return Number.NaN
  if (x <= first[0]) return first[1]
  if (x >= end[0]) return end[1]
  let low = 0
  let high = last
  while (high - low > 1) {
    const mid = (low + high) >> 1
    const point = line[mid]
    if (point && point[0] <= x) low = mid
    else high = mid
  }
  const [xa, za] = line[low] ?? first
  const [xb, zb] = line[high] ?? end
  return za + ((zb - za) * (x - xa)) / (xb - xa)
}

/** The edges of a polyline or a closed outline that have any width in x. */
export function edgesOf(points: Point[], closed: boolean, body: number): Edge[] {
  const edges: Edge[] = []
  const count = closed ? points.length : points.length - 1
  for (let i = 0; i < count; i++) {
    const a = points[i]
    const b = points[(i + 1) % points.length]
    if (!a || !b || a[0] === b[0]) continue
    edges.push(
      a[0] < b[0] ? { xl: a[0], zl: a[1], xr: b[0], zr: b[1], body } : { xl: b[0], zl: b[1], xr: a[0], zr: a[1], body },
    )
  }
  return edges
}

/** x where edges of different lines cross within [left, right]. Sorted sweep, so that far apart edges are never compared. */
export function crossings(edges: Edge[], left: number, right: number): number[] {
  const sorted = edges.filter((edge) => edge.xr > left && edge.xl < right).sort((a, b) => a.xl - b.xl)
  const found: number[] = []
  let open: Edge[] = []
  for (const edge of sorted) {
    open = open.filter((other) => other.xr > edge.xl)
    for (const other of open) {
      if (other.body === edge.body) continue
      const a = Math.max(edge.xl, other.xl)
      const b = Math.min(edge.xr, other.xr)
      const da = edgeAt(edge, a) - edgeAt(other, a)
      const db = edgeAt(edge, b) - edgeAt(other, b)
      if (da * db < 0) found.push(a + ((b - a) * da) / (da - db))
    }
    open.push(edge)
  }
  return found
}

/**
 * Every x of the strip where something changes: vertices of ground, base and bodies, crossings of their lines, ends of recharge
 * zones, features, banks. Ascending; places nearer than 1e-9 of the strip are one, and a feature keeps its own x exactly.
 */
export function breaksOf(section: Section, edges: Edge[]): number[] {
  const left = section.left.x
  const right = section.right.x
  const kept = section.features.map(({ x }) => x)
  const others: number[] = []
  for (const [x] of section.ground) others.push(x)
  for (const [x] of section.base) others.push(x)
  for (const body of section.bodies) for (const [x] of body.outline) others.push(x)
  for (const { from, to } of section.recharge) others.push(from, to)
  others.push(...crossings(edges, left, right))
  const near = (right - left) * 1e-9
  const marks = [
    { x: left, own: true },
    { x: right, own: true },
    ...kept.map((x) => ({ x, own: true })),
    ...others.map((x) => ({ x, own: false })),
  ]
    .filter(({ x }) => x >= left && x <= right)
    .sort((a, b) => a.x - b.x)
  const breaks: { x: number; own: boolean }[] = []
  for (const mark of marks) {
    const last = breaks[breaks.length - 1]
    if (!last || mark.x - last.x > near || (mark.own && last.own && mark.x !== last.x)) breaks.push({ ...mark })
    else if (mark.own && !last.own) breaks[breaks.length - 1] = { ...mark }
  }
  return breaks.map(({ x }) => x)
}
