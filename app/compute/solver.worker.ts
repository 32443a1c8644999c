import { solveSteady } from '~/solver'
import type { Job, JobDone } from './run'

/** The worker's side: one job in, one answer out. Typed arrays are copied, not handed over, so nothing here is lost. */
export function answer(job: Job): JobDone {
  try {
    return { id: job.id, solution: solveSteady(job.section, { caseId: job.caseId }) }
  } catch (error) {
    return { id: job.id, error: error instanceof Error ? error.message : String(error) }
  }
}

// A page or a test that imports this file has no worker scope, and only `answer`.
if (typeof self !== 'undefined' && typeof window === 'undefined' && typeof self.postMessage === 'function') {
  self.addEventListener('message', (event: MessageEvent<Job>) => self.postMessage(answer(event.data)))
}
