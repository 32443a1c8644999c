import { describe, expect, it } from 'vitest'
import type { Feature, Section } from '~/section'
import { readAt, type Solved, solveSteady, type Unsolved } from '../index'
import { rain, sectionOf, water } from '../testing'

function solved(section: Section): Solved {
  const solution = solveSteady(section)
  if (solution.status !== 'solved') throw new Error(solution.reason.map(({ message }) => message).join(' '))
  return solution
}
function unsolved(section: Section): Unsolved {
  const solution = solveSteady(section)
  if (solution.status !== 'unsolved') throw new Error('has an answer')
  return solution
}
const rate = (solution: Solved, of: string) => solution.exchanges.find((one) => one.of === of)?.rate ?? Number.NaN
const closed = (x: number) => ({ kind: 'no-flow', x }) as const
const inflow = (x: number, q: number) => ({ kind: 'inflow', x, rate: q }) as const
const ditch = (x: number, level: number, conductance: number | null = null, id = 'd'): Feature => ({
  id,
  kind: 'ditch',
  x,
  level,
  conductance,
})
const drain = (x: number, level: number, conductance: number | null = null, id = 'n'): Feature => ({
  id,
  kind: 'drain',
  x,
  level,
  conductance,
})
const trench = (x: number, q: number, id = 't'): Feature => ({ id, kind: 'trench', x, rate: q })
const wall = (x: number, thickness: number, k: number, id = 'w'): Feature => ({ id, kind: 'wall', x, thickness, k })

describe('METHODS 2a, choice by choice', () => {
  it('1: q is positive to the right, inflow positive into the aquifer at either end, exchange positive when water leaves', () => {
    const left = solved(sectionOf({ left: inflow(0, 0.4) }))
    expect(readAt(left, 50).flow).toBeCloseTo(0.4, 10)
    expect(rate(left, 'left')).toBeCloseTo(-0.4, 10)
    expect(rate(left, 'right')).toBeCloseTo(0.4, 10)
    const right = solved(sectionOf({ right: inflow(100, 0.4) }))
    expect(readAt(right, 50).flow).toBeCloseTo(-0.4, 10)
    expect(rate(right, 'right')).toBeCloseTo(-0.4, 10)
  })

  it('2: both sides at a feature and at a wall; a change of sign across a ditch is no divide', () => {
    const solution = solved(sectionOf({ features: [ditch(40, 6), wall(70, 0.5, 0.05)] }))
    const at = readAt(solution, 40)
    expect(at.left?.flow).toBeGreaterThan(0)
    expect(at.right?.flow).toBeLessThan(0)
    const across = readAt(solution, 70)
    expect(across.left?.flow).toBeCloseTo(across.right?.flow ?? Number.NaN, 10)
    expect(across.right?.head ?? 0).toBeGreaterThan((across.left?.head ?? 0) + 0.1)
    expect(solution.divides).toEqual([])
    const i = solution.profile.x.indexOf(70)
    expect(solution.profile.x[i + 1]).toBe(70)
  })

  it('2: a stretch without flow is the divide as a whole', () => {
    const solution = solved(sectionOf({ recharge: [rain(0, 30, 0.002), rain(60, 90, 0.002, 'r2')] }))
    expect(solution.divides.length).toBe(1)
    expect(solution.divides[0]?.kind).toBe('divide')
    const still = solved(sectionOf({ recharge: [rain(0, 30, 0.002), rain(70, 100, 0.002, 'r2')] }))
    expect(still.divides[0]?.from).toBeCloseTo(30, 6)
    expect(still.divides[0]?.to).toBeCloseTo(70, 6)
    // 3: and its plateau is the highest place.
    expect(still.highest.x).toBeCloseTo(30, 6)
    expect(still.highest.to).toBeCloseTo(70, 6)
  })

  it('3: without recharge the highest point is the higher bank, and the profile does not depend on K', () => {
    const a = solved(sectionOf({ right: water(100, 8) }))
    const b = solved(sectionOf({ right: water(100, 8), materials: [{ id: 'sand', k: 0.02 }] }))
    expect(a.highest).toEqual({ x: 0, to: 0, head: 10 })
    expect(readAt(a, 63).head).toBeCloseTo(readAt(b, 63).head, 10)
  })

  it('4: with conductance the head at the bank stands off the stage', () => {
    const solution = solved(
      sectionOf({ left: water(0, 10, 0.5), right: water(100, 10, 0.5), recharge: [rain(0, 100, 0.01)] }),
    )
    expect(solution.exchanges[0]?.head).toBeCloseTo(11, 10)
  })

  it('5: over a level base a wall steps h² by 2·q·thickness/k; over a sloping base with the base at the wall', () => {
    const jump = (section: Section) => {
      const solution = solved(section)
      const at = readAt(solution, 40)
      const base = at.base
      const left = ((at.left?.head ?? 0) - base) ** 2 / 2
      const right = ((at.right?.head ?? 0) - base) ** 2 / 2
      return { step: left - right, q: at.flow }
    }
    for (const base of [
      [
        [0, 0],
        [100, 0],
      ],
      [
        [0, 3],
        [100, -2],
      ],
    ] as [number, number][][]) {
      const { step, q } = jump(sectionOf({ base, right: water(100, 5), features: [wall(40, 0.5, 0.01)] }))
      expect(step).toBeCloseTo((q * 0.5) / 0.01, 8)
      expect(q).toBeGreaterThan(0)
    }
  })

  it('6: drains never feed; ditches may; an idle drain leaves the answer alone', () => {
    for (const conductance of [null, 0.3]) {
      const plain = solved(sectionOf({}))
      const idle = solved(sectionOf({ features: [drain(50, 12, conductance)] }))
      expect(rate(idle, 'features.n')).toBe(0)
      expect(readAt(idle, 50).head).toBeCloseTo(readAt(plain, 50).head, 10)
      const feeding = solved(sectionOf({ features: [ditch(50, 12, conductance)] }))
      expect(rate(feeding, 'features.d')).toBeLessThan(0)
      const busy = solved(sectionOf({ features: [drain(50, 9, conductance)] }))
      expect(rate(busy, 'features.n')).toBeGreaterThan(0)
      if (conductance === null) expect(readAt(busy, 50).head).toBeCloseTo(9, 10)
      else expect(rate(busy, 'features.n')).toBeCloseTo(conductance * (readAt(busy, 50).head - 9), 10)
    }
  })

  it('9, 10: a hump of the base above the stages: water runs off both sides, nothing below 0, the dry reach is reported', () => {
    const base: [number, number][] = [
      [0, 0],
      [50, 15],
      [100, 0],
    ]
    const wet = solved(sectionOf({ base, recharge: [rain(0, 100, 0.01)] }))
    expect(Math.min(...wet.profile.saturated)).toBeGreaterThanOrEqual(0)
    expect(rate(wet, 'left')).toBeCloseTo(0.5, 6)
    expect(rate(wet, 'right')).toBeCloseTo(0.5, 6)
    const dry = solved(sectionOf({ base }))
    expect(dry.dry.length).toBe(1)
    // The still water of both banks ends where the hump comes out of it: 10 m up a slope of 0.3.
    expect(dry.dry[0]?.from).toBeCloseTo(100 / 3, 1)
    expect(dry.dry[0]?.to).toBeCloseTo(200 / 3, 1)
    expect(readAt(dry, 20).head).toBeCloseTo(10, 6)
    expect(rate(dry, 'left')).toBeCloseTo(0, 9)
  })

  it('10: normal depth in thin flow down a slope, q = K·s·slope', () => {
    const solution = solved(
      sectionOf({
        base: [
          [0, 20],
          [400, 0],
        ],
        ground: [
          [0, 40],
          [400, 20],
        ],
        left: inflow(0, 0.05),
        right: water(400, 2),
      }),
    )
    expect(readAt(solution, 150).saturated).toBeCloseTo(0.05 / (10 * 0.05), 3)
  })

  it('11: nothing holds a level: says why, and what would mend it', () => {
    const rising = unsolved(sectionOf({ left: closed(0), right: closed(100), recharge: [rain(0, 100, 0.001)] }))
    expect(rising.reason[0]?.message).toMatch(/rise without end/)
    expect(rising.reason[0]?.place).toBeDefined()
    expect(rising.mend).toMatch(/stage/)
    expect(unsolved(sectionOf({ left: inflow(0, 0.1), right: closed(100) })).reason[0]?.message).toMatch(
      /rise without end/,
    )
    expect(unsolved(sectionOf({ left: inflow(0, 0.1), right: inflow(100, -0.1) })).reason[0]?.message).toMatch(/height/)
    expect(
      unsolved(sectionOf({ left: closed(0), right: closed(100), recharge: [rain(0, 100, -0.001)] })).reason[0]?.message,
    ).toMatch(/more|More/)
    expect(unsolved(sectionOf({ left: water(0, 8, 0), right: closed(100) })).status).toBe('unsolved')
    expect(
      unsolved(sectionOf({ left: closed(0), features: [wall(50, 1, 0)], recharge: [rain(0, 100, 0.001)] })).reason[0]
        ?.message,
    ).toMatch(/from 0 m to 50 m/)
  })

  it('11: closed ends with a ditch, a drain or a wet ground have an answer', () => {
    const recharge = [rain(0, 100, 0.001)]
    const ends = { left: closed(0), right: closed(100), recharge }
    expect(rate(solved(sectionOf({ ...ends, features: [ditch(50, 6)] })), 'features.d')).toBeCloseTo(0.1, 9)
    expect(rate(solved(sectionOf({ ...ends, features: [drain(50, 6)] })), 'features.n')).toBeCloseTo(0.1, 9)
    expect(rate(solved(sectionOf({ ...ends, features: [drain(50, 6, 0.2)] })), 'features.n')).toBeCloseTo(0.1, 9)
    const wet = solved(
      sectionOf({
        ...ends,
        ground: [
          [0, 9],
          [60, 7],
          [100, 9],
        ],
        surfaceSeepage: true,
      }),
    )
    expect(wet.seepage.length).toBe(1)
    expect(wet.seepage[0]?.from).toBeCloseTo(60, 6)
    expect(wet.seepage[0]?.rate).toBeCloseTo(0.1, 8)
  })

  it('11: a trench that asks for more than the strip can give: says the most it can have', () => {
    const answer = unsolved(sectionOf({ features: [trench(40, 1000)] }))
    // Drawn down to the base: K·h²/2 over 40 m and over 60 m.
    expect(answer.canGive?.of).toBe('features.t')
    expect(answer.canGive?.rate).toBeCloseTo((10 * 100) / 2 / 40 + (10 * 100) / 2 / 60, 8)
    expect(answer.reason[0]?.place?.x).toBe(40)
    const most = answer.canGive?.rate ?? 0
    expect(solveSteady(sectionOf({ features: [trench(40, most * 0.999)] })).status).toBe('solved')
    expect(solveSteady(sectionOf({ features: [trench(40, most * 1.001)] })).status).toBe('unsolved')
    const bank = unsolved(sectionOf({ left: inflow(0, -50) }))
    expect(bank.canGive).toEqual({ of: 'left', rate: expect.closeTo(5, 8) })
  })

  it('10: negative recharge empties a reach; the loss is cut to what comes, and said so', () => {
    const solution = solved(sectionOf({ left: water(0, 3), right: water(100, 2), recharge: [rain(0, 100, -0.2)] }))
    // U falls as w(x − a)²/2K from each bank to a dry reach.
    expect(solution.dry[0]?.from).toBeCloseTo(Math.sqrt((10 * 9) / 0.2), 1)
    expect(solution.dry[0]?.to).toBeCloseTo(100 - Math.sqrt((10 * 4) / 0.2), 1)
    expect(rate(solution, 'left')).toBeCloseTo(-0.2 * Math.sqrt((10 * 9) / 0.2), 3)
    expect(solution.balance.relative).toBeLessThan(1e-6)
    expect(solution.warnings.some(({ message }) => /Negative recharge/.test(message))).toBe(true)
  })

  it('12: along a wet slope q = K·g·slope, the reach begins where the water table meets it with equal slope, the river gets q(0+)', () => {
    const solution = solved(
      sectionOf({
        left: closed(0),
        right: water(100, 5),
        ground: [
          [0, 10],
          [100, 5],
        ],
        recharge: [rain(0, 100, 0.05)],
        surfaceSeepage: true,
      }),
    )
    // w·a = K·(10 − 0.05 a)·0.05
    const a = 5 / (0.05 + 0.025)
    expect(solution.seepage.length).toBe(1)
    expect(solution.seepage[0]?.from).toBeCloseTo(a, 2)
    expect(solution.seepage[0]?.to).toBe(100)
    expect(rate(solution, 'right')).toBeCloseTo(10 * 5 * 0.05, 3)
    expect(solution.seepage[0]?.rate).toBeCloseTo(2.5, 3)
    const g = 10 - 0.05 * a
    expect(readAt(solution, 0).head).toBeCloseTo(Math.sqrt(g * g + 0.005 * a * a), 3)
    expect(readAt(solution, 80).head).toBeCloseTo(6, 9)
  })

  it('12: a spring of no width at a low point', () => {
    const solution = solved(
      sectionOf({
        ground: [
          [0, 12],
          [50, 9],
          [100, 12],
        ],
        recharge: [rain(0, 100, 0.001)],
        surfaceSeepage: true,
      }),
    )
    expect(solution.seepage).toEqual([{ from: 50, to: 50, rate: expect.any(Number) }])
    // From each side K(10² − 9²)/2L + wL/2 with L = 50.
    expect(solution.seepage[0]?.rate).toBeCloseTo(2 * ((10 * 19) / 100 + 0.025), 6)
    expect(solution.method.kind).toBe('general')
  })

  it('13: overlapping recharge adds', () => {
    const solution = solved(sectionOf({ recharge: [rain(0, 60, 0.001), rain(40, 100, 0.002, 'r2')] }))
    expect(solution.balance.recharge).toBeCloseTo(0.06 + 0.12, 12)
    expect(readAt(solution, 60).flow - readAt(solution, 40).flow).toBeCloseTo(20 * 0.003, 10)
  })

  it('14: two features at one place, or one at a bank, are refused with a place', () => {
    expect(unsolved(sectionOf({ features: [ditch(50, 8), drain(50, 9)] })).reason[0]).toMatchObject({
      place: { x: 50 },
    })
    expect(unsolved(sectionOf({ features: [ditch(100, 8)] })).reason[0]).toMatchObject({
      path: 'features.d.x',
      place: { x: 100 },
    })
  })

  it('16: a perched bank leaks at a fixed rate and holds no level; a bed above the stage is refused', () => {
    const solution = solved(sectionOf({ left: water(0, 10, 0.02, 9), right: water(100, 5) }))
    expect(solution.exchanges[0]).toMatchObject({ state: 'perched' })
    expect(rate(solution, 'left')).toBeCloseTo(-0.02, 10)
    const joined = solved(sectionOf({ left: water(0, 10, 2, 3), right: water(100, 5) }))
    expect(rate(joined, 'left')).toBeCloseTo(-2 * (10 - readAt(joined, 0).head), 9)
    const two = sectionOf({ left: water(0, 10, 0.02, 9), right: water(100, 10, 0.02, 9) })
    const held = solved({ ...two, features: [ditch(50, 4)] })
    expect(rate(held, 'features.d')).toBeCloseTo(0.04, 9)
    const over = unsolved({ ...two, features: [trench(50, 0.05)] })
    expect(over.canGive?.rate).toBeCloseTo(0.04, 8)
    expect(unsolved(sectionOf({ left: water(0, 10, 0.02, 10.5) })).reason[0]?.path).toBe('left.bed')
  })

  it('a stage or a ditch below the base is a free outfall at the base', () => {
    for (const conductance of [null, 50]) {
      const solution = solved(sectionOf({ left: water(0, -3, conductance), recharge: [rain(0, 100, 0.001)] }))
      expect(readAt(solution, 0).saturated).toBeCloseTo(0, 6)
      expect(rate(solution, 'left')).toBeCloseTo((10 * 100) / 200 + 0.05, 5)
      const low = solved(sectionOf({ features: [ditch(40, -1, conductance)] }))
      expect(rate(low, 'features.d')).toBeCloseTo((10 * 100) / 80 + (10 * 100) / 120, 5)
    }
  })

  it('thin inflow onto a dry slope stays thin and arrives in full', () => {
    const solution = solved(
      sectionOf({
        base: [
          [0, 5],
          [100, 0],
        ],
        left: inflow(0, 1e-5),
        right: water(100, 0),
        ground: [
          [0, 9],
          [100, 9],
        ],
      }),
    )
    expect(rate(solution, 'right')).toBeCloseTo(1e-5, 12)
    expect(readAt(solution, 50).saturated).toBeCloseTo(1e-5 / (10 * 0.05), 6)
  })

  it('observations outside the strip are left out with a word; inside they are compared', () => {
    const solution = solved(
      sectionOf({
        observations: [
          { id: 'o1', x: 50, head: 9.8, sd: 0.1 },
          { id: 'o2', x: 140, head: 9 },
        ],
      }),
    )
    expect(solution.misfits).toEqual([
      {
        id: 'o1',
        name: 'o1',
        x: 50,
        observed: 9.8,
        computed: expect.closeTo(10, 9),
        residual: expect.closeTo(0.2, 9),
        sd: 0.1,
      },
    ])
    expect(solution.warnings.some(({ path }) => path === 'observations.o2.x')).toBe(true)
  })

  it('limits: the smallest margin and where, the top between nodes included', () => {
    const section = sectionOf({
      recharge: [rain(0, 100, 0.01)],
      limits: [{ id: 'l1', name: 'Cellar', from: 20, to: 80, level: 11.5, clearance: 0.5 }],
    })
    const solution = solved(section)
    const top = Math.sqrt(100 + 0.001 * 2500)
    expect(solution.limits).toEqual([
      { id: 'l1', name: 'Cellar', margin: expect.closeTo(11 - top, 9), at: expect.closeTo(50, 6), holds: true },
    ])
  })

  it('the straight line between the banks and how far the answer lies from it', () => {
    const solution = solved(sectionOf({ right: water(100, 2) }))
    expect(solution.straight.left).toBe(10)
    expect(solution.straight.right).toBe(2)
    // h² = 100 − 0.96 x is farthest from the line where its slope is −0.08: h = 6.
    expect(solution.straight.at).toBeGreaterThan(64)
    expect(solution.straight.at).toBeLessThan(69)
    expect(solution.straight.worst).toBeCloseTo(6 - (10 - 0.08 * (64 / 0.96)), 3)
  })

  it('a case has its own values, leaves out what is off, and an unknown case is refused', () => {
    const section = sectionOf({
      features: [ditch(50, 6)],
      cases: [{ id: 'wet', off: ['d'], set: { 'left.stage': 12, 'materials.sand.k': 3 } }],
    })
    const wet = solveSteady(section, { caseId: 'wet' })
    expect(wet.status === 'solved' && wet.straight.left).toBe(12)
    expect(wet.status === 'solved' && wet.exchanges.some(({ of }) => of === 'features.d')).toBe(false)
    expect(section.left.kind === 'water' && section.left.stage).toBe(10)
    expect(solveSteady(section, { caseId: 'none' }).status).toBe('unsolved')
  })

  it('gives an answer that can be copied to another thread', () => {
    const solution = solved(sectionOf({ features: [wall(40, 1, 0.1)], recharge: [rain(0, 100, 0.001)] }))
    const copy = structuredClone(solution)
    expect(readAt(copy, 63.3)).toEqual(readAt(solution, 63.3))
  })
})
