import type { LiveSection } from '~/live'
import type { Point, Section } from '~/section'
import type { Solution } from '~/solver'
import { lineOf, shown, vertexPath } from './paths'
import type { Snapped, Spot } from './types'

/** How near the pointer must be to catch, px. */
const NEAR = 8

export type SnapIn = {
  live: LiveSection
  caseId: string | null
  solution: Solution
  /** Metres per pixel. */
  scale: Spot
  /** Spacing of the grid as drawn, m; 0: no grid. */
  grid: Spot
  /** Paths that move along and must not catch themselves. */
  except: readonly string[]
}

/**
 * The nearest thing worth meeting: a vertex or the place of something first, then a line at this x (ground, base, water table,
 * an edge), then the grid, along and up each for itself. null when nothing is near.
 */
export function snapSpot(spot: Spot, given: SnapIn): Snapped | null {
  const section = shown(given.live, given.caseId)
  const except = new Set(given.except)
  const point = nearestPoint(spot, points(given, section, except), given.scale)
  if (point) return point
  const line = nearestLine(spot, lines(given, section, except), given.scale)
  const x = toGrid(spot.x, given.grid.x, given.scale.x)
  if (line) {
    // On a line the grid may still hold x, at the line's height there.
    const held = x === null ? null : (heightAt(line.points, x) ?? null)
    return x !== null && held !== null ? { x, z: held, to: line.to } : { x: spot.x, z: line.z, to: line.to }
  }
  const z = toGrid(spot.z, given.grid.z, given.scale.z)
  if (x === null && z === null) return null
  return { x: x ?? spot.x, z: z ?? spot.z, to: 'grid' }
}

type Named = Spot & { to: string }

function points({ live }: SnapIn, section: Section, except: ReadonlySet<string>): Named[] {
  const found: Named[] = []
  const vertices = (line: 'ground' | 'base' | `bodies.${string}`) => {
    if (except.has(line)) return
    const { points: all, keys } = lineOf(live, line)
    all.forEach(([x, z], i) => {
      const key = keys[i]
      if (key !== undefined && !except.has(vertexPath(line, key))) found.push({ x, z, to: 'vertex' })
    })
  }
  vertices('ground')
  vertices('base')
  for (const body of section.bodies) vertices(`bodies.${body.id}`)
  for (const side of ['left', 'right'] as const) {
    const bank = section[side]
    if (bank.kind === 'water' && !except.has(side) && !except.has(`${side}.stage`))
      found.push({ x: bank.x, z: bank.stage, to: 'stage' })
  }
  for (const feature of section.features)
    if ('level' in feature && !except.has(`features.${feature.id}`))
      found.push({ x: feature.x, z: feature.level, to: feature.kind })
  return found
}

type Line = { points: Point[]; to: string }

function lines({ live, solution }: SnapIn, section: Section, except: ReadonlySet<string>): Line[] {
  const partOf = (line: string) => except.has(line) || [...except].some((path) => path.startsWith(`${line}.v:`))
  const found: Line[] = []
  if (solution.status === 'solved') {
    const { x, head } = solution.profile
    found.push({ points: Array.from(x, (at, i): Point => [at, head[i] ?? Number.NaN]), to: 'water table' })
  }
  if (!partOf('ground')) found.push({ points: live.section.ground, to: 'ground' })
  if (!partOf('base')) found.push({ points: live.section.base, to: 'base' })
  for (const body of section.bodies) {
    if (partOf(`bodies.${body.id}`)) continue
    body.outline.forEach((a, i) => {
      const b = body.outline[(i + 1) % body.outline.length]
      if (b && a[0] !== b[0]) found.push({ points: a[0] < b[0] ? [a, b] : [b, a], to: 'edge' })
    })
  }
  return found
}

function nearestPoint(spot: Spot, all: Named[], scale: Spot): Snapped | null {
  let best: { far: number; at: Named } | null = null
  for (const at of all) {
    const far = Math.hypot((at.x - spot.x) / scale.x, (at.z - spot.z) / scale.z)
    if (far <= NEAR && (!best || far < best.far)) best = { far, at }
  }
  return best ? { x: best.at.x, z: best.at.z, to: best.at.to } : null
}

function nearestLine(spot: Spot, all: Line[], scale: Spot): (Line & { z: number }) | null {
  let best: { far: number; line: Line; z: number } | null = null
  for (const line of all) {
    const z = heightAt(line.points, spot.x)
    if (z === null) continue
    const far = Math.abs(z - spot.z) / scale.z
    if (far <= NEAR && (!best || far < best.far)) best = { far, line, z }
  }
  return best ? { ...best.line, z: best.z } : null
}

/** Height of a line at x, null outside it. */
export function heightAt(points: readonly Point[], x: number): number | null {
  for (let i = 0; i + 1 < points.length; i++) {
    const [a, b] = [points[i], points[i + 1]]
    if (!a || !b || x < a[0] || x > b[0] || a[0] === b[0]) continue
    return a[1] + ((x - a[0]) / (b[0] - a[0])) * (b[1] - a[1])
  }
  return null
}

function toGrid(value: number, step: number, scale: number): number | null {
  if (step <= 0) return null
  const near = Math.round(value / step) * step
  return Math.abs(near - value) / scale <= NEAR ? near : null
}
