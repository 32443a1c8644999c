import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import * as Y from 'yjs'
import { parseSection, STARTING_DRAWINGS, startingDrawing } from '~/section'
import { solveSteady } from '~/solver'
import { drawable } from '~/solver/testing/arbitrary'
import { applyEdits, createLive, type Edit, LOCAL, liveOf, readLive, writeEdits, writeSection } from './index'
import { anyDrawing, editFrom, seed } from './testing'

const copyOf = (doc: Y.Doc) => {
  const copy = new Y.Doc()
  Y.applyUpdate(copy, Y.encodeStateAsUpdate(doc))
  return copy
}
const sound = (doc: Y.Doc) => {
  const live = readLive(doc)
  const parsed = parseSection(JSON.parse(JSON.stringify(live.section)))
  expect(parsed).toEqual({ ok: true, section: live.section })
  expect(live.keys.ground).toHaveLength(live.section.ground.length)
  expect(live.keys.base).toHaveLength(live.section.base.length)
  expect(Object.keys(live.keys.bodies).sort()).toEqual(live.section.bodies.map(({ id }) => id).sort())
  for (const { id, outline } of live.section.bodies) expect(live.keys.bodies[id]).toHaveLength(outline.length)
  return live
}

describe('a first state', () => {
  it.each(STARTING_DRAWINGS.map(({ name }) => name))('is read back as it was written: %s', (name) => {
    const section = startingDrawing(name)
    const doc = createLive(section)
    expect(readLive(doc)).toEqual({ ...liveOf(section), problems: [] })
    expect(readLive(doc).section).toEqual(section)
    expect(readLive(copyOf(doc)).section).toEqual(section)
  })

  it('is the same bytes for the same section, and never written twice', () => {
    const section = startingDrawing('valley-side')
    const [a, b] = [createLive(section), createLive(section)]
    expect(Y.encodeStateAsUpdate(a)).toEqual(Y.encodeStateAsUpdate(b))
    expect(() => writeSection(a, section)).toThrow(/already/)
    Y.applyUpdate(a, Y.encodeStateAsUpdate(b))
    expect(readLive(a).section).toEqual(section)
  })

  it('of any section the solver is tried on is read back as it was written', () => {
    fc.assert(
      fc.property(drawable, (drawn) => {
        const parsed = parseSection(JSON.parse(JSON.stringify(drawn)))
        if (!parsed.ok) throw new Error(JSON.stringify(parsed.errors))
        const live = readLive(createLive(parsed.section))
        expect(live.section).toEqual(parsed.section)
        expect(live.problems).toEqual([])
      }),
      { numRuns: 150 },
    )
  }, 30_000)

  it('of nothing reads as an empty strip that says so', () => {
    const live = sound(new Y.Doc())
    expect(live.problems).toHaveLength(1)
  })
})

describe('edits', () => {
  it('tried on a reading give what writing them gives, whatever they are and whatever stands there', () => {
    fc.assert(
      fc.property(anyDrawing, fc.array(fc.array(seed, { maxLength: 6 }), { maxLength: 8 }), (section, batches) => {
        const doc = createLive(section)
        for (const batch of batches) {
          const before = readLive(doc)
          const shown = JSON.stringify(before)
          const edits = batch.map((one) => editFrom(one, before))
          const tried = applyEdits(before, edits)
          expect(JSON.stringify(before)).toBe(shown)
          writeEdits(doc, edits, LOCAL)
          expect(readLive(doc)).toEqual(tried)
          sound(doc)
        }
      }),
      { numRuns: 150 },
    )
  }, 60_000)

  it('made apart and delivered in any order leave every replica with one sound section', () => {
    const step = fc.record({
      who: fc.nat({ max: 2 }),
      seeds: fc.array(seed, { minLength: 1, maxLength: 3 }),
      meet: fc.nat({ max: 9 }),
    })
    fc.assert(
      fc.property(
        anyDrawing,
        fc.array(step, { maxLength: 14 }),
        fc.array(fc.nat(), { maxLength: 60 }),
        (section, steps, dice) => {
          const first = createLive(section)
          const docs = [0, 1, 2].map((i) => {
            const doc = copyOf(first)
            doc.clientID = 100 + i
            return doc
          })
          const updates: Uint8Array[] = []
          for (const doc of docs)
            doc.on('update', (update: Uint8Array, origin: unknown) => origin === LOCAL && updates.push(update))
          let die = 0
          const roll = (n: number) => (dice[die++ % Math.max(1, dice.length)] ?? 0) % n
          for (const { who, seeds, meet } of steps) {
            const doc = docs[who]
            if (!doc) continue
            const live = readLive(doc)
            writeEdits(
              doc,
              seeds.map((one) => editFrom(one, live)),
              LOCAL,
            )
            // Now and then one of them hears some of what the others did, out of order.
            const hearer = docs[meet]
            const heard = updates[roll(Math.max(1, updates.length))]
            if (hearer && heard) Y.applyUpdate(hearer, heard)
          }
          for (const doc of docs) {
            const rest = [...updates]
            while (rest.length > 0) for (const update of rest.splice(roll(rest.length), 1)) Y.applyUpdate(doc, update)
          }
          const [a, b, c] = docs.map((doc) => sound(doc))
          expect(JSON.stringify(b)).toBe(JSON.stringify(a))
          expect(JSON.stringify(c)).toBe(JSON.stringify(a))
        },
      ),
      { numRuns: 150 },
    )
  }, 60_000)

  it('never make a section, or a case of it, that the solver trips over', () => {
    fc.assert(
      fc.property(anyDrawing, fc.array(seed, { maxLength: 12 }), (section, seeds) => {
        const { section: drawn } = seeds.reduce((live, one) => applyEdits(live, [editFrom(one, live)]), liveOf(section))
        for (const caseId of [null, ...drawn.cases.map(({ id }) => id)]) {
          const solution = solveSteady(drawn, { caseId })
          if (solution.status === 'solved') expect(solution.profile.head.every(Number.isFinite)).toBe(true)
          else expect(solution.reason.length).toBeGreaterThan(0)
        }
      }),
      { numRuns: 60 },
    )
  }, 60_000)

  it('keep the identity of what they do not touch, and of everything when they change nothing', () => {
    const doc = createLive(startingDrawing('lake-and-sea'))
    const live = readLive(doc)
    expect(readLive(doc)).toBe(live)
    const next = applyEdits(live, [{ do: 'set', path: 'left.stage', value: 1.9 }])
    expect(next.section.ground).toBe(live.section.ground)
    expect(next.section.bodies).toBe(live.section.bodies)
    expect(next.section.left).not.toBe(live.section.left)
    expect(applyEdits(live, [{ do: 'remove', list: 'features', id: 'none' }])).toBe(live)
  })

  it('write nothing when nothing changes, and one update when something does', () => {
    const doc = createLive(startingDrawing('two-ditches'))
    const sent: unknown[] = []
    doc.on('update', (update) => sent.push(update))
    const { keys, section } = readLive(doc)
    const still: Edit[] = [
      { do: 'set', path: 'left.stage', value: 2.35 },
      { do: 'move-vertex', line: 'ground', key: keys.ground[1] ?? '', to: section.ground[1] ?? [0, 0] },
      { do: 'set', path: 'features.gone.x', value: 3 },
      { do: 'set', path: 'left.stage', value: Number.NaN },
    ]
    writeEdits(doc, still, LOCAL)
    expect(sent).toHaveLength(0)
    writeEdits(
      doc,
      [...still, { do: 'set', path: 'left.stage', value: 2.4 }, { do: 'source', path: 'base', text: 'log' }],
      LOCAL,
    )
    expect(sent).toHaveLength(1)
  })
})
