import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { Section } from '~/section'
import { readAt, solveSteady } from '../index'
import { drawable } from '../testing/arbitrary'
import { plainTransmissivity, reference } from '../testing/reference'

/** Sections of every family whose water table is wet throughout and below the ground, where shooting is possible. */
function candidates(count: number): { section: Section; family: string }[] {
  const found: { section: Section; family: string }[] = []
  const perFamily = new Map<string, number>()
  for (const drawn of fc.sample(drawable, { numRuns: 1500, seed: 20_261_201 })) {
    const section: Section = {
      ...drawn,
      surfaceSeepage: false,
      features: drawn.features.filter((f) => f.kind === 'wall' || f.kind === 'trench' || f.conductance !== null),
    }
    const solution = solveSteady(section)
    if (solution.status !== 'solved' || solution.dry.length > 0) continue
    const thinnest = Math.min(...solution.profile.saturated)
    const highest = Math.max(...solution.profile.saturated)
    const heads = solution.profile.head
    // Still water would only compare rounding.
    if (thinnest < 0.3 || highest > 60 || Math.max(...heads) - Math.min(...heads) < 0.02) continue
    const family = [
      solution.method.kind,
      section.left.kind,
      section.right.kind,
      section.base.length > 2 ? 'broken' : 'plain',
      section.bodies.length > 0 ? 'bodies' : 'one',
      section.features.map(({ kind }) => kind[0]).sort()[0] ?? '-',
    ].join(' ')
    if ((perFamily.get(family) ?? 0) >= 2) continue
    perFamily.set(family, (perFamily.get(family) ?? 0) + 1)
    found.push({ section, family })
    if (found.length >= count) break
  }
  return found
}

describe('against a general-purpose integrator (odex, shooting)', () => {
  it('agrees on heads within 0.1 % of their range and on flows within 0.2 %, for at least 50 sections of all families', () => {
    const compared: string[] = []
    const wrong: string[] = []
    for (const { section, family } of candidates(70)) {
      const solution = solveSteady(section)
      if (solution.status !== 'solved') continue
      const first = readAt(solution, section.left.x)
      const held = section.left.kind === 'water' && section.left.conductance === null
      const centre = held ? first.flow : first.head
      // The bracket is wide and lopsided, so that the reference has to find the answer by itself.
      const most = Math.max(...solution.profile.flow.map(Math.abs), 1e-6)
      const wide = held ? most : 2
      const answer = reference(section, centre - wide, centre + 1.37 * wide)
      if (!answer) continue
      const heads = [...solution.profile.head]
      const range = Math.max(...heads) - Math.min(...heads)
      const flowScale = Math.max(...solution.profile.flow.map(Math.abs))
      let head = 0
      let flow = 0
      for (const point of answer.at) {
        const ours = readAt(solution, point.x)
        head = Math.max(head, Math.abs((ours.left?.head ?? ours.head) - point.head))
        flow = Math.max(flow, Math.abs((ours.left?.flow ?? ours.flow) - point.flow))
      }
      compared.push(family)
      if (head > Math.max(1e-3, 1e-3 * range) || flow > 2e-3 * flowScale + 1e-9)
        wrong.push(`${family}: head ${head} of ${range}, flow ${flow} of ${flowScale}`)
    }
    expect(wrong).toEqual([])
    expect(compared.length).toBeGreaterThanOrEqual(50)
    expect(new Set(compared).size).toBeGreaterThanOrEqual(25)
  }, 60_000)

  it('reads the same transmissivity from the drawing as a vertical ray does', () => {
    fc.assert(
      fc.property(drawable, fc.noBias(fc.integer({ min: 1, max: 999_999 })), (section, at) => {
        const solution = solveSteady(section)
        if (solution.status !== 'solved') return
        const { profile } = solution
        const i = Math.floor((at / 1_000_000) * profile.x.length)
        const x = profile.x[i] ?? 0
        const inside = solution.inner.ground.x.every((b) => Math.abs(b - x) > 1e-6)
        if (!inside) return
        const plain = plainTransmissivity(section, x, profile.head[i] ?? 0)
        expect(profile.transmissivity[i]).toBeCloseTo(plain, 6)
      }),
      { numRuns: 400 },
    )
  }, 60_000)
})
