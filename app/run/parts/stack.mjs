import { takeLock } from './lock.mjs'
import { startMariadb } from './mariadb.mjs'
import { places } from './places.mjs'
import { mustBeFree } from './ports.mjs'
import { complain, Failure, say } from './say.mjs'
import { readSecrets } from './secrets.mjs'
import { childEnv, readSettings, signingSecrets } from './settings.mjs'

/** How often a program that ended by its own fault is started again before everything stops. */
const LIVES = 3
const SPAN = 60_000

/** @typedef {import('./processes.mjs').Started} Started */

/**
 * What `npm start` and `npm run dev` share: the lock on the data folder, the settings, the database, the end of everything.
 *
 * @param {'production' | 'development'} mode
 * @param {(stack: { settings: import('./settings.mjs').Settings, env: NodeJS.ProcessEnv, own: boolean, logs: string, root: string,
 *   keep: (start: () => Started) => Started }) => Promise<void>} work starts the programs with `keep`
 * @returns {Promise<number>} the exit code, once everything has stopped
 */
export async function runStack(mode, work) {
  const settings = readSettings()
  const here = places()
  const lock = await takeLock(here.lock, settings.appUrl, here.root)
  /** @type {Started[]} */
  const running = []
  /** @type {Awaited<ReturnType<typeof startMariadb>> | null} */
  let database = null

  /** @type {(code: number) => void} */
  let finish = () => {}
  /** @type {Promise<number>} */
  const finished = new Promise((resolve) => {
    finish = resolve
  })
  let stopping = false
  const end = (/** @type {number} */ code) => {
    if (!stopping) lock.stopping()
    stopping = true
    finish(code)
  }
  for (const signal of /** @type {const} */ (['SIGINT', 'SIGTERM', 'SIGHUP'])) process.on(signal, () => end(0))

  /** @param {() => Started} start @returns {Started} */
  const keep = (start) => {
    /** @type {number[]} */
    const falls = []
    const run = () => {
      if (stopping) throw new Failure('Stopped before everything was up.')
      const program = start()
      running.push(program)
      program.ended.then(({ code, signal }) => {
        running.splice(running.indexOf(program), 1)
        if (stopping) return
        const now = Date.now()
        falls.push(now)
        const often = falls.filter((at) => now - at < SPAN).length >= LIVES
        // Somebody killed it: they want to see it end. It fell over by itself: bring it back, unless it keeps falling.
        if (signal || often) {
          complain(
            `${program.name} ended (${signal ?? `code ${code}`}); stopping the rest. Stored work is safe: npm start brings it back.`,
          )
          end(1)
        } else {
          complain(`${program.name} ended with code ${code}; starting it again.`)
          run()
        }
      })
      return program
    }
    return run()
  }

  try {
    await mustBeFree('PORT', settings.port, 'the web app')
    await mustBeFree('REALTIME_PORT', settings.realtimePort, 'the live connection')
    const made = readSecrets(here.secrets)
    const secrets = signingSecrets(settings, made)
    let url = settings.database
    if (!url) {
      database = await startMariadb({ ...here, password: made.database, rootPassword: made.databaseRoot })
      database.onEnd((why) => {
        if (stopping) return
        complain(`${why}; stopping the rest. Stored work is safe: npm start brings it back.`)
        end(1)
      })
      url = database.url
    }
    const env = childEnv(settings, { url, secrets, folder: here.root, mode })
    const started = work({ settings, env, own: !settings.database, logs: here.log, root: here.root, keep })
    // Ctrl-C may come while still starting; a failure to start is thrown on.
    started.catch(() => {})
    await Promise.race([finished, started])
    const code = await finished
    say('Stopping …')
    return code
  } finally {
    end(1)
    await Promise.all(running.map((program) => program.stop()))
    await database?.stop()
    lock.release()
  }
}
