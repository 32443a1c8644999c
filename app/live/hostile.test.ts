import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import * as Y from 'yjs'
import { parseSection, startingDrawing } from '~/section'
import { applyEdits, createLive, gestureEdits, LOCAL, readLive, readPresence, upgradeDoc, writeEdits } from './index'
import { ROOTS } from './shape'
import { anyDrawing, editFrom, seed } from './testing'

/** Anything that can be put into a Y.Map, shared types among it. */
const junk = fc.oneof(
  fc.constantFrom<unknown>(null, undefined, true, '', 'water', 'sand', 1e9, -1e12, Number.NaN, Infinity, 0, -0),
  fc.double(),
  fc.string({ maxLength: 5 }),
  fc.constantFrom<unknown>({ x: 5, z: 5 }, { x: 5, z: 5, o: 7 }, { x: '5', z: null }, [], [1, 2], { toString: 1 }),
  fc.record({
    x: fc.integer({ min: -50, max: 400 }),
    z: fc.integer({ min: -30, max: 60 }),
    o: fc.constantFrom('', 'V', '0', 'zz', 3),
  }),
)
const key = fc.oneof(
  fc.constantFrom(
    'x',
    'kind',
    'stage',
    'order',
    'outline',
    'off',
    'set',
    'from',
    'to',
    'k',
    'version',
    'host',
    'title',
  ),
  fc.constantFrom('v1', 'v2', '~left', 'sand', 'tile', 'topsoil', 'thaw', '__proto__', 'constructor', 'a.b', ''),
  fc.string({ maxLength: 4 }),
)
const shared = fc.constantFrom('map', 'array', 'text', 'delete', 'deep')
const stroke = fc.record({
  root: fc.constantFrom(...ROOTS),
  path: fc.array(key, { minLength: 1, maxLength: 3 }),
  junk,
  shared: fc.option(shared),
})

// Y.Map takes no object without a prototype, which is how fast-check makes some of its records.
const plain = (value: unknown) =>
  typeof value === 'object' && value !== null && !Array.isArray(value) ? { ...value } : value

function scribble(doc: Y.Doc, strokes: { root: string; path: string[]; junk: unknown; shared: string | null }[]) {
  for (const { root, path, junk: value, shared: what } of strokes) {
    let map = doc.getMap<unknown>(root)
    for (const step of path.slice(0, -1)) {
      const inner = map.get(step)
      if (inner instanceof Y.Map) map = inner
    }
    const last = path.at(-1) ?? 'x'
    if (what === 'delete') map.delete(last)
    else if (what === 'map') map.set(last, new Y.Map())
    else if (what === 'array') map.set(last, new Y.Array())
    else if (what === 'text') map.set(last, new Y.Text('text'))
    else if (what === 'deep') {
      const one = new Y.Map<unknown>()
      map.set(last, one)
      for (const name of ['order', 'x', 'kind', 'outline', 'set'])
        one.set(name, name === 'outline' ? new Y.Map() : plain(value))
    } else map.set(last, plain(value))
  }
}

describe('a document that somebody has spoilt', () => {
  it('still reads as a section that passes, with problems, and takes edits alike', () => {
    fc.assert(
      fc.property(
        anyDrawing,
        fc.boolean(),
        fc.array(stroke, { maxLength: 25 }),
        fc.array(seed, { maxLength: 5 }),
        (section, blank, strokes, seeds) => {
          const doc = blank ? new Y.Doc() : createLive(section)
          scribble(doc, strokes)
          const live = readLive(doc)
          expect(parseSection(live.section)).toEqual({ ok: true, section: live.section })
          const edits = seeds.map((one) => editFrom(one, live))
          const tried = applyEdits(live, edits)
          writeEdits(doc, edits, LOCAL)
          expect(readLive(doc)).toEqual(tried)
          expect(parseSection(tried.section).ok).toBe(true)
          const copy = new Y.Doc()
          Y.applyUpdate(copy, Y.encodeStateAsUpdate(doc))
          expect(JSON.stringify(readLive(copy))).toBe(JSON.stringify(tried))
        },
      ),
      { numRuns: 400 },
    )
  }, 60_000)

  it('with roots of other types than the shape’s reads too', () => {
    const doc = new Y.Doc()
    doc.getText('ground').insert(0, 'ground')
    doc.getArray('materials').insert(0, [1, 2])
    doc.getMap('left').set('x', 0)
    const live = readLive(doc)
    expect(parseSection(live.section).ok).toBe(true)
    writeEdits(doc, [{ do: 'move-vertex', line: 'ground', key: '~left', to: [0, 3] }], LOCAL)
  })

  it('names the place of what contradicts itself', () => {
    const problemOf = (...edits: Parameters<typeof writeEdits>[1]) => {
      const doc = createLive(startingDrawing('valley-side'))
      writeEdits(doc, edits, LOCAL)
      return readLive(doc)
    }
    const drain = (id: string) =>
      ({ do: 'add', list: 'features', object: { id, kind: 'drain', x: 100, level: 30, conductance: null } }) as const
    const twice = problemOf(drain('a'), drain('b'))
    expect(twice.section.features.map(({ x }) => x)).toEqual([100, 100.01])
    expect(twice.problems).toMatchObject([{ path: 'features.b.x', place: { x: 100.01, z: 30 } }])

    const high = problemOf({ do: 'set', path: 'right.stage', value: 30 })
    expect(high.section.right).toMatchObject({ stage: 27.4 })
    expect(high.problems).toMatchObject([{ path: 'right.stage', place: { x: 320, z: 30 } }])

    const lens = readLive(createLive(startingDrawing('valley-side'))).keys.bodies.lens ?? []
    const crossed = problemOf({ do: 'move-vertex', line: 'bodies.lens', key: lens[0] ?? '', to: [260, 27] })
    expect(crossed.problems).toMatchObject([{ path: 'bodies.lens.outline' }])
    expect(crossed.keys.bodies.lens).toHaveLength(5)

    const pierced = problemOf({ do: 'move-vertex', line: 'base', key: 'v2', to: [110, 60] })
    expect(pierced.problems).toMatchObject([{ path: 'base', place: { x: 110 } }])
    expect(pierced.section.base[1]?.[1]).toBeLessThan(39)

    const passed = problemOf({ do: 'set', path: 'right.x', value: -10 })
    expect([passed.section.left.x, passed.section.right.x]).toEqual([-10, 0])
    expect(passed.problems[0]).toMatchObject({ path: 'right.x', place: { x: -10 } })

    const lost = problemOf({ do: 'remove', list: 'materials', id: 'silt' })
    expect(lost.section.bodies[0]?.material).toBe('gravel')
    expect(lost.problems).toMatchObject([{ path: 'bodies.lens.material', place: { x: 150, z: 25.6 } }])

    const both = problemOf({ do: 'set', path: 'right.x', value: 200 })
    expect(both.section.ground.at(-1)?.[0]).toBe(200)
    expect(both.section.recharge.at(-1)?.to).toBe(200)

    const inCase = problemOf({ do: 'case-set', case: 'thaw', path: 'right.stage', value: 99 })
    expect(inCase.section.cases[0]?.set['right.stage']).toBe(27.4)
    expect(inCase.problems).toMatchObject([{ path: 'cases.thaw.set.right.stage' }])
  })

  it('keeps what goes out of sight: back comes the thing, back come its values', () => {
    const doc = createLive(startingDrawing('two-ditches'))
    const before = readLive(doc)
    const undo = new Y.UndoManager(doc, { trackedOrigins: new Set([LOCAL]), captureTimeout: 0 })
    writeEdits(doc, [{ do: 'remove', list: 'features', id: 'tile' }], LOCAL)
    expect(readLive(doc).section.cases[0]?.off).toEqual([])
    expect(readLive(doc).problems).toEqual([])
    undo.undo()
    expect(readLive(doc)).toEqual(before)
  })

  it('of a newer shape says so, and is not brought down', () => {
    const doc = createLive(startingDrawing('empty'))
    expect(upgradeDoc(doc)).toBe(false)
    doc.getMap('doc').set('version', 7)
    expect(readLive(doc).problems[0]?.message).toMatch(/another version/)
    expect(() => upgradeDoc(doc)).toThrow(RangeError)
  })
})

describe('presence', () => {
  const who = { id: 'u1', name: 'Ada', ink: 2, kind: 'person' }

  it('keeps what can be read and leaves out the rest', () => {
    const read = readPresence({
      who: { ...who, admin: true },
      pointer: { x: 1, z: Number.NaN, panel: 'section' },
      picked: ['left', 'features.d1'],
      tool: 'x'.repeat(1000),
      gesture: { id: 'g', edits: [{ do: 'set', path: 'left.stage', value: 4 }] },
      view: { x0: 5, x1: 1, z0: 0, z1: 1 },
      evil: true,
    })
    expect(read).toEqual({
      who,
      picked: ['left', 'features.d1'],
      gesture: { id: 'g', edits: [{ do: 'set', path: 'left.stage', value: 4 }] },
    })
    expect(readPresence({ pointer: null })).toBeNull()
    expect(readPresence(null)).toBeNull()
    const pointer = { x: 1, z: 2, panel: 'section' }
    expect(readPresence({ who: { ...who, kind: 'link' }, pointer, picked: ['left'] })).toEqual({
      who: { ...who, kind: 'link' },
      pointer,
    })
  })

  it('of any kind never throws, and its gestures may be applied', () => {
    const live = readLive(createLive(startingDrawing('lake-and-sea')))
    fc.assert(
      fc.property(
        fc.anything(),
        fc.array(fc.anything()),
        fc.constantFrom('set', 'add', 'set-bank', 'move-vertex', 'add-mark'),
        (state, edits, act) => {
          readPresence(state)
          const shaped = edits.map((one) => ({
            do: act,
            path: one,
            value: one,
            list: 'cases',
            object: one,
            line: 'base',
            key: one,
            to: one,
            mark: one,
            side: 'left',
            bank: one,
          }))
          const peer = readPresence({ who, gesture: { id: 'g', edits: [...edits, ...shaped] } })
          const next = applyEdits(live, gestureEdits(peer ? [{ ...peer, clientId: 1 }] : []))
          expect(parseSection(next.section).ok).toBe(true)
        },
      ),
      { numRuns: 300 },
    )
  }, 30_000)
})
