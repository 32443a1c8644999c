import { describe, expect, it } from 'vitest'
import { createLive, readLive } from '~/live'
import { parseSection, type Section } from '~/section'
import { readAt, type Solved, solveSteady } from '~/solver'
import demo from './people.json'
import { brookToCanal } from './sections/brook-to-canal'
import { cutOffWall } from './sections/cut-off-wall'
import { drainedField } from './sections/drained-field'
import { gainingAndLosing } from './sections/gaining-and-losing'
import { siltAndCellar } from './sections/silt-and-cellar'
import { wholeValley } from './sections/whole-valley'
import { SITES } from './sites'

const all = SITES.flatMap(({ sections }) => sections.map(({ section }): Section => section))

function solved(section: Section, caseId: string | null = null): Solved {
  const solution = solveSteady(section, { caseId })
  if (solution.status !== 'solved') throw new Error(`${section.title}, ${caseId}: ${solution.mend}`)
  return solution
}
const rate = (solution: Solved, of: string) => {
  const found = solution.exchanges.find((exchange) => exchange.of === of)
  if (!found) throw new Error(`the answer has no ${of}`)
  return found.rate
}
const margin = (solution: Solved, id: string) => {
  const found = solution.limits.find((limit) => limit.id === id)
  if (!found) throw new Error(`the answer has no limit ${id}`)
  return found.margin
}

describe('every section of the demo', () => {
  for (const section of all)
    describe(section.title, () => {
      it('passes the reader of sections and comes out of a live document as it went in', () => {
        expect(parseSection(section)).toMatchObject({ ok: true })
        expect(readLive(createLive(section))).toMatchObject({ section, problems: [] })
      })
      it('is solved as drawn and in every case, with its water balanced', () => {
        for (const caseId of [null, ...section.cases.map(({ id }) => id)])
          expect(solved(section, caseId).balance.relative).toBeLessThan(1e-9)
      })
      it('was observed where the answer has it, within two standard deviations and not on it', () => {
        const answer = solved(section)
        for (const { x, head, sd, name } of section.observations) {
          const off = Math.abs(readAt(answer, x).head - head)
          expect(off, name).toBeLessThan(2 * (sd ?? 0))
          expect(off, name).toBeGreaterThan(0.001)
        }
      })
      it('knows pores and layers of every material, and where its numbers come from', () => {
        for (const { porosity, anisotropy } of section.materials) {
          expect(porosity).toBeGreaterThan(0)
          expect(anisotropy).toBeGreaterThan(0)
        }
        expect(Object.keys(section.sources).length).toBeGreaterThan(3)
      })
    })
})

describe('what each section is there to show', () => {
  it('1: a mound with one divide inside, moved by the wet spring, and both waters gaining', () => {
    const answer = solved(brookToCanal)
    expect(answer.divides).toHaveLength(1)
    expect(answer.divides[0]?.kind).toBe('divide')
    expect(rate(answer, 'left')).toBeGreaterThan(0)
    expect(rate(answer, 'right')).toBeGreaterThan(0)
    expect(answer.highest.head).toBeGreaterThan(13.3)
    expect(solved(brookToCanal, 'wet').highest.head).toBeGreaterThan(answer.highest.head + 0.3)
  })
  it('2: a canal that loses and a river that gains', () => {
    const answer = solved(gainingAndLosing)
    expect(rate(answer, 'left')).toBeLessThan(0)
    expect(rate(answer, 'right')).toBeGreaterThan(0)
    expect(rate(answer, 'features.back')).toBeGreaterThan(0)
    expect(rate(solved(gainingAndLosing, 'relined'), 'left')).toBeGreaterThan(rate(answer, 'left'))
  })
  it('3: silt that keeps the water within the clearance of the cellar, until the leat is lowered', () => {
    expect(margin(solved(siltAndCellar), 'cellar')).toBeLessThan(0)
    expect(margin(solved(siltAndCellar, 'leat'), 'cellar')).toBeGreaterThan(0)
    // Without the silt the floor would be dry: it is the silt that does it.
    expect(margin(solved({ ...siltAndCellar, bodies: [], sources: {} }), 'cellar')).toBeGreaterThan(0)
  })
  it('4: water at the surface of the hollow in spite of the drain, and none in summer', () => {
    const answer = solved(drainedField)
    expect(rate(answer, 'features.tile')).toBeGreaterThan(0)
    expect(answer.seepage.length).toBeGreaterThan(0)
    expect(answer.seepage[0]?.from).toBeGreaterThan(55)
    expect(answer.seepage[0]?.to).toBeLessThan(85)
    expect(solved(drainedField, 'summer').seepage).toEqual([])
  })
  it('5: nothing through the rock, a step of head at the wall, and a cutting that floods without the pump', () => {
    const answer = solved(cutOffWall)
    expect(rate(answer, 'left')).toBe(0)
    expect(rate(answer, 'features.trench')).toBeCloseTo(0.22, 12)
    const wall = answer.exchanges.find(({ of }) => of === 'features.wall')
    const [inside = 0, outside = 0] = Array.isArray(wall?.head) ? wall.head : []
    expect(outside - inside).toBeGreaterThan(0.5)
    expect(margin(answer, 'formation')).toBeGreaterThan(0)
    expect(margin(solved(cutOffWall, 'still'), 'formation')).toBeLessThan(0)
  })
  it('6: a large section with everything in it, whose fill gets wet in a wet spring', () => {
    expect(wholeValley.ground.length).toBeGreaterThanOrEqual(40)
    expect(wholeValley.base.length).toBeGreaterThanOrEqual(40)
    expect(wholeValley.bodies.length).toBeGreaterThanOrEqual(8)
    const answer = solved(wholeValley)
    expect(answer.divides.length).toBeGreaterThan(0)
    expect(margin(answer, 'liner')).toBeGreaterThan(0)
    expect(margin(solved(wholeValley, 'wet'), 'liner')).toBeLessThan(0)
  })
})

it('names only people the demo has', () => {
  const known = demo.people.map(({ email }) => email)
  for (const { owner, sections } of SITES)
    for (const email of [owner, ...sections.map(({ by }) => by)]) expect(known).toContain(email)
})
