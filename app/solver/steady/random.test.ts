import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { readAt, solveSteady } from '../index'
import { drawable } from '../testing/arbitrary'

describe('whatever can be drawn', () => {
  it('solves 10,000 random sections, or says why not: no exception, no NaN, no balance left open, no unreported failure', () => {
    let solved = 0
    let exact = 0
    let seeping = 0
    let dry = 0
    const wrong: string[] = []
    fc.sample(drawable, { numRuns: 10_000, seed: 41 }).forEach((section, i) => {
      const solution = solveSteady(section)
      if (solution.status === 'unsolved') {
        // "Did not close" would be our failure, not the drawing's.
        if (
          solution.reason.length === 0 ||
          solution.mend === '' ||
          solution.reason.some(({ message }) => /close/.test(message))
        )
          wrong.push(`${i}: ${JSON.stringify(solution.reason)}`)
        return
      }
      solved++
      if (solution.method.kind === 'exact') exact++
      if (solution.seepage.length > 0) seeping++
      if (solution.dry.length > 0) dry++
      const { profile, balance, seepage, error } = solution
      for (const values of Object.values(profile)) if (!values.every(Number.isFinite)) wrong.push(`${i}: not a number`)
      if (!(balance.relative <= 1e-6)) wrong.push(`${i}: balance ${balance.relative}`)
      if (seepage.some(({ rate, from, to }) => rate < -1e-9 || to < from)) wrong.push(`${i}: seepage turned around`)
      if (section.surfaceSeepage && profile.head.some((h, n) => h > (profile.ground[n] ?? 0) + 1e-6))
        wrong.push(`${i}: water above the ground`)
      const range = Math.max(...profile.head) - Math.min(...profile.head)
      const admits = solution.warnings.some(({ message }) => /may be off/.test(message))
      if (!admits && !(error.head <= Math.max(1e-3, 1e-3 * range))) wrong.push(`${i}: error ${error.head} of ${range}`)
      const reading = readAt(solution, section.right.x * 0.37)
      if (!Number.isFinite(reading.head + reading.flow + reading.straight)) wrong.push(`${i}: reading`)
    })
    expect(wrong.slice(0, 20)).toEqual([])
    // The run must have met every kind of answer, or it proves little.
    expect(solved).toBeGreaterThan(7000)
    for (const count of [exact, seeping, dry]) expect(count).toBeGreaterThan(500)
  }, 120_000)
})
