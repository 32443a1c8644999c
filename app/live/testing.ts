import fc from 'fast-check'
import { type Section, STARTING_DRAWINGS, startingDrawing } from '~/section'
import { liveOf } from './read'
import type { Edit, LiveSection } from './types'

export const anyDrawing: fc.Arbitrary<Section> = fc
  .constantFrom(...STARTING_DRAWINGS.map(({ name }) => name))
  .map((name) => startingDrawing(name))

/** Numbers a person might type, and now and then one that nobody should. */
const number = fc.oneof(
  { weight: 8, arbitrary: fc.integer({ min: -200, max: 7000 }).map((n) => n / 10) },
  { weight: 1, arbitrary: fc.constantFrom(0, -0, 1e7, -1e9, 1e-12, Number.NaN, Number.POSITIVE_INFINITY) },
)
const small = fc.oneof(
  fc.integer({ min: 1, max: 400 }).map((n) => n / 20),
  number,
)
const text = fc.oneof(
  fc.constantFrom('Mill lane', '', 'ö\u0000', '\ud800', 'x'.repeat(300)),
  fc.string({ unit: 'binary', maxLength: 12 }),
)
const value = fc.oneof(
  { weight: 6, arbitrary: number },
  { weight: 2, arbitrary: small },
  fc.constantFrom<unknown>(null, undefined, true, 'silt', 'sand', {}, []),
  text,
)
const LISTS = ['materials', 'bodies', 'recharge', 'features', 'observations', 'limits', 'cases'] as const
const NEW_IDS = ['n1', 'n2', 'n3', '__proto__', 'a.b', 'constructor']

const FIELDS = {
  materials: ['k', 'anisotropy', 'porosity', 'specificYield'],
  bodies: ['material', 'outline'],
  recharge: ['from', 'to', 'rate'],
  features: ['x', 'level', 'conductance', 'rate', 'thickness', 'k', 'kind'],
  observations: ['x', 'head', 'sd', 'date'],
  limits: ['from', 'to', 'level', 'clearance'],
  cases: ['off', 'set'],
} as const

const pick = fc.nat({ max: 999 })
const at = <T>(list: readonly T[], n: number): T | undefined => (list.length ? list[n % list.length] : undefined)

/** Plain data from which an edit can be made that fits whatever section stands there when it is made. */
export type Seed = { kind: number; a: number; b: number; c: number; x: number; z: number; value: unknown }
export const seed: fc.Arbitrary<Seed> = fc.record({
  kind: fc.noBias(fc.nat({ max: 18 })),
  a: fc.noBias(pick),
  b: fc.noBias(pick),
  c: fc.noBias(pick),
  x: number,
  z: small,
  value,
})

const newId = (n: number) => at(NEW_IDS, n) ?? 'n1'

function newObject(list: (typeof LISTS)[number], id: string, { a, x, z }: Seed): unknown {
  switch (list) {
    case 'materials':
      return { id, k: Math.abs(z) + 0.01, name: 'New' }
    case 'bodies':
      return {
        id,
        material: a % 3 ? 'sand' : 'gone',
        outline: [
          [x, z],
          [x + 20, z],
          [x + 20, z + 3],
          [x, z + (a % 4 ? 3 : -3)],
        ],
      }
    case 'recharge':
      return { id, from: x, to: x + z * 10, rate: 0.001 }
    case 'features':
      return a % 2
        ? { id, kind: 'drain', x, level: z, conductance: null }
        : { id, kind: 'wall', x, thickness: 0.5, k: 0.01 }
    case 'observations':
      return { id, x, head: z, date: a % 2 ? '2026-02-03' : 'soon' }
    case 'limits':
      return { id, from: x, to: x + 10, level: z, clearance: 0.5 }
    case 'cases':
      return { id, off: ['tile', 'nothing'], set: { 'left.stage': z, 'no.where.x': 1 } }
  }
}

/** An edit for this section, sound or not; typed loosely because it may come from a hostile screen. */
export function editFrom(s: Seed, live: LiveSection): Edit {
  const { section, keys } = live
  const list = LISTS[s.a % LISTS.length] ?? 'features'
  const id = at<{ id: string }>(section[list], s.b)?.id ?? 'n1'
  const lines = ['ground', 'base', ...section.bodies.map((body) => `bodies.${body.id}`), 'bodies.gone']
  const line = at(lines, s.a) ?? 'ground'
  const lineKeys = line === 'ground' || line === 'base' ? keys[line] : (keys.bodies[line.slice(7)] ?? [])
  const key = at(lineKeys, s.b) ?? 'v1'
  const field = at(FIELDS[list], s.c) ?? 'x'
  const paths = [
    'left.stage',
    'right.stage',
    'left.bed',
    'right.conductance',
    'left.x',
    'right.x',
    'left.rate',
    'title',
    'host',
    'surfaceSeepage',
    'left.kind',
    'left.name',
    'nowhere',
    `${list}.${id}.${field}`,
    `${list}.${id}.name`,
    `features.${at(section.features, s.b)?.id ?? 'tile'}.x`,
    `recharge.${at(section.recharge, s.b)?.id ?? 'field'}.to`,
  ]
  const path = at(paths, s.c) ?? 'title'
  const bank =
    s.b % 3 === 0
      ? { kind: 'no-flow', x: section.left.x }
      : s.b % 3 === 1
        ? { kind: 'water', x: s.x, stage: s.z, conductance: null, bed: s.a % 2 ? s.x : null }
        : { kind: 'inflow', x: s.x, rate: 0.1, name: 'Hill' }
  const one = at(section.cases, s.b)?.id ?? 'n1'
  const mark = at(live.markup.marks, s.b)?.id ?? 'm1'
  const layer = at(live.markup.layers, s.b)?.id ?? 'l1'
  const edits: unknown[] = [
    { do: 'set', path, value: s.value },
    { do: 'set', path, value: s.x },
    { do: 'set-bank', side: s.a % 2 ? 'left' : 'right', bank },
    { do: 'add', list, object: newObject(list, newId(s.b), s), after: s.c % 2 ? id : undefined },
    { do: 'remove', list, id },
    { do: 'reorder', list, id, after: s.c % 3 ? (at<{ id: string }>(section[list], s.c)?.id ?? null) : null },
    { do: 'move-vertex', line, key, to: [s.x, s.z] },
    { do: 'move-vertex', line, key, to: [s.x, s.z] },
    { do: 'insert-vertex', line, key: `k${s.c % 7}`, at: [s.x, s.z], after: s.c % 3 ? key : null },
    { do: 'remove-vertex', line, key },
    { do: 'source', path, text: s.c % 4 ? 'a note' : null },
    { do: 'case-set', case: one, path, value: s.value },
    { do: 'case-set', case: one, path, value: s.z },
    { do: 'case-off', case: one, id: at([...section.features, ...section.recharge], s.c)?.id ?? 'x', off: s.b % 3 > 0 },
    {
      do: 'add-layer',
      layer: { id: newId(s.b), name: 'Day', date: '2026-05-02', hidden: false, locked: false, order: `${s.c}` },
    },
    {
      do: 'add-mark',
      mark: { id: newId(s.c), layer, kind: 'pen', points: [[s.x, s.z]], ink: 'ink', width: 0.3, order: `${s.a}` },
    },
    { do: 'set-mark', id: mark, change: { text: 'hm', points: [[s.x, s.z, 0.5]], width: s.x } },
    s.b % 2 ? { do: 'remove-mark', id: mark } : { do: 'remove-layer', id: layer },
    s.c % 2 ? { do: 'set-layer', id: layer, change: { hidden: true, date: 'x' } } : { do: 'unheard', of: s.value },
  ]
  return edits[s.kind % edits.length] as Edit
}

export const startOf = (section: Section): LiveSection => liveOf(section)
