import { describe, expect, it } from 'vitest'
import { startingDrawing } from '~/section'
import { arrows, flowLines, footing, readAt, solveSteady, travelTime } from '../index'
import { answerOf, strip } from '../published/strip'
import { rain, sectionOf } from '../testing'

const mound = answerOf(
  strip({
    length: 200,
    k: 5,
    left: 7,
    right: 6.9,
    w: 0.001,
    more: { materials: [{ id: 'sand', k: 5, porosity: 0.3 }] },
  }),
)

describe('inside the section', () => {
  it('gives every tube the same flow: a line stays where |q|·F is its own', () => {
    const lines = flowLines(mound, { tubes: 10 })
    expect(lines.length).toBeGreaterThan(5)
    for (const { points, tube } of lines)
      for (const [x, z] of points.slice(1, -1)) {
        const at = readAt(mound, x)
        const carried = Math.abs(at.flow) * (z / at.head)
        // Half-integer multiples of the tube.
        expect(Math.abs(carried / tube - Math.floor(carried / tube) - 0.5)).toBeLessThan(1e-6)
      }
  })
  it('starts lines at the water table and ends them at the banks, with time growing', () => {
    for (const { born, exit, days, points } of flowLines(mound)) {
      expect(born).toBe('water-table')
      expect(['left', 'right']).toContain(exit)
      expect(days.every((t, i) => i === 0 || t >= (days[i - 1] ?? 0))).toBe(true)
      const [x, z] = points[0] ?? [0, 0]
      expect(Math.abs(readAt(mound, x).head - z)).toBeLessThan(0.02)
    }
  })
  it('points arrows the way the flow goes, down where recharge sinks', () => {
    const { arrows: field, measure } = arrows(mound)
    expect(measure).toBe('velocity')
    for (const { x, vx, vz } of field) {
      expect(Math.sign(vx)).toBe(Math.sign(readAt(mound, x).flow))
      expect(vz).toBeLessThan(0.01)
    }
    // Continuity over a level base in one material (METHODS §3): v_z = −w(z−b)/s + v_x (z−b)/s dh/dx, over the porosity.
    const spot = field[4]
    if (!spot) throw new Error('no arrow')
    const at = readAt(mound, spot.x)
    const slope = -at.flow / (5 * at.head)
    const expected = (-0.001 * spot.z) / at.head / 0.3 + ((spot.vx * spot.z) / at.head) * slope
    expect(spot.vz).toBeCloseTo(expected, 6)
  })
  it('says who never leaves: the divide', () => {
    const [divide] = mound.divides
    if (!divide) throw new Error('no divide')
    expect(travelTime(mound, divide.from).days).toBeNull()
    expect(travelTime(mound, divide.from + 20)).toMatchObject({ exit: 'right' })
    expect(travelTime(mound, divide.from - 20)).toMatchObject({ exit: 'left' })
  })
  it('ends a path at a ditch and says so by its id', () => {
    const solution = answerOf(
      strip({
        length: 200,
        k: 5,
        left: 8,
        right: 8,
        w: 0.001,
        more: {
          materials: [{ id: 'sand', k: 5, porosity: 0.3 }],
          features: [{ id: 'd1', kind: 'ditch', x: 120, level: 6, conductance: null }],
        },
      }),
    )
    expect(travelTime(solution, 60)).toMatchObject({ exit: 'd1' })
    expect(travelTime(solution, 150)).toMatchObject({ exit: 'd1' })
    expect(travelTime(solution, 120)).toEqual({ days: 0, exit: 'd1' })
  })
  it('does not leave by a closed bank: from there the water has the whole way to go', () => {
    const solution = answerOf(
      strip({
        length: 100,
        k: 1,
        left: 5,
        right: 5,
        w: 1e-3,
        more: { left: { kind: 'no-flow', x: 0 }, materials: [{ id: 'sand', k: 1, porosity: 0.3 }] },
      }),
    )
    expect(travelTime(solution, 0).exit).not.toBe('left')
    expect(travelTime(solution, 100)).toEqual({ days: 0, exit: 'right' })
    expect(travelTime(solution, 1)).toMatchObject({ exit: 'right' })
  })
  it('says why there is no time without a porosity', () => {
    const solution = answerOf(strip({ length: 100, k: 5, left: 8, right: 6 }))
    expect(travelTime(solution, 50)).toMatchObject({
      days: null,
      exit: 'right',
      why: expect.stringContaining('porosity'),
    })
  })
})

describe('footing', () => {
  it('gives each line a number, a source and a verdict', () => {
    const section = startingDrawing('river-and-canal')
    const lines = footing(section, solveSteady(section))
    expect(lines.map(({ key }) => key)).toEqual(
      expect.arrayContaining(['slope', 'recharge-against-k', 'ends', 'length', 'dry', 'flooded', 'unsourced']),
    )
    for (const line of lines) {
      expect(line.source).not.toBe('')
      expect(line.says).not.toBe('')
      expect(['holds', 'doubtful', 'fails']).toContain(line.verdict)
    }
  })
  it('fails a short deep strip and a steep water table', () => {
    const section = strip({ length: 16, k: 1, left: 24, right: 4 })
    const lines = footing(section, solveSteady(section))
    expect(lines.find(({ key }) => key === 'length')?.verdict).toBe('fails')
    expect(lines.find(({ key }) => key === 'slope')?.verdict).toBe('fails')
    // Charny's vertical-faced bank: leaving 17.5 over a depth of 4, wet face estimated 0.742·q/K as without tailwater.
    expect(lines.find(({ key }) => key === 'outlet-face')?.value).toBeCloseTo(0.742 * 17.5, 6)
  })
  it('warns of recharge that a layer cannot pass, and of a name that does not fit its number', () => {
    const section = sectionOf({
      materials: [
        { id: 'sand', name: 'Fine sand', k: 5 },
        { id: 'c', name: 'Clay', k: 0.0005 },
      ],
      host: 'sand',
      bodies: [
        {
          id: 'b',
          material: 'c',
          outline: [
            [10, 3],
            [40, 3],
            [40, 4],
            [10, 4],
          ],
        },
      ],
      recharge: [rain(0, 50, 0.001)],
    })
    const lines = footing(section, solveSteady(section))
    expect(lines.find(({ key }) => key === 'perching')?.verdict).toBe('fails')
    expect(lines.find(({ key }) => key === 'range.c')?.verdict).toBe('doubtful')
    expect(lines.find(({ key }) => key === 'unsourced')?.value).toBeGreaterThan(0)
  })
})
