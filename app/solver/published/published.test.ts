import { describe, expect, it } from 'vitest'
import { published } from './all'
import { caseTitle } from './types'

describe('published and derived values', () => {
  for (const example of published) {
    it(`${caseTitle(example)}: ${example.source}`, () => {
      const rows = example.compare()
      expect(rows.length).toBeGreaterThan(0)
      for (const { name, theirs, tolerance, ours } of rows) {
        expect(Math.abs(ours - theirs), `${name}: ours ${ours}, theirs ${theirs}`).toBeLessThanOrEqual(
          tolerance * (1 + 1e-9),
        )
      }
    })
  }
})
