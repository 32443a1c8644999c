import { describe, expect, it } from 'vitest'
import { openTogether } from '../testing'
import { COMMANDS, commandById, commandFor, keyHelp } from './index'
import type { Clipboard, KeyPress } from './types'

const press = (key: string, how: Partial<KeyPress> = {}): KeyPress => ({
  key,
  mod: false,
  shift: false,
  alt: false,
  ...how,
})
function setUp(options: Parameters<typeof openTogether>[1] = {}) {
  const [desk] = openTogether(['Ada'], options)
  if (!desk) throw new Error('a desk')
  let held = ''
  const clipboard: Clipboard = {
    write: async (text) => {
      held = text
    },
    read: async () => held,
  }
  const { sheet } = desk
  const run = async (key: string, how?: Partial<KeyPress>) => {
    await commandFor(press(key, how), sheet.get())?.run({ sheet, clipboard })
    sheet.settle()
  }
  return { sheet, run, clipboard, put: (text: string) => (held = text), section: () => sheet.get().live.section }
}

describe('commands', () => {
  it('gives no two commands the same key', () => {
    const keys = COMMANDS.flatMap((command) => command.keys.map((key) => key.toLowerCase()))
    expect(keys.filter((key, i) => keys.indexOf(key) !== i)).toEqual([])
    const ids = COMMANDS.map(({ id }) => id)
    expect(new Set(ids).size).toBe(ids.length)
  })

  it('nudges in the units on show, more with Shift, less with Alt, as one step', async () => {
    const { sheet, run, section } = setUp()
    sheet.set({ picked: ['features.d1'] })
    await run('ArrowRight')
    await run('ArrowRight')
    await run('ArrowUp', { shift: true })
    await run('ArrowDown', { alt: true })
    expect(section().features[0]).toMatchObject({ x: 42, level: 10.49 })
    sheet.undo()
    expect(section().features[0]).toMatchObject({ x: 40, level: 9.5 })
    sheet.set({ units: 'us' })
    await run('ArrowUp')
    expect(section().features[0]).toMatchObject({ x: 40, level: 9.6524 })
  })

  it('removes what can go and says what cannot', async () => {
    const { sheet, run, section } = setUp()
    const [first, second] = sheet.stored().keys.ground
    sheet.set({ picked: ['features.d1', 'left', `ground.v:${first}`, `ground.v:${second}`] })
    await run('Delete')
    expect(section().features).toHaveLength(0)
    expect(section().ground).toHaveLength(2)
    expect(sheet.get().says?.text).toMatch(/bank/)
    expect(sheet.get().says?.text).toMatch(/ends of ground/)
    sheet.undo()
    expect(section().features).toHaveLength(1)
    expect(section().ground).toHaveLength(3)
  })

  it('removes a body that would keep fewer than three corners', async () => {
    const { sheet, run, section } = setUp()
    const keys = sheet.stored().keys.bodies.b1 ?? []
    sheet.set({ picked: keys.slice(0, 2).map((key) => `bodies.b1.v:${key}`) })
    await run('Delete')
    expect(section().bodies).toHaveLength(0)
  })

  it('copies and pastes under new ids, beside the old, and brings missing materials to another section', async () => {
    const one = setUp()
    one.sheet.set({ picked: ['bodies.b1', 'features.d1', 'left'] })
    await one.run('c', { mod: true })
    await one.run('v', { mod: true })
    expect(one.section().bodies).toHaveLength(2)
    expect(one.section().bodies[1]?.outline[0]?.[0]).toBeGreaterThan(60)
    expect(one.section().materials).toHaveLength(2)
    expect(one.sheet.get().picked).toHaveLength(2)
    one.sheet.undo()
    expect(one.section().bodies).toHaveLength(1)
    expect(one.section().features).toHaveLength(1)
    expect(one.sheet.get().picked).toEqual(['bodies.b1', 'features.d1', 'left'])

    const other = setUp()
    other.sheet.edit([
      { do: 'remove', list: 'bodies', id: 'b1' },
      { do: 'remove', list: 'materials', id: 'silt' },
    ])
    other.put(await one.clipboard.read())
    await other.run('v', { mod: true })
    expect(other.section().bodies).toHaveLength(1)
    const silt = other.section().materials.find((material) => material.name === 'Silt')
    expect(other.section().bodies[0]?.material).toBe(silt?.id)
  })

  it('takes nothing foreign from the clipboard', async () => {
    const { sheet, run, put, section } = setUp()
    for (const text of [
      'hello',
      '{"format":"doab.cut"}',
      '{"format":"doab.cut","version":1,"bodies":[{"id":"a.b"}]}',
      '{',
    ]) {
      put(text)
      await run('v', { mod: true })
    }
    expect(section().bodies).toHaveLength(1)
    expect(sheet.get().says?.text).toMatch(/nothing of a section/)
  })

  it('walks through the cases and round again', async () => {
    const { sheet, run } = setUp()
    await run('PageDown')
    expect(sheet.get().caseId).toBe('wet')
    await run('PageDown')
    expect(sheet.get().caseId).toBeNull()
    await run('PageUp')
    expect(sheet.get().caseId).toBe('wet')
    sheet.set({ picked: ['features.d1'] })
    await run('x')
    expect(sheet.stored().section.cases[0]?.off).toEqual(['d1'])
  })

  it('offers readers nothing that changes the section', () => {
    const { sheet } = setUp({ may: 'read' })
    sheet.set({ picked: ['features.d1'] })
    for (const id of ['remove', 'cut', 'paste', 'duplicate', 'undo', 'tool-ground', 'nudge-left', 'leave-out'])
      expect(commandById(id)?.enabled(sheet.get()), id).toBe(false)
    expect(commandById('copy')?.enabled(sheet.get())).toBe(true)
    const offered = keyHelp('read').flatMap(({ rows }) => rows.map(({ label }) => label))
    expect(offered).toContain('The whole strip')
    expect(offered).not.toContain('Remove')
  })

  it('zooms about the middle and steps the exaggeration', async () => {
    const { sheet, run } = setUp()
    sheet.set({ view: { x0: 0, x1: 100, zMid: 7, exaggeration: 8 } })
    await run('+', { shift: true })
    const view = sheet.get().view
    expect((view?.x0 ?? 0) + (view?.x1 ?? 0)).toBeCloseTo(100, 9)
    expect((view?.x1 ?? 0) - (view?.x0 ?? 0)).toBeCloseTo(100 / 1.4, 9)
    await run(']')
    expect(sheet.get().view?.exaggeration).toBe(10)
    await run('0')
    expect(sheet.get().view).toBeNull()
  })
})
