import type { Section } from '~/section'
import type { Solution } from '~/solver'

/**
 * Where heavy solving happens: in this thread or in a worker, behind one small interface. The sheet calls the solver directly
 * for every frame of a drag; this is for jobs that would hold the page up (many cases, later ranges and fits).
 */
export type Run = {
  /** As solveSteady; `caseId` null solves the section as drawn. Rejects when `close` was called or the worker broke. */
  solve(section: Section, caseId?: string | null): Promise<Solution>
  /** Ends the run; what is still being solved is rejected. */
  close(): void
}

/** What crosses to the worker and back: plain data. */
export type Job = { id: number; section: Section; caseId: string | null }
export type JobDone = { id: number; solution: Solution } | { id: number; error: string }
