import type { Section } from '~/section'
import { sectionOf } from '../inside/stack'
import type { FootingLine, Solution } from '../types'
import { ends, length, outletFace, rechargeAgainstK, slope } from './flow'
import { penetration, perching, staysBetween, steepSheets, usual } from './ground'
import { unsourced } from './sources'
import { type Ground, rowAlong } from './types'

/**
 * The assumptions the answer stands on, and how firmly (METHODS §4): each with its number for this section, the bound, the
 * bound's source, a verdict and a place. An unsolved section has only the lines that need no answer.
 */
export function footing(section: Section, solution: Solution): FootingLine[] {
  if (solution.status !== 'solved') return [unsourced(section)]
  const ground: Ground = { section: sectionOf(solution) ?? section, solution, row: rowAlong(solution) }
  const lines: (FootingLine | null)[] = [
    slope(ground),
    rechargeAgainstK(ground),
    ends(ground),
    length(ground),
    outletFace(ground),
    penetration(ground),
    ...staysBetween(ground),
    perching(ground),
    steepSheets(ground),
    ...usual(ground),
    unsourced(section),
  ]
  return lines.filter((line): line is FootingLine => line !== null)
}
