import { describe, expect, it } from 'vitest'
import { sectionOf, water } from '../solver/testing'
import { mainRun } from './main'
import type { Job } from './run'
import { answer } from './solver.worker'
import { portRun } from './worker.client'

const section = sectionOf({
  left: water(0, 10),
  right: water(100, 8),
  cases: [{ id: 'dry', off: [], set: { 'left.stage': 9 } }],
})

/** A worker's port without a worker: copies as a real one does, answers later. */
function port(behave: (job: Job) => unknown = answer) {
  const target = new EventTarget()
  return {
    addEventListener: target.addEventListener.bind(target) as Worker['addEventListener'],
    postMessage(job: Job) {
      const copy = structuredClone(job)
      queueMicrotask(() => target.dispatchEvent(new MessageEvent('message', { data: structuredClone(behave(copy)) })))
    },
    terminate() {},
    fail: (message: string) => target.dispatchEvent(Object.assign(new Event('error'), { message })),
  }
}

describe('a run', () => {
  it('gives the same answer in this thread and through a port, for a case too', async () => {
    const here = mainRun()
    const there = portRun(port())
    for (const caseId of [null, 'dry']) {
      expect(await there.solve(section, caseId)).toEqual(await here.solve(section, caseId))
    }
    const drawn = await here.solve(section)
    const dry = await here.solve(section, 'dry')
    expect(drawn.status === 'solved' && dry.status === 'solved' && drawn.straight.left - dry.straight.left).toBeCloseTo(
      1,
    )
  })

  it('keeps answers apart that come back in another order', async () => {
    const held: (() => void)[] = []
    const target = new EventTarget()
    const run = portRun({
      addEventListener: target.addEventListener.bind(target) as Worker['addEventListener'],
      postMessage(job: Job) {
        held.push(() => target.dispatchEvent(new MessageEvent('message', { data: answer(job) })))
      },
      terminate() {},
    })
    const first = run.solve(section)
    const second = run.solve(section, 'dry')
    await Promise.resolve()
    for (const release of held.reverse()) release()
    expect((await first).caseId).toBe(null)
    expect((await second).caseId).toBe('dry')
  })

  it('rejects what waits when the worker breaks or the run is closed', async () => {
    const broken = port(() => ({ id: -1 }))
    const run = portRun(broken)
    const waiting = run.solve(section)
    await Promise.resolve()
    broken.fail('out of memory')
    await expect(waiting).rejects.toThrow('out of memory')
    await expect(run.solve(section)).rejects.toThrow('out of memory')
    const closed = mainRun()
    closed.close()
    await expect(closed.solve(section)).rejects.toThrow('closed')
  })
})
