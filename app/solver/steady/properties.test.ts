import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { Bank, Point, Section } from '~/section'
import { readAt, type Solved, solveSteady } from '../index'
import { rain, sectionOf, water } from '../testing'
import { drawable, level } from '../testing/arbitrary'

const rangeOf = (solution: Solved): number => Math.max(...solution.profile.head) - Math.min(...solution.profile.head)
const places = (section: Section, count = 21): number[] =>
  Array.from({ length: count }, (_, i) => section.left.x + ((section.right.x - section.left.x) * (i + 0.5)) / count)

/** Solves both or skips the sample: what has no answer has none to compare. */
function both(a: Section, b: Section, options = {}): [Solved, Solved] | null {
  const first = solveSteady(a, options)
  const second = solveSteady(b, options)
  return first.status === 'solved' && second.status === 'solved' ? [first, second] : null
}

function mirrored(section: Section): Section {
  const flip = (x: number) => section.left.x + section.right.x - x
  const line = (points: Point[]): Point[] => points.map(([x, z]): Point => [flip(x), z]).reverse()
  return {
    ...section,
    ground: line(section.ground),
    base: line(section.base),
    left: { ...section.right, x: section.left.x } as Bank,
    right: { ...section.left, x: section.right.x } as Bank,
    bodies: section.bodies.map((body) => ({ ...body, outline: line(body.outline) })),
    recharge: section.recharge.map((zone) => ({ ...zone, from: flip(zone.to), to: flip(zone.from) })),
    features: section.features.map((feature) => ({ ...feature, x: flip(feature.x) })),
  }
}

function scaled(section: Section, c: number): Section {
  const bank = (one: Bank): Bank =>
    one.kind === 'inflow'
      ? { ...one, rate: one.rate * c }
      : one.kind === 'water' && one.conductance !== null
        ? { ...one, conductance: one.conductance * c }
        : one
  return {
    ...section,
    left: bank(section.left),
    right: bank(section.right),
    materials: section.materials.map((material) => ({ ...material, k: material.k * c })),
    recharge: section.recharge.map((zone) => ({ ...zone, rate: zone.rate * c })),
    features: section.features.map((feature) => {
      if (feature.kind === 'trench') return { ...feature, rate: feature.rate * c }
      if (feature.kind === 'wall') return { ...feature, k: feature.k * c }
      return feature.conductance === null ? feature : { ...feature, conductance: feature.conductance * c }
    }),
  }
}

describe('properties of every answer', () => {
  it('closes the water balance to 1e-6 of the total', () => {
    fc.assert(
      fc.property(drawable, (section) => {
        const solution = solveSteady(section)
        if (solution.status === 'solved') expect(solution.balance.relative).toBeLessThanOrEqual(1e-6)
      }),
      { numRuns: 400, endOnFailure: true },
    )
  })

  it('is the same seen in a mirror', () => {
    fc.assert(
      fc.property(drawable, (section) => {
        const pair = both(section, mirrored(section))
        if (!pair) return
        const [ours, theirs] = pair
        const most = Math.max(1e-3, 1e-3 * rangeOf(ours))
        for (const x of places(section)) {
          const there = readAt(theirs, section.left.x + section.right.x - x)
          expect(Math.abs(readAt(ours, x).head - there.head)).toBeLessThanOrEqual(most)
        }
      }),
      { numRuns: 300, endOnFailure: true },
    )
  })

  it('keeps its heads when conductivities, recharge and flows are scaled together', () => {
    fc.assert(
      fc.property(drawable, fc.constantFrom(0.01, 0.5, 3, 200), (section, c) => {
        const pair = both(section, scaled(section, c))
        if (!pair) return
        const [ours, theirs] = pair
        const most = Math.max(1e-3, 1e-3 * rangeOf(ours))
        for (const x of places(section)) {
          expect(Math.abs(readAt(ours, x).head - readAt(theirs, x).head)).toBeLessThanOrEqual(most)
        }
        const flow = Math.max(...ours.profile.flow.map(Math.abs))
        for (const [i, exchange] of ours.exchanges.entries()) {
          const other = theirs.exchanges.find(({ of }) => of === exchange.of)
          if (!other || exchange.of.startsWith('seepage')) continue
          expect(Math.abs((ours.exchanges[i]?.rate ?? 0) * c - other.rate)).toBeLessThanOrEqual(2e-3 * flow * c + 1e-12)
        }
      }),
      { numRuns: 300, endOnFailure: true },
    )
  })

  it('never stands lower for a higher stage or more recharge (same mesh)', () => {
    fc.assert(
      fc.property(drawable, fc.boolean(), (section, byStage) => {
        const raised: Section = byStage
          ? {
              ...section,
              surfaceSeepage: false,
              right:
                section.right.kind === 'water' ? { ...section.right, stage: section.right.stage + 0.3 } : section.right,
            }
          : { ...section, recharge: section.recharge.map((zone) => ({ ...zone, rate: zone.rate + 0.0005 })) }
        const pair = both(byStage ? { ...section, surfaceSeepage: false } : section, raised, { nodes: 60 })
        if (!pair) return
        const [low, high] = pair
        // Where hardly any water is left the closing of the balance decides the last millionths of the head.
        const slack = Math.max(1e-6, 1e-5 * rangeOf(low))
        for (let i = 0; i < low.inner.h.length; i++) {
          expect(high.inner.h[i] ?? 0).toBeGreaterThanOrEqual((low.inner.h[i] ?? 0) - slack)
        }
      }),
      { numRuns: 400, endOnFailure: true },
    )
  })

  it('agrees with itself: exact and general paths to 1e-8 of the head range', () => {
    let compared = 0
    fc.assert(
      fc.property(level, (section) => {
        const exact = solveSteady(section)
        if (exact.status !== 'solved' || exact.method.kind !== 'exact') return
        const general = solveSteady(section, { path: 'general' })
        expect(general.status).toBe('solved')
        if (general.status !== 'solved') return
        compared++
        const most = 1e-8 * Math.max(rangeOf(exact), 1e-2)
        for (const x of places(section)) {
          expect(Math.abs(readAt(exact, x).head - readAt(general, x).head)).toBeLessThanOrEqual(most)
        }
      }),
      { numRuns: 300, endOnFailure: true },
    )
    expect(compared).toBeGreaterThan(100)
  })
})

describe('one material over a level base', () => {
  const span = (min: number, max: number) => fc.noBias(fc.double({ min, max, noNaN: true }))
  const strip = (h1: number, h2: number, k: number, w: number, length: number) =>
    sectionOf({
      left: water(0, h1),
      right: water(length, h2),
      ground: [
        [0, 100],
        [length, 100],
      ],
      base: [
        [0, 0],
        [length, 0],
      ],
      materials: [{ id: 'sand', k }],
      recharge: w === 0 ? [] : [rain(0, length, w)],
    })

  it('gives the closed forms of profile, flow and divide', () => {
    fc.assert(
      fc.property(span(1, 20), span(1, 20), span(0.1, 50), span(0, 0.005), span(10, 2000), (h1, h2, k, w, length) => {
        const solution = solveSteady(strip(h1, h2, k, w, length))
        expect(solution.status).toBe('solved')
        if (solution.status !== 'solved') return
        for (const share of [0, 0.1, 0.37, 0.5, 0.93, 1]) {
          const x = share * length
          const h = Math.sqrt(h1 ** 2 - ((h1 ** 2 - h2 ** 2) * x) / length + (w / k) * (length - x) * x)
          const q = (k * (h1 ** 2 - h2 ** 2)) / (2 * length) - w * (length / 2 - x)
          expect(readAt(solution, x).head).toBeCloseTo(h, 9)
          expect(readAt(solution, x).flow).toBeCloseTo(q, 9)
        }
        const divide = length / 2 - ((k / w) * (h1 ** 2 - h2 ** 2)) / (2 * length)
        if (w > 1e-5 && divide > 1e-6 * length && divide < (1 - 1e-6) * length) {
          expect(solution.divides.length).toBe(1)
          expect(solution.divides[0]?.from).toBeCloseTo(divide, 5)
        }
      }),
      { numRuns: 200 },
    )
  })

  it('is exact at the nodes of any mesh (mid-point scheme)', () => {
    fc.assert(
      fc.property(span(1, 20), span(1, 20), span(0, 0.005), fc.integer({ min: 2, max: 40 }), (h1, h2, w, nodes) => {
        const solution = solveSteady(strip(h1, h2, 10, w, 100), { nodes })
        expect(solution.status).toBe('solved')
        if (solution.status !== 'solved') return
        const { net, h } = solution.inner
        net.x.forEach((x, i) => {
          const exact = Math.sqrt(h1 ** 2 - ((h1 ** 2 - h2 ** 2) * x) / 100 + (w / 10) * (100 - x) * x)
          expect(Math.abs((h[i] ?? 0) - exact)).toBeLessThanOrEqual(1e-9)
        })
      }),
      { numRuns: 100 },
    )
  })

  it('adds up in U = h²/2 on the exact path', () => {
    const u = (solution: Solved, x: number) => readAt(solution, x).head ** 2 / 2
    fc.assert(
      fc.property(span(2, 20), span(2, 20), span(0, 0.004), span(0, 0.004), (h1, h2, w1, w2) => {
        const answer = (a: number, b: number, w: number) => {
          const solution = solveSteady(strip(a, b, 10, w, 200))
          if (solution.status !== 'solved') throw new Error('no answer')
          return solution
        }
        const plain = answer(h1, h2, 0)
        const first = answer(h1, h2, w1)
        const second = answer(h1, h2, w2)
        const sum = answer(h1, h2, w1 + w2)
        for (const x of [13, 100, 171]) {
          expect(u(sum, x) - u(plain, x)).toBeCloseTo(u(first, x) - u(plain, x) + u(second, x) - u(plain, x), 7)
        }
      }),
      { numRuns: 100 },
    )
  })
})

describe('the general path', () => {
  it('converges with the second order of the mesh', () => {
    const sections = [
      sectionOf({
        left: water(0, 14),
        right: water(500, 6),
        base: [
          [0, 5],
          [180, 4],
          [320, 0.5],
          [500, 0],
        ],
        ground: [
          [0, 30],
          [500, 30],
        ],
        recharge: [rain(0, 300, 0.002)],
      }),
      sectionOf({
        left: water(0, 14),
        right: { kind: 'no-flow', x: 500 },
        base: [
          [0, 0],
          [500, 6],
        ],
        ground: [
          [0, 30],
          [500, 30],
        ],
        materials: [
          { id: 'sand', k: 10 },
          { id: 'wedge', k: 0.3 },
        ],
        bodies: [
          {
            id: 'b',
            material: 'wedge',
            outline: [
              [100, 3],
              [400, 8],
              [400, 9.5],
              [100, 9],
            ],
          },
        ],
        recharge: [rain(0, 500, 0.001)],
      }),
    ]
    for (const section of sections) {
      const read = (nodes: number) => {
        const solution = solveSteady(section, { nodes })
        if (solution.status !== 'solved') throw new Error('no answer')
        return places(section, 199).map((x) => readAt(solution, x).head)
      }
      const best = read(12_000)
      const errors = [40, 160, 640].map((nodes) => Math.max(...read(nodes).map((h, i) => Math.abs(h - (best[i] ?? 0)))))
      for (let i = 1; i < errors.length; i++) {
        const order = Math.log((errors[i - 1] ?? 1) / (errors[i] ?? 1)) / Math.log(4)
        expect(order).toBeGreaterThan(1.7)
      }
    }
  })
})
