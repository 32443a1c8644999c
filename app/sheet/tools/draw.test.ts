import { describe, expect, it } from 'vitest'
import { takeTool } from './testing'

describe('ground and base', () => {
  it('puts the drawn stretch in place of the old one, as one step', () => {
    const { pointer, section, sheet, sent, machine } = takeTool()
    sheet.set({ tool: 'ground' })
    pointer.click(20, 12)
    pointer.click(40, 14)
    pointer.click(70, 13.5)
    expect(machine.state.name).toBe('ground.drawing')
    pointer.double(70, 13.5)
    expect(section().ground).toEqual([
      [0, 12],
      [20, 12],
      [40, 14],
      [70, 13.5],
      [100, 12],
    ])
    expect(sent).toHaveLength(1)
    expect(sheet.get().tool).toBe('pick')
  })

  it('works from right to left, never turns back on itself, and takes points back', () => {
    const { pointer, section, sheet } = takeTool()
    sheet.set({ tool: 'base' })
    pointer.click(90, 3)
    pointer.click(30, 2.5)
    pointer.click(60, 1)
    pointer.key('Backspace')
    pointer.key('Enter')
    sheet.settle()
    expect(section().base).toEqual([
      [0, 2],
      [30, 2.5],
      [90, 3],
      [100, 2],
    ])
  })

  it('leaves nothing on Escape', () => {
    const { pointer, section, sheet, sent } = takeTool()
    sheet.set({ tool: 'ground' })
    pointer.click(20, 15)
    pointer.click(60, 16)
    pointer.cancel()
    expect(section().ground).toHaveLength(3)
    expect(sent).toHaveLength(0)
  })

  it('sets the height at a bank when drawn beyond it', () => {
    const { pointer, section, sheet } = takeTool()
    sheet.set({ tool: 'ground' })
    pointer.click(-10, 11)
    pointer.click(30, 12)
    pointer.key('Enter')
    sheet.settle()
    expect(section().ground[0]).toEqual([0, 11])
    expect(section().ground[1]).toEqual([30, 12])
  })
})

describe('body', () => {
  it('closes on the first corner and takes the material of the last body', () => {
    const { pointer, section, sheet } = takeTool()
    sheet.set({ tool: 'body' })
    pointer.click(10, 4)
    pointer.click(40, 4)
    pointer.click(40, 7)
    pointer.click(11, 4.1)
    expect(section().bodies).toHaveLength(2)
    expect(section().bodies[1]).toMatchObject({
      material: 'silt',
      outline: [
        [10, 4],
        [40, 4],
        [40, 7],
      ],
    })
    expect(sheet.get().picked).toEqual([`bodies.${section().bodies[1]?.id}`])
  })

  it('refuses an outline that crosses itself, says so, and lets the corner be taken back', () => {
    const { pointer, section, sheet } = takeTool()
    sheet.set({ tool: 'body' })
    pointer.click(10, 4)
    pointer.click(40, 4)
    pointer.click(10, 7)
    pointer.click(40, 7)
    pointer.key('Enter')
    expect(section().bodies).toHaveLength(1)
    expect(sheet.get().says?.text).toMatch(/crosses itself/)
    pointer.key('Backspace')
    pointer.key('Enter')
    sheet.settle()
    expect(section().bodies).toHaveLength(2)
  })
})

describe('placing', () => {
  it.each([
    ['ditch', { kind: 'ditch', x: 55, level: 8.5 }],
    ['drain', { kind: 'drain', x: 55, level: 8.5 }],
    ['trench', { kind: 'trench', x: 55 }],
    ['wall', { kind: 'wall', x: 55 }],
  ] as const)('places a %s where it is let go, with the water table following', (tool, expected) => {
    const { pointer, section, sheet, sent, other } = takeTool()
    sheet.set({ tool })
    pointer.down(50, 9)
    pointer.move(55, 8.5)
    other.sheet.settle()
    expect(other.sheet.get().live.section.features).toHaveLength(2)
    expect(sent).toHaveLength(0)
    pointer.up(55, 8.5)
    sheet.settle()
    expect(section().features[1]).toMatchObject(expected)
    expect(sent).toHaveLength(1)
    expect(sheet.get().tool).toBe('pick')
    sheet.undo()
    expect(section().features).toHaveLength(1)
    sheet.redo()
    expect(sheet.get().picked).toEqual([`features.${section().features[1]?.id}`])
  })

  it('keeps the tool in hand with Shift', () => {
    const { pointer, section, sheet } = takeTool()
    sheet.set({ tool: 'observation' })
    pointer.click(20, 9.2, { shift: true })
    pointer.click(70, 8.8, { shift: true })
    expect(section().observations).toHaveLength(3)
    expect(section().observations[2]).toMatchObject({ x: 70, head: 8.8, name: 'P-3', date: '2026-05-02' })
  })

  it('sets water at the nearer bank and takes the line ends along', () => {
    const { pointer, section, sheet } = takeTool()
    sheet.edit([{ do: 'set-bank', side: 'right', bank: { kind: 'no-flow', x: 100 } }])
    sheet.set({ tool: 'bank' })
    pointer.drag([90, 7], [110, 7.4])
    expect(section().right).toMatchObject({ kind: 'water', x: 110, stage: 7.4 })
    expect(section().ground.at(-1)).toEqual([110, 12])
    expect(section().base.at(-1)).toEqual([110, 2])
  })
})

describe('spans', () => {
  it('drags out a recharge zone with the rate of the last one', () => {
    const { pointer, section, sheet } = takeTool()
    sheet.set({ tool: 'recharge' })
    pointer.drag([80, 14], [30, 14])
    expect(section().recharge[1]).toMatchObject({ from: 30, to: 80, rate: 0.001 })
  })

  it('drags out a limit at the level of the press', () => {
    const { pointer, section, sheet } = takeTool()
    sheet.set({ tool: 'limit' })
    pointer.drag([60, 11.2], [75, 12])
    expect(section().limits[1]).toMatchObject({ from: 60, to: 75, level: 11.2, clearance: 0.5 })
  })

  it('makes nothing of a click without length', () => {
    const { pointer, section, sheet, sent } = takeTool()
    sheet.set({ tool: 'limit' })
    pointer.click(60, 11)
    expect(section().limits).toHaveLength(1)
    expect(sent).toHaveLength(0)
  })
})

describe('mark-up', () => {
  it('draws a stroke on a layer of the day, apart from the model, as one step', () => {
    const { pointer, sheet, sent, section } = takeTool()
    const before = section()
    sheet.set({ tool: 'pen' })
    pointer.down(10, 10)
    for (let x = 12; x < 40; x += 3) pointer.move(x, 10 + x / 40)
    pointer.up(40, 11)
    sheet.settle()
    const { layers, marks } = sheet.get().live.markup
    expect(layers).toHaveLength(1)
    expect(layers[0]).toMatchObject({ date: '2026-05-02', hidden: false })
    expect(marks).toHaveLength(1)
    expect(marks[0]).toMatchObject({ kind: 'pen', layer: layers[0]?.id, by: 'Ada' })
    expect(marks[0]?.points.length).toBeGreaterThan(8)
    expect(section()).toEqual(before)
    expect(sent).toHaveLength(1)
    pointer.down(10, 8)
    pointer.move(30, 8)
    pointer.up(30, 8)
    sheet.settle()
    expect(sheet.get().live.markup.layers).toHaveLength(1)
    expect(sheet.get().live.markup.marks).toHaveLength(2)
  })

  it('writes a note where it was clicked, and none when nothing is written', async () => {
    const { pointer, sheet, answers } = takeTool()
    answers.push('Silt to 5.8?', '  ')
    sheet.set({ tool: 'note' })
    pointer.click(70, 5)
    await Promise.resolve()
    await Promise.resolve()
    expect(sheet.get().live.markup.marks).toMatchObject([{ kind: 'note', text: 'Silt to 5.8?', points: [[70, 5]] }])
    sheet.set({ tool: 'note' })
    pointer.click(30, 5)
    await Promise.resolve()
    await Promise.resolve()
    expect(sheet.get().live.markup.marks).toHaveLength(1)
  })

  it('rubs out marks only, all of one stroke as one step', () => {
    const state = takeTool({ things: ({ x }) => (x < 50 ? `marks.${first()}` : 'bodies.b1') })
    const { pointer, sheet, section } = state
    const first = () => sheet.stored().markup.marks[0]?.id ?? ''
    sheet.set({ tool: 'highlight' })
    pointer.drag([10, 10], [40, 10])
    sheet.set({ tool: 'eraser' })
    pointer.drag([20, 10], [70, 4])
    expect(sheet.get().live.markup.marks).toHaveLength(0)
    expect(section().bodies).toHaveLength(1)
    sheet.undo()
    expect(sheet.get().live.markup.marks).toHaveLength(1)
  })
})

describe('the hand', () => {
  it('moves the sheet by what the pointer moves', () => {
    const { pointer, sheet, shown } = takeTool()
    sheet.set({ tool: 'hand' })
    pointer.down(10, 10)
    pointer.move(30, 10)
    pointer.move(30, 9)
    pointer.up(30, 9)
    expect(shown.pans).toEqual([
      [20, 0],
      [0, 10],
    ])
  })
})

describe('drawing without the right to', () => {
  it('is refused with a reason', () => {
    const { pointer, sheet, sent } = takeTool({ sheet: { may: 'read' } })
    for (const tool of ['ground', 'body', 'drain', 'limit', 'pen', 'bank'] as const) {
      sheet.set({ tool })
      pointer.drag([20, 10], [60, 10])
      sheet.set({ tool: 'pick' })
    }
    expect(sent).toHaveLength(0)
    expect(sheet.get().says?.text).toMatch(/reading/)
  })
})
