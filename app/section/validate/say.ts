import { LIMITS } from '../rules/limits'
import type { Problem } from '../types'

export type Say = (path: string, message: string, place?: Problem['place']) => void

/** Gathers problems up to a number that a person could still read. */
export function listener(): { problems: Problem[]; say: Say } {
  const problems: Problem[] = []
  return {
    problems,
    say: (path, message, place) => {
      if (problems.length < LIMITS.problems) problems.push(place ? { path, message, place } : { path, message })
    },
  }
}
