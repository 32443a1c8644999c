import { existsSync, mkdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import path from 'node:path'
import { setTimeout as wait } from 'node:timers/promises'
import { Failure } from './say.mjs'

/** @typedef {{ pid: number, state: 'running' | 'stopping', address: string }} Held */

/** @param {number} pid */
function isStarter(pid) {
  try {
    return /app\/run\/\w+\.mjs/.test(readFileSync(`/proc/${pid}/cmdline`, 'utf8'))
  } catch {
    return false
  }
}

/** @param {string} file @returns {Held | null} */
function held(file) {
  if (!existsSync(file)) return null
  try {
    const lock = JSON.parse(readFileSync(file, 'utf8'))
    return isStarter(lock.pid) ? lock : null
  } catch {
    return null
  }
}

/**
 * Takes a data folder for this process: two databases on one folder would spoil it. Waits for a start that is just stopping;
 * refuses beside one that runs. A lock whose process is gone does not count.
 * @param {string} file @param {string} address where this start will answer @param {string} folder
 */
export async function takeLock(file, address, folder) {
  mkdirSync(path.dirname(file), { recursive: true, mode: 0o700 })
  const mine = (/** @type {Held['state']} */ state) => JSON.stringify({ pid: process.pid, state, address })
  // A moment's patience: after a kill the earlier start may not have noticed yet that it must stop.
  let until = Date.now() + 1_500
  for (;;) {
    const other = held(file)
    if (!other) {
      rmSync(file, { force: true })
      try {
        writeFileSync(file, mine('running'), { flag: 'wx' })
        break
      } catch {
        continue
      }
    }
    if (other.state === 'stopping') until = Math.max(until, Date.now() + 500)
    if (Date.now() > until)
      throw new Failure(
        `Doab already runs from ${folder} (process ${other.pid}) at ${other.address}. Use that one or stop it; for a second server set DOAB_VAR, PORT and REALTIME_PORT.`,
      )
    await wait(100)
  }
  return {
    stopping: () => writeFileSync(file, mine('stopping')),
    release: () => rmSync(file, { force: true }),
  }
}
