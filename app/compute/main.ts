import { solveSteady } from '~/solver'
import type { Run } from './run'

/** Solves in this thread, after letting what is waiting (a frame, a request) go first. */
export function mainRun(): Run {
  let open = true
  return {
    async solve(section, caseId = null) {
      await Promise.resolve()
      if (!open) throw new Error('This run was closed.')
      return solveSteady(section, { caseId })
    },
    close() {
      open = false
    },
  }
}
