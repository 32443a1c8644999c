import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { startingDrawing } from '~/section'
import { applyEdits, createLive, editsBetween, LOCAL, liveOf, readLive, writeEdits } from './index'
import { anyDrawing, editFrom, seed } from './testing'

const drawn = fc
  .tuple(anyDrawing, fc.array(seed, { maxLength: 10 }))
  .map(([section, seeds]) => seeds.reduce((live, one) => applyEdits(live, [editFrom(one, live)]), liveOf(section)))

describe('the edits between two sections', () => {
  it('turn the one into the other', () => {
    fc.assert(
      fc.property(drawn, drawn, (live, { section: target }) => {
        const next = applyEdits(live, editsBetween(live, target))
        expect(next.section).toEqual(target)
        expect(next.markup).toEqual(live.markup)
      }),
      { numRuns: 150 },
    )
  }, 60_000)

  it('are none between equal ones and few between near ones', () => {
    const live = liveOf(startingDrawing('valley-side'))
    expect(editsBetween(live, startingDrawing('valley-side'))).toEqual([])
    const target = startingDrawing('valley-side')
    target.ground.splice(2, 0, [100, 39.5])
    if (target.right.kind === 'water') target.right.stage = 26.5
    target.cases[0] = { id: 'thaw', name: 'Thaw', off: ['b2'], set: {} }
    const edits = editsBetween(live, target)
    expect(edits.map((edit) => edit.do)).toEqual([
      'set-bank',
      'insert-vertex',
      'case-set',
      'case-set',
      'case-set',
      'case-off',
    ])
  })

  it('restore a version beside what somebody else goes on drawing', () => {
    const doc = createLive(startingDrawing('two-ditches'))
    const old = readLive(doc)
    writeEdits(
      doc,
      [
        { do: 'set', path: 'left.stage', value: 1.9 },
        { do: 'remove', list: 'bodies', id: 'topsoil' },
      ],
      LOCAL,
    )
    const edits = editsBetween(readLive(doc), old.section)
    writeEdits(doc, [{ do: 'set', path: 'title', value: 'Renamed meanwhile' }], 'somebody')
    writeEdits(doc, edits, LOCAL)
    expect(readLive(doc).section).toEqual({ ...old.section, title: 'Renamed meanwhile' })
  })
})
