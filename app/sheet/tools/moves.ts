import type { Edit, LineId, LiveSection } from '~/live'
import type { Bank, Section } from '~/section'
import { lineOf, ownerOf, shown, vertexOf } from './paths'
import type { Spot } from './types'

/** Two vertices of a line, or a bank and what stands inside, stay at least this far apart, m. */
export const APART = 0.01

type Range = { min: number; max: number }
const FREE: Range = { min: Number.NEGATIVE_INFINITY, max: Number.POSITIVE_INFINITY }
const meet = (a: Range, b: Range): Range => ({ min: Math.max(a.min, b.min), max: Math.min(a.max, b.max) })
const clamp = (value: number, { min, max }: Range) => (min > max ? 0 : Math.min(max, Math.max(min, value)))

const side = (path: string): 'left' | 'right' | null =>
  path === 'left' || path.startsWith('left.') ? 'left' : path === 'right' || path.startsWith('right.') ? 'right' : null

/** How far along x this thing may shift, so that lines stay in order and everything stays between the banks. */
function room(path: string, live: LiveSection, section: Section, moving: ReadonlySet<string>): Range {
  const vertex = vertexOf(path)
  const inside = (x: number): Range => ({ min: section.left.x + APART - x, max: section.right.x - APART - x })
  if (vertex) {
    const { points, keys, closed } = lineOf(live, vertex.line)
    const at = keys.indexOf(vertex.key)
    const x = points[at]?.[0]
    if (x === undefined || closed) return FREE
    // The ends of ground and base stand at the banks and go with them.
    if (at === 0 || at === points.length - 1) return { min: 0, max: 0 }
    const before = moving.has(`${vertex.line}.v:${keys[at - 1]}`) ? undefined : points[at - 1]?.[0]
    const after = moving.has(`${vertex.line}.v:${keys[at + 1]}`) ? undefined : points[at + 1]?.[0]
    return {
      min: before === undefined ? FREE.min : before + APART - x,
      max: after === undefined ? FREE.max : after - APART - x,
    }
  }
  if (path === 'ground' || path === 'base') return { min: 0, max: 0 }
  const which = side(path)
  if (which) return bankRoom(which, section)
  const [list, id, field] = path.split('.')
  if (list === 'recharge' || list === 'limits') {
    const span = section[list].find((one) => one.id === id)
    if (!span) return FREE
    if (field === 'from') return { min: FREE.min, max: span.to - APART - span.from }
    if (field === 'to') return { min: span.from + APART - span.to, max: FREE.max }
    return FREE
  }
  if (list === 'features') {
    const feature = section.features.find((one) => one.id === id)
    return feature ? inside(feature.x) : FREE
  }
  if (list === 'observations') {
    const observation = section.observations.find((one) => one.id === id)
    return observation ? inside(observation.x) : FREE
  }
  return FREE
}

/** A bank may go as far as the next vertex of ground or base and the nearest feature. */
function bankRoom(which: 'left' | 'right', section: Section): Range {
  const bank = section[which]
  const others = [
    ...section.ground.map(([x]) => x),
    ...section.base.map(([x]) => x),
    ...section.features.map(({ x }) => x),
    which === 'left' ? section.right.x : section.left.x,
  ]
  return which === 'left'
    ? { min: FREE.min, max: Math.min(...others.filter((x) => x > bank.x)) - APART - bank.x }
    : { min: Math.max(...others.filter((x) => x < bank.x)) + APART - bank.x, max: FREE.max }
}

/** Shift of a vertex and of everything else picked, `along` and `up` by one common step that all of them can take. */
export function moveEdits(paths: string[], live: LiveSection, caseId: string | null, by: Spot): Edit[] {
  const section = shown(live, caseId)
  const moving = new Set(paths)
  // A body picked as a whole carries its vertices; the same vertex twice would move twice.
  const list = paths.filter((path) => !vertexOf(path) || !moving.has(ownerOf(path)))
  const dx = clamp(
    by.x,
    list.reduce((range, path) => meet(range, room(path, live, section, moving)), FREE),
  )
  return list.flatMap((path) => move(path, live, section, dx, by.z))
}

function move(path: string, live: LiveSection, section: Section, dx: number, dz: number): Edit[] {
  const vertex = vertexOf(path)
  if (vertex) return shiftVertices(live, vertex.line, dx, dz, vertex.key)
  if (path === 'ground' || path === 'base') return shiftVertices(live, path, 0, dz)
  const which = side(path)
  if (which) return moveBank(path, which, live, section, dx, dz)
  const [list, id = '', field] = path.split('.')
  switch (list) {
    case 'bodies':
      return shiftVertices(live, `bodies.${id}`, dx, dz)
    case 'recharge': {
      const zone = section.recharge.find((one) => one.id === id)
      return zone ? span(`recharge.${id}`, zone, field, dx) : []
    }
    case 'limits': {
      const limit = section.limits.find((one) => one.id === id)
      if (!limit) return []
      return [
        ...span(`limits.${id}`, limit, field, dx),
        ...(field === undefined || field === 'level' ? set(`limits.${id}.level`, limit.level, dz) : []),
      ]
    }
    case 'features': {
      const feature = section.features.find((one) => one.id === id)
      if (!feature) return []
      return [
        ...(field === undefined || field === 'x' ? set(`features.${id}.x`, feature.x, dx) : []),
        ...('level' in feature && (field === undefined || field === 'level')
          ? set(`features.${id}.level`, feature.level, dz)
          : []),
      ]
    }
    case 'observations': {
      const observation = section.observations.find((one) => one.id === id)
      if (!observation) return []
      return [
        ...set(`observations.${id}.x`, observation.x, dx),
        ...set(`observations.${id}.head`, observation.head, dz),
      ]
    }
    case 'marks': {
      const mark = live.markup.marks.find((one) => one.id === id)
      if (!mark) return []
      const points = mark.points.map(([x, z, pressure]): [number, number, number?] =>
        pressure === undefined ? [neat(x + dx), neat(z + dz)] : [neat(x + dx), neat(z + dz), pressure],
      )
      return [{ do: 'set-mark', id, change: { points } }]
    }
    default:
      return []
  }
}

/** Sums of decimals leave dust (0.1 + 0.2); a tenth of a millimetre is finer than any survey. */
export const neat = (value: number) => Math.round(value * 1e4) / 1e4

const set = (path: string, value: number, by: number): Edit[] =>
  by === 0 ? [] : [{ do: 'set', path, value: neat(value + by) }]

const span = (
  path: string,
  { from, to }: { from: number; to: number },
  field: string | undefined,
  dx: number,
): Edit[] => [
  ...(field === undefined || field === 'from' ? set(`${path}.from`, from, dx) : []),
  ...(field === undefined || field === 'to' ? set(`${path}.to`, to, dx) : []),
]

function shiftVertices(live: LiveSection, line: LineId, dx: number, dz: number, only?: string): Edit[] {
  const { points, keys } = lineOf(live, line)
  return points.flatMap(([x, z], at): Edit[] => {
    const key = keys[at]
    if (key === undefined || (only !== undefined && key !== only)) return []
    return [{ do: 'move-vertex', line, key, to: [neat(x + dx), neat(z + dz)] }]
  })
}

/** A bank takes the ends of ground and base along; its stage moves only where there is water. */
function moveBank(path: string, which: 'left' | 'right', live: LiveSection, section: Section, dx: number, dz: number) {
  const bank: Bank = section[which]
  const field = path.split('.')[1]
  const edits: Edit[] = []
  if (dx !== 0 && (field === undefined || field === 'x')) {
    edits.push({ do: 'set', path: `${which}.x`, value: neat(bank.x + dx) })
    for (const line of ['ground', 'base'] as const) edits.push(...endWithBank(live, line, which, bank.x + dx))
  }
  if (dz !== 0 && bank.kind === 'water' && (field === undefined || field === 'stage'))
    edits.push({ do: 'set', path: `${which}.stage`, value: neat(bank.stage + dz) })
  return edits
}

/** Move the end vertex of ground or base to the bank's new place. */
export function endWithBank(live: LiveSection, line: 'ground' | 'base', which: 'left' | 'right', x: number): Edit[] {
  const { points, keys } = lineOf(live, line)
  const at = which === 'left' ? 0 : points.length - 1
  const point = points[at]
  const key = keys[at]
  return point && key !== undefined ? [{ do: 'move-vertex', line, key, to: [neat(x), point[1]] }] : []
}

/** The spot of a thing that snaps while it is dragged: its vertex, its place at its level. null: only the pointer counts. */
export function anchorOf(path: string, live: LiveSection, caseId: string | null): Spot | null {
  const section = shown(live, caseId)
  const vertex = vertexOf(path)
  if (vertex) {
    const { points, keys } = lineOf(live, vertex.line)
    const point = points[keys.indexOf(vertex.key)]
    return point ? { x: point[0], z: point[1] } : null
  }
  const which = side(path)
  if (which) {
    const bank = section[which]
    return { x: bank.x, z: bank.kind === 'water' ? bank.stage : (section.ground[0]?.[1] ?? 0) }
  }
  const [list, id, field] = path.split('.')
  if (list === 'features') {
    const feature = section.features.find((one) => one.id === id)
    return feature ? { x: feature.x, z: 'level' in feature ? feature.level : Number.NaN } : null
  }
  if (list === 'observations') {
    const observation = section.observations.find((one) => one.id === id)
    return observation ? { x: observation.x, z: observation.head } : null
  }
  if (list === 'recharge' || list === 'limits') {
    const one = section[list].find((each) => each.id === id)
    if (!one) return null
    return { x: field === 'to' ? one.to : one.from, z: 'level' in one ? one.level : Number.NaN }
  }
  return null
}
