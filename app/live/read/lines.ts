import { aboveAt, areaOf, crossingOf, LIMITS, lineAt, POINT, type Point, said, troubleWith } from '~/section'
import { inOrder } from '../order'
import { isKey, MADE_UP } from '../shape'
import type { VertexKey } from '../types'
import { type Held, remembered, type Say } from './context'

export type Vertex = { key: VertexKey; x: number; z: number }
export type Strip = { left: number; right: number }

const WORD = { ground: 'ground line', base: 'base' } as const
const LEVEL = { ground: 10, base: 0 } as const
/** An end this near to its bank belongs to it, m: banks are typed to any figure, vertices are kept to a tenth of a millimetre. */
const NEAR = 1e-3
/** Cover left where the base had to be brought below the ground, m. */
const COVER = 0.01

const isVertex = (value: unknown): value is { x: number; z: number; o?: unknown } =>
  typeof value === 'object' &&
  value !== null &&
  'x' in value &&
  'z' in value &&
  troubleWith(POINT.x, value.x) === null &&
  troubleWith(POINT.z, value.z) === null

function verticesOf(held: Held, path: string, say: Say): (Vertex & { order: string; name: string })[] {
  const found: (Vertex & { order: string; name: string })[] = []
  for (const [key, value] of held)
    if (isKey(key) && isVertex(value))
      found.push({
        key,
        name: key,
        x: value.x + 0,
        z: value.z + 0,
        order: typeof value.o === 'string' ? value.o.slice(0, 200) : '',
      })
  const lost = held.size - found.length
  if (lost > 0) say(path, `${said(lost)} ${lost === 1 ? 'vertex' : 'vertices'} could not be read and are left out.`)
  return found
}

/** Ground or base from bank to bank: in order of x, one vertex at each, the first and last at the banks. */
export function readLine(held: Held, name: 'ground' | 'base', strip: Strip, say: Say): Vertex[] {
  return remembered(held, `${name} ${strip.left} ${strip.right}`, say, (told) => makeLine(held, name, strip, told))
}

function makeLine(held: Held, name: 'ground' | 'base', strip: Strip, say: Say): Vertex[] {
  const all = verticesOf(held, name, say).sort((a, b) => a.x - b.x || inOrder(a, b))
  const line: Vertex[] = []
  for (const { key, x, z } of all) {
    const before = line.at(-1)
    if (before && x - before.x < LIMITS.apart)
      say(name, `Two vertices of the ${WORD[name]} stand at x = ${said(x)} m; one is left out. Move or remove one.`, {
        x,
        z,
      })
    else if (line.length >= LIMITS.line) {
      say(
        name,
        `The ${WORD[name]} has more than ${said(LIMITS.line)} vertices; those from x = ${said(x)} m on are left out.`,
        { x, z },
      )
      break
    } else line.push({ key, x, z })
  }
  const start = endAt(line, name, 'left', strip.left, say)
  const end = endAt(
    line.filter(({ key }) => key !== start.key),
    name,
    'right',
    strip.right,
    say,
    start.z,
  )
  const inner = line.filter(
    ({ key, x }) =>
      key !== start.key && key !== end.key && x >= strip.left + LIMITS.apart && x <= strip.right - LIMITS.apart,
  )
  const beyond =
    line.length - inner.length - [start, end].filter(({ key }) => line.some((one) => one.key === key)).length
  if (beyond > 0)
    say(
      name,
      `${said(beyond)} ${beyond === 1 ? 'vertex' : 'vertices'} of the ${WORD[name]} lie beyond the banks and are left out.`,
      {
        x: strip.left,
        to: strip.right,
      },
    )
  return [start, ...inner, end]
}

/** The vertex that ends a line at a bank, brought to it. */
function endAt(
  line: Vertex[],
  name: 'ground' | 'base',
  side: 'left' | 'right',
  x: number,
  say: Say,
  z?: number,
): Vertex {
  const inward = side === 'left' ? 1 : -1
  const near = line.filter((one) => Math.abs(one.x - x) <= NEAR)
  const nearest = near.reduce<Vertex | null>(
    (best, one) => (best === null || Math.abs(one.x - x) < Math.abs(best.x - x) ? one : best),
    null,
  )
  if (nearest) return { ...nearest, x }
  const outside = line.filter((one) => (one.x - x) * inward < 0)
  const beyond = side === 'left' ? outside.at(-1) : outside[0]
  const inside = line.filter((one) => (one.x - x) * inward > 0)
  const next = side === 'left' ? inside[0] : inside.at(-1)
  if (beyond) {
    const height = next ? beyond.z + ((next.z - beyond.z) * (x - beyond.x)) / (next.x - beyond.x) : beyond.z
    say(name, `The ${WORD[name]} reaches beyond the ${side} bank and is cut there.`, { x, z: height })
    return { key: beyond.key, x, z: height }
  }
  if (next) {
    say(name, `The ${WORD[name]} stops at ${said(next.x)} m, short of the ${side} bank, and is carried on to it.`, {
      x,
      z: next.z,
    })
    return { key: next.key, x, z: next.z }
  }
  const height = z ?? LEVEL[name]
  say(name, `The ${WORD[name]} has no vertex at the ${side} bank; draw it.`, { x, z: height })
  return { key: MADE_UP[side], x, z: height }
}

const pointsMade = new WeakMap<readonly Vertex[], Point[]>()
const keysOfPoints = new WeakMap<readonly Point[], VertexKey[]>()

/** The positions of vertices; the same vertices give the same list. */
export function pointsOf(line: readonly Vertex[]): Point[] {
  const known = pointsMade.get(line)
  if (known) return known
  const made = line.map(({ x, z }): Point => [x, z])
  pointsMade.set(line, made)
  keysOfPoints.set(
    made,
    line.map(({ key }) => key),
  )
  return made
}
/** The keys that go with a list of positions made by `pointsOf`. */
export const keysOf = (points: readonly Point[]): VertexKey[] => keysOfPoints.get(points) ?? []

/** Brings the base below the ground wherever it pierces it. Both stay as they are when it does not. */
export function keepCover(ground: Vertex[], base: Vertex[], say: Say): { ground: Vertex[]; base: Vertex[] } {
  const above = aboveAt(pointsOf(base), pointsOf(ground))
  if (!above) return { ground, base }
  say(
    'base',
    `The base rises above the ground near x = ${said(above.at)} m; it is taken to lie just below. Lower it or raise the ground.`,
    { x: above.at, z: lineAt(pointsOf(ground), above.at), ...(above.to > above.at ? { to: above.to } : {}) },
  )
  const lowered = base.map((vertex) => ({ ...vertex }))
  const surface = pointsOf(ground)
  for (const vertex of lowered) vertex.z = Math.min(vertex.z, lineAt(surface, vertex.x) - COVER)
  // A hollow of the ground between two vertices of the base: both ends of that stretch go down.
  let i = 0
  for (const { x, z } of ground) {
    while (i + 2 < lowered.length && (lowered[i + 1]?.x ?? x) < x) i++
    const [a, b] = [lowered[i], lowered[i + 1]]
    if (!a || !b || x < a.x || x > b.x) continue
    const excess =
      lineAt(
        [
          [a.x, a.z],
          [b.x, b.z],
        ],
        x,
      ) -
      (z - COVER)
    if (excess > 0) {
      a.z -= excess
      b.z -= excess
    }
  }
  const floor = -LIMITS.coordinate
  if (aboveAt(pointsOf(lowered), surface) === null && lowered.every(({ z }) => z >= floor))
    return { ground, base: lowered }
  // Only for what nobody draws: ground at the very limit of heights.
  const raised = ground.map((vertex) => ({ ...vertex, z: Math.max(vertex.z, floor + 1) }))
  const lowest = Math.min(...raised.map(({ z }) => z)) - COVER
  return { ground: raised, base: base.map((vertex) => ({ ...vertex, z: lowest })) }
}

/** An outline in its order; crossed ones are untangled; null when it encloses nothing. */
export function readOutline(held: Held, path: string, say: Say): Vertex[] | null {
  return remembered(held, path, say, (told) => makeOutline(held, path, told))
}

function makeOutline(held: Held, path: string, say: Say): Vertex[] | null {
  const found = verticesOf(held, path, say).sort(inOrder)
  const outline: Vertex[] = found.slice(0, LIMITS.outline).map(({ key, x, z }) => ({ key, x, z }))
  const first = outline[0]
  const place = first && { x: first.x, z: first.z }
  if (found.length > LIMITS.outline)
    say(path, `The outline has more than ${said(LIMITS.outline)} vertices; the rest is left out.`, place)
  if (outline.length < 3) {
    say(path, 'This body has fewer than three vertices left, so it is left out. Draw it anew or remove it.', place)
    return null
  }
  const crossing = crossingOf(pointsOf(outline))
  const turned = crossing ? roundMiddle(outline) : outline
  if ((crossing && crossingOf(pointsOf(turned))) || Math.abs(areaOf(pointsOf(turned))) < LIMITS.area) {
    say(path, 'This outline encloses no area, so the body is left out. Move its vertices apart, or undo.', place)
    return null
  }
  if (crossing)
    say(
      path,
      `The outline crosses or touches itself near x = ${said(Math.round(crossing.at[0] * 100) / 100)} m; its vertices are taken in turn round its middle until it is untangled.`,
      { x: crossing.at[0], z: crossing.at[1] },
    )
  return notClosed(turned)
}

/** The vertices by their direction from the middle: always an outline that does not cross itself, unless some line up. */
function roundMiddle(outline: Vertex[]): Vertex[] {
  const x = outline.reduce((sum, one) => sum + one.x, 0) / outline.length
  const z = outline.reduce((sum, one) => sum + one.z, 0) / outline.length
  return outline
    .map((vertex) => ({
      vertex,
      angle: Math.atan2(vertex.z - z, vertex.x - x),
      far: Math.hypot(vertex.x - x, vertex.z - z),
    }))
    .sort((a, b) => a.angle - b.angle || a.far - b.far || (a.vertex.key < b.vertex.key ? -1 : 1))
    .map(({ vertex }) => vertex)
}

/** The format takes a last vertex on the first for the closing of the outline; where two really stand together, begin elsewhere. */
function notClosed(outline: Vertex[]): Vertex[] {
  for (let turns = 0; turns < outline.length; turns++) {
    const [first, last] = [outline[0], outline.at(-1)]
    if (!first || !last || first.x !== last.x || first.z !== last.z) break
    outline = [last, ...outline.slice(0, -1)]
  }
  return outline
}
