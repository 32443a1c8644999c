import type { LiveSection } from '~/live'
import { applyCase, type Problem, type Section } from '~/section'
import { type FootingLine, footing, type Reading, readAt, type Solution, solveSteady } from '~/solver'

/** What is worked out from the drawing: for the case shown. */
export type Answer = { solution: Solution; footing: FootingLine[]; problems: Problem[] }

/** How the sheet solves; a test puts its own in. */
export type Solve = (section: Section, caseId: string | null) => Answer

/** Solves in the page. A frame of a drag costs a millisecond or two for usual sections. */
export const solveHere: Solve = (section, caseId) => {
  const solution = solveSteady(section, { caseId })
  const shown = applyCase(section, caseId)
  return {
    solution,
    footing: footing(shown, solution),
    problems: solution.status === 'solved' ? solution.warnings : [...solution.reason, ...solution.warnings],
  }
}

/** The drawing's problems first (they often cause the others), each told once. */
export function gatherProblems(live: LiveSection, answer: Answer): Problem[] {
  const seen = new Set<string>()
  return [...live.problems, ...answer.problems].filter((problem) => {
    const key = `${problem.path}\n${problem.message}`
    if (seen.has(key)) return false
    seen.add(key)
    return true
  })
}

/** Reading at x, or null where there is none: no line, no answer, or outside the strip. */
export function readingAt(solution: Solution, x: number | null): Reading | null {
  if (x === null || solution.status !== 'solved') return null
  if (x < solution.left || x > solution.right) return null
  return readAt(solution, x)
}
