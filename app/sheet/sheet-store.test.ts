import { describe, expect, it } from 'vitest'
import type { LiveSection } from '~/live'
import { footingOf } from './compute'
import { openTogether } from './testing'

const pair = () => {
  const [a, b] = openTogether(['Ada', 'Ben'])
  if (!a || !b) throw new Error('two desks')
  return { a, b }
}
const keyOf = (live: LiveSection, i: number) => live.keys.ground[i] ?? ''
const heightOf = (live: LiveSection, i: number) => live.section.ground[i]?.[1]
const stage = (live: LiveSection) => (live.section.left.kind === 'water' ? live.section.left.stage : null)

describe('gestures', () => {
  it('shows every frame to the others by presence and writes one transaction at the end', () => {
    const { a, b } = pair()
    const key = keyOf(a.sheet.stored(), 1)
    const before = b.sheet.get().solution
    a.sheet.gesture.start()
    for (const z of [13.5, 14, 14.5]) {
      a.sheet.gesture.show([{ do: 'move-vertex', line: 'ground', key, to: [50, z] }])
      a.sheet.settle()
      b.sheet.settle()
      expect(heightOf(b.sheet.get().live, 1)).toBe(z)
      expect(heightOf(b.sheet.stored(), 1)).toBe(13)
    }
    expect(a.sent).toHaveLength(0)
    expect(a.sheet.gesture.finish()).toBe(true)
    expect(a.sent).toHaveLength(1)
    b.sheet.settle()
    expect(heightOf(b.sheet.stored(), 1)).toBe(14.5)
    expect(b.sheet.get().live).toEqual(a.sheet.get().live)
    expect(b.presence.gesture ?? null).toBeNull()
    expect(a.presence.gesture).toBeNull()
    expect(b.sheet.get().solution).not.toBe(before)
  })

  it('gives both sheets the same water table while one drags a stage', () => {
    const { a, b } = pair()
    a.sheet.gesture.start()
    a.sheet.gesture.show([{ do: 'set', path: 'left.stage', value: 9.7 }])
    a.sheet.settle()
    b.sheet.settle()
    const [one, other] = [a.sheet.get().solution, b.sheet.get().solution]
    if (one.status !== 'solved' || other.status !== 'solved') throw new Error('solved')
    expect(one.profile.head[0]).toBeCloseTo(9.7, 9)
    expect([...other.profile.head]).toEqual([...one.profile.head])
  })

  it('leaves nothing behind when it is cancelled', () => {
    const { a, b } = pair()
    a.sheet.gesture.start()
    a.sheet.gesture.show([{ do: 'set', path: 'left.stage', value: 11 }])
    a.sheet.settle()
    a.sheet.gesture.cancel()
    a.sheet.settle()
    b.sheet.settle()
    expect(stage(a.sheet.get().live)).toBe(9)
    expect(stage(b.sheet.get().live)).toBe(9)
    expect(a.sent).toHaveLength(0)
    expect(a.sheet.get().canUndo).toBe(false)
  })

  it('vanishes from the others when the connection of the one who drags is lost, and is kept when it returns', () => {
    const { a, b } = pair()
    a.sheet.gesture.start()
    a.sheet.gesture.show([{ do: 'set', path: 'left.stage', value: 11 }])
    b.sheet.settle()
    expect(stage(b.sheet.get().live)).toBe(11)
    a.cut()
    b.sheet.settle()
    expect(stage(b.sheet.get().live)).toBe(9)
    a.sheet.gesture.finish()
    b.sheet.settle()
    expect(stage(b.sheet.get().live)).toBe(9)
    a.join()
    b.sheet.settle()
    expect(stage(b.sheet.get().live)).toBe(11)
  })

  it('carries on from where somebody else has put the thing meanwhile', () => {
    const { a, b } = pair()
    const key = keyOf(a.sheet.stored(), 1)
    a.sheet.gesture.start()
    // A shift of +1, told as a function of what is stored.
    a.sheet.gesture.show((stored) => [
      { do: 'move-vertex', line: 'ground', key, to: [50, (heightOf(stored, 1) ?? 0) + 1] },
    ])
    a.sheet.settle()
    expect(heightOf(a.sheet.get().live, 1)).toBe(14)
    b.sheet.edit([{ do: 'move-vertex', line: 'ground', key, to: [50, 20] }])
    a.sheet.settle()
    expect(heightOf(a.sheet.get().live, 1)).toBe(21)
    a.sheet.gesture.finish()
    b.sheet.settle()
    expect(heightOf(b.sheet.stored(), 1)).toBe(21)
  })

  it('stays shown to the others until the edit is stored, then goes', () => {
    const { a } = pair()
    a.sheet.gesture.start()
    a.sheet.gesture.show([{ do: 'set', path: 'left.stage', value: 11 }])
    a.hear({ kind: 'storing', waiting: 1 })
    a.sheet.gesture.finish()
    expect(a.presence.gesture).not.toBeNull()
    a.hear({ kind: 'stored' })
    expect(a.presence.gesture).toBeNull()
  })
})

describe('listeners', () => {
  it('hear every change, but of a drag only every other frame, and always its end', () => {
    let now = 1000
    const [a] = openTogether(['Ada'], { now: () => now })
    if (!a) throw new Error('a desk')
    const heard = { subscribed: 0, watching: 0 }
    a.sheet.subscribe(() => {
      heard.subscribed += 1
    })
    a.sheet.watch(() => {
      heard.watching += 1
    })
    a.sheet.set({ grid: false })
    a.sheet.set({ grid: true })
    expect(heard).toEqual({ subscribed: 2, watching: 2 })
    a.sheet.gesture.start()
    for (let i = 1; i <= 10; i++) {
      now += 16
      a.sheet.gesture.show([{ do: 'set', path: 'left.stage', value: 9 + i / 20 }])
      a.sheet.settle()
    }
    expect(heard).toEqual({ subscribed: 7, watching: 12 })
    const before = heard.subscribed
    a.sheet.gesture.finish()
    expect(heard.subscribed).toBeGreaterThan(before)
    a.sheet.close()
  })
})

describe('the footing', () => {
  it('follows a drag at a walking pace and is up to date when the drag is over', () => {
    let now = 1000
    const [a] = openTogether(['Ada'], { now: () => now })
    if (!a) throw new Error('a desk')
    const frame = (value: number) => {
      a.sheet.gesture.show([{ do: 'set', path: 'left.stage', value }])
      a.sheet.settle()
      return a.sheet.get().footing
    }
    a.sheet.gesture.start()
    const first = frame(9.1)
    now += 16
    expect(frame(9.9)).toBe(first)
    now += 300
    const second = frame(10)
    expect(second).not.toBe(first)
    now += 16
    expect(frame(10.4)).toBe(second)
    a.sheet.gesture.finish()
    const { live, solution, footing } = a.sheet.get()
    expect(footing).toEqual(footingOf(live.section, null, solution))
    expect(footing).not.toEqual(second)
    a.sheet.close()
  })
})

describe('undo', () => {
  it('takes back only one’s own steps, one gesture at a time, and brings the selection back', () => {
    const { a, b } = pair()
    a.sheet.set({ picked: ['left'] })
    a.sheet.gesture.start()
    a.sheet.gesture.show([{ do: 'set', path: 'left.stage', value: 9.2 }])
    a.sheet.gesture.show([{ do: 'set', path: 'left.stage', value: 9.6 }])
    a.sheet.gesture.finish()
    b.sheet.edit([{ do: 'set', path: 'right.stage', value: 7 }])
    a.sheet.set({ picked: [] })
    a.sheet.undo()
    b.sheet.settle()
    expect(stage(b.sheet.get().live)).toBe(9)
    expect(b.sheet.get().live.section.right).toMatchObject({ stage: 7 })
    expect(a.sheet.get().picked).toEqual(['left'])
    expect(a.sheet.get().canUndo).toBe(false)
    a.sheet.redo()
    expect(stage(a.sheet.get().live)).toBe(9.6)
    b.sheet.undo()
    a.sheet.settle()
    expect(a.sheet.get().live.section.right).toMatchObject({ stage: 8 })
    expect(stage(a.sheet.get().live)).toBe(9.6)
  })

  it('leaves a field alone that somebody else has changed since: A edits, B edits the same, A undoes', () => {
    const { a, b } = pair()
    a.sheet.edit([{ do: 'set', path: 'title', value: 'From A' }])
    a.sheet.edit([{ do: 'set', path: 'left.stage', value: 9.5 }])
    b.sheet.edit([{ do: 'set', path: 'left.stage', value: 9.9 }])
    a.sheet.undo()
    b.sheet.settle()
    expect(stage(a.sheet.get().live)).toBe(9.9)
    expect(stage(b.sheet.get().live)).toBe(9.9)
    expect(b.sheet.get().live).toEqual(a.sheet.get().live)
  })

  it('joins nudges in quick succession into one step, and no others', () => {
    let now = 1000
    const [a] = openTogether(['Ada'], { now: () => now })
    if (!a) throw new Error('a desk')
    for (const value of [9.1, 9.2, 9.3]) {
      a.sheet.edit([{ do: 'set', path: 'left.stage', value }], 'nudge left')
      now += 200
    }
    now += 5000
    a.sheet.edit([{ do: 'set', path: 'left.stage', value: 9.4 }], 'nudge left')
    a.sheet.undo()
    expect(stage(a.sheet.get().live)).toBe(9.3)
    a.sheet.undo()
    expect(stage(a.sheet.get().live)).toBe(9)
  })
})

describe('cases', () => {
  it('puts plain values into the case shown and leaves the drawing as it is', () => {
    const { a } = pair()
    a.sheet.set({ caseId: 'wet' })
    a.sheet.edit([{ do: 'set', path: 'left.stage', value: 10.5 }])
    a.sheet.edit([{ do: 'set', path: 'right.name', value: 'Mill canal' }])
    const { section } = a.sheet.stored()
    expect(section.left).toMatchObject({ stage: 9 })
    expect(section.cases[0]?.set['left.stage']).toBe(10.5)
    expect(section.right.name).toBe('Mill canal')
    const { solution } = a.sheet.get()
    expect(solution.status === 'solved' ? solution.profile.head[0] : null).toBeCloseTo(10.5, 9)
  })

  it('goes back to the drawing when somebody removes the case shown', () => {
    const { a, b } = pair()
    a.sheet.set({ caseId: 'wet' })
    b.sheet.edit([{ do: 'remove', list: 'cases', id: 'wet' }])
    a.sheet.settle()
    expect(a.sheet.get().caseId).toBeNull()
  })
})

describe('reading', () => {
  it('refuses edits, gestures, undo and says so', () => {
    const [a] = openTogether(['Ada'], { may: 'read' })
    if (!a) throw new Error('a desk')
    expect(a.sheet.edit([{ do: 'set', path: 'left.stage', value: 1 }])).toBe(false)
    a.sheet.gesture.start()
    a.sheet.gesture.show([{ do: 'set', path: 'left.stage', value: 1 }])
    a.sheet.settle()
    expect(stage(a.sheet.get().live)).toBe(9)
    expect(a.sheet.gesture.finish()).toBe(false)
    a.sheet.undo()
    expect(a.sent).toHaveLength(0)
    expect(a.sheet.get().says?.tone).toBe('trouble')
  })

  it('drops a gesture in progress when the right to write is taken away', () => {
    const { a, b } = pair()
    a.sheet.gesture.start()
    a.sheet.gesture.show([{ do: 'set', path: 'left.stage', value: 11 }])
    a.sheet.hear.may('read')
    b.sheet.settle()
    expect(stage(b.sheet.get().live)).toBe(9)
    expect(a.sheet.gesture.active).toBe(false)
  })

  it('gives a reading at the line and none outside the strip', () => {
    const { a } = pair()
    a.sheet.set({ reading: 50 })
    expect(a.sheet.get().read?.x).toBe(50)
    a.sheet.set({ reading: 500 })
    expect(a.sheet.get().read).toBeNull()
  })
})

describe('off line', () => {
  it('keeps drawing alone and merges on return; both sheets then agree', () => {
    const { a, b } = pair()
    a.cut()
    a.sheet.edit([{ do: 'set', path: 'left.stage', value: 9.8 }])
    b.sheet.edit([{ do: 'set', path: 'right.stage', value: 7.5 }])
    expect(a.sheet.get().link.kind).toBe('offline')
    expect(stage(b.sheet.get().live)).toBe(9)
    a.join()
    a.sheet.settle()
    b.sheet.settle()
    expect(stage(b.sheet.get().live)).toBe(9.8)
    expect(a.sheet.get().live).toEqual(b.sheet.get().live)
  })

  it('lets go of what is picked when somebody removes it', () => {
    const { a, b } = pair()
    a.sheet.set({ picked: ['features.d1', 'left'] })
    b.sheet.edit([{ do: 'remove', list: 'features', id: 'd1' }])
    a.sheet.settle()
    expect(a.sheet.get().picked).toEqual(['left'])
  })
})
