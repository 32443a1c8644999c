import { describe, expect, it } from 'vitest'
import { takeTool } from '../testing'
import type { At } from '../types'

/** The drain at (40, 9.5), the body round (70, 4), the left bank near x = 0, the limit at 11. */
const things = ({ x, z }: At) => {
  if (Math.abs(x - 40) < 3 && Math.abs(z - 9.5) < 0.3) return 'features.d1'
  if (x > 60 && x < 80 && z > 3 && z < 5) return 'bodies.b1'
  if (x < 3) return 'left'
  if (x > 22 && x < 28 && Math.abs(z - 11) < 0.2) return 'limits.l1'
  return null
}

describe('pick', () => {
  it('picks on the press, adds and drops with Shift, lets go on bare paper', () => {
    const { sheet, pointer } = takeTool({ things })
    pointer.click(40, 9.5)
    expect(sheet.get().picked).toEqual(['features.d1'])
    pointer.click(70, 4, { shift: true })
    expect(sheet.get().picked).toEqual(['features.d1', 'bodies.b1'])
    pointer.click(40, 9.5, { shift: true })
    expect(sheet.get().picked).toEqual(['bodies.b1'])
    pointer.click(15, 6)
    expect(sheet.get().picked).toEqual([])
  })

  it('drags a feature in x and level as one step', () => {
    const { pointer, section, sent, sheet } = takeTool({ things })
    pointer.drag([40, 9.5], [45, 9.1])
    expect(section().features[0]).toMatchObject({ x: 45, level: 9.1 })
    expect(sent).toHaveLength(1)
    sheet.undo()
    expect(section().features[0]).toMatchObject({ x: 40, level: 9.5 })
  })

  it('takes a press that hardly moves for a click', () => {
    const { pointer, sent } = takeTool({ things })
    pointer.drag([40, 9.5], [41, 9.6])
    expect(sent).toHaveLength(0)
  })

  it('puts everything back on Escape', () => {
    const { pointer, section, sent, machine } = takeTool({ things })
    pointer.down(40, 9.5)
    pointer.move(60, 8)
    expect(section().features[0]).toMatchObject({ x: 60, level: 8 })
    pointer.cancel()
    expect(section().features[0]).toMatchObject({ x: 40, level: 9.5 })
    expect(sent).toHaveLength(0)
    expect(machine.state.name).toBe('pick.idle')
  })

  it('drags a vertex, which stops short of its neighbours', () => {
    const { pointer, section, sheet, key } = takeTool({ things })
    sheet.set({ picked: [`ground.v:${key('ground', 1)}`] })
    pointer.drag([50, 13], [300, 13.5])
    const x = section().ground[1]?.[0] ?? 0
    expect(x).toBeLessThan(100)
    expect(x).toBeGreaterThan(99)
    expect(section().ground).toHaveLength(3)
  })

  it('keeps the ends of the ground at the banks', () => {
    const { pointer, section, sheet, key } = takeTool({ things })
    sheet.set({ picked: [`ground.v:${key('ground', 0)}`] })
    pointer.drag([0, 12], [20, 11])
    expect(section().ground[0]).toEqual([0, 11])
  })

  it('snaps the dragged vertex, not the pointer, and shows what it caught', () => {
    const { pointer, section, sheet, key, snapTo, shown } = takeTool({ things })
    sheet.set({ picked: [`ground.v:${key('ground', 1)}`] })
    snapTo(({ x }) => (Math.abs(x - 60) < 2 ? { x: 60, z: 11, to: 'vertex' } : null))
    pointer.down(51, 13.1)
    pointer.move(61.5, 11.3)
    expect(shown.draft?.snap?.to).toBe('vertex')
    pointer.up(61.5, 11.3)
    sheet.settle()
    expect(section().ground[1]).toEqual([60, 11])
  })

  it('pulls a new vertex out of the middle of an edge and picks it', () => {
    const { pointer, section, sheet } = takeTool({ things })
    sheet.set({ picked: ['ground'] })
    pointer.drag([25, 12.5], [25, 14])
    expect(section().ground[1]).toEqual([25, 14])
    expect(section().ground).toHaveLength(4)
    expect(sheet.get().picked).toHaveLength(1)
    expect(sheet.get().picked[0]).toMatch(/^ground\.v:/)
    sheet.undo()
    expect(section().ground).toHaveLength(3)
  })

  it('inserts a vertex on the edge by a double click', () => {
    const { pointer, section, sheet } = takeTool({ things: () => 'bodies.b1' })
    pointer.double(70, 5)
    expect(section().bodies[0]?.outline).toHaveLength(5)
    expect(section().bodies[0]?.outline).toContainEqual([70, 5])
    expect(sheet.get().picked[0]).toMatch(/^bodies\.b1\.v:/)
  })

  it('moves a bank along with the ends of ground and base, or its stage: the way the drag sets out', () => {
    const one = takeTool({ things })
    one.pointer.drag([1, 6], [-9, 6.05])
    expect(one.section().left).toMatchObject({ x: -10, stage: 9 })
    expect(one.section().ground[0]?.[0]).toBe(-10)
    expect(one.section().base[0]?.[0]).toBe(-10)
    const other = takeTool({ things })
    other.pointer.drag([1, 6], [1.5, 6.9])
    expect(other.section().left).toMatchObject({ x: 0, stage: 9.9 })
  })

  it('drags a stage in the case shown only', () => {
    const { pointer, section, sheet } = takeTool({ things })
    sheet.set({ caseId: 'wet', picked: ['left'] })
    pointer.drag([0, 10], [0, 10.4])
    expect(section().left).toMatchObject({ stage: 9 })
    expect(section().cases[0]?.set['left.stage']).toBeCloseTo(10.4, 9)
  })

  it('drags one end of a zone and never past the other', () => {
    const { pointer, section, sheet } = takeTool({ things })
    sheet.set({ picked: ['limits.l1'] })
    pointer.drag([20, 11], [90, 11.4])
    const limit = section().limits[0]
    expect(limit?.from).toBeLessThan(30)
    expect(limit?.level).toBe(11)
  })

  it('moves several picked things together', () => {
    const { pointer, section, sheet } = takeTool({ things })
    sheet.set({ picked: ['features.d1', 'bodies.b1'] })
    pointer.drag([70, 4], [75, 3.5])
    expect(section().features[0]).toMatchObject({ x: 45, level: 9 })
    expect(section().bodies[0]?.outline[0]).toEqual([65, 2.5])
  })

  it('picks what lies wholly in a marquee', () => {
    const { pointer, sheet } = takeTool({ things: () => null })
    pointer.drag([55, 10], [85, 2.5])
    expect(sheet.get().picked).toEqual(['bodies.b1'])
  })

  it('moves the sheet under a finger on bare paper', () => {
    const { pointer, sheet, shown } = takeTool({ things: () => null })
    pointer.drag([55, 10], [85, 2.5], { kind: 'touch' })
    expect(shown.pans).not.toHaveLength(0)
    expect(sheet.get().picked).toEqual([])
  })

  it('moves nothing for a reader but lets them pick', () => {
    const { pointer, sheet, section, sent } = takeTool({ things, sheet: { may: 'read' } })
    pointer.drag([40, 9.5], [60, 8])
    expect(sheet.get().picked).toEqual(['features.d1'])
    expect(section().features[0]).toMatchObject({ x: 40 })
    expect(sent).toHaveLength(0)
  })
})
