import { mainRun } from './main'
import type { Job, JobDone, Run } from './run'

type Port = Pick<Worker, 'postMessage' | 'terminate' | 'addEventListener'>

/** A run over a worker's port: answers are matched to jobs by number; a worker that breaks rejects all that wait. */
export function portRun(port: Port): Run {
  const waiting = new Map<number, { resolve: (done: JobDone) => void; reject: (error: Error) => void }>()
  let next = 1
  let broken: Error | null = null
  const end = (error: Error) => {
    broken = error
    for (const { reject } of waiting.values()) reject(error)
    waiting.clear()
  }
  port.addEventListener('message', (event) => {
    const done = (event as MessageEvent<JobDone>).data
    waiting.get(done.id)?.resolve(done)
    waiting.delete(done.id)
  })
  port.addEventListener('error', (event) =>
    end(new Error((event as ErrorEvent).message || 'The solver stopped working.')),
  )
  port.addEventListener('messageerror', () => end(new Error('An answer of the solver could not be read.')))
  return {
    async solve(section, caseId = null) {
      if (broken) throw broken
      const job: Job = { id: next++, section, caseId }
      const done = await new Promise<JobDone>((resolve, reject) => {
        waiting.set(job.id, { resolve, reject })
        port.postMessage(job)
      })
      if ('error' in done) throw new Error(done.error)
      return done.solution
    },
    close() {
      end(new Error('This run was closed.'))
      port.terminate()
    },
  }
}

/** Solves in a module worker; where there are none (old browsers, tests) in this thread. */
export function workerRun(): Run {
  if (typeof Worker === 'undefined') return mainRun()
  return portRun(new Worker(new URL('./solver.worker.ts', import.meta.url), { type: 'module', name: 'doab-solver' }))
}
