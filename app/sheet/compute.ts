import type { LiveSection } from '~/live'
import { applyCase, type Problem, type Section } from '~/section'
import { type FootingLine, footing, type Reading, readAt, type Solution, solveSteady } from '~/solver'

/** The answer of a section in a case, with its own problems. */
export type Answer = { solution: Solution; problems: Problem[] }

/** Solves in the page: a millisecond or two for usual sections, so that it can follow a drag frame by frame. */
export function answerOf(section: Section, caseId: string | null): Answer {
  const solution = solveSteady(section, { caseId })
  return { solution, problems: problemsOf(solution) }
}
export const problemsOf = (solution: Solution): Problem[] =>
  solution.status === 'solved' ? solution.warnings : [...solution.reason, ...solution.warnings]

/** What the answer stands on. Costs as much as solving, and nobody reads verdicts sixty times a second: asked for less often. */
export const footingOf = (section: Section, caseId: string | null, solution: Solution): FootingLine[] =>
  footing(applyCase(section, caseId), solution)

/** Answer and footing at once, for a sheet that stands still. */
export function solveHere(section: Section, caseId: string | null): Answer & { footing: FootingLine[] } {
  const answer = answerOf(section, caseId)
  return { ...answer, footing: footingOf(section, caseId, answer.solution) }
}

/**
 * The drawing's problems first (they often cause the others), each told once. `before` comes back when nothing has changed, so
 * that a list of problems is not drawn anew with every frame of a drag.
 */
export function gatherProblems(
  live: LiveSection,
  { problems }: { problems: Problem[] },
  before?: Problem[],
): Problem[] {
  const seen = new Set<string>()
  const all = [...live.problems, ...problems].filter((problem) => {
    const key = `${problem.path}\n${problem.message}`
    if (seen.has(key)) return false
    seen.add(key)
    return true
  })
  const same =
    before?.length === all.length && all.every((problem, i) => JSON.stringify(problem) === JSON.stringify(before[i]))
  return same && before ? before : all
}

/** Reading at x, or null where there is none: no line, no answer, or outside the strip. */
export function readingAt(solution: Solution, x: number | null): Reading | null {
  if (x === null || solution.status !== 'solved') return null
  if (x < solution.left || x > solution.right) return null
  return readAt(solution, x)
}
