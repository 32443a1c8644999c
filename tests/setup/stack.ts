import { type ChildProcess, spawn } from 'node:child_process'
import { readdirSync, readFileSync, rmSync } from 'node:fs'
import path from 'node:path'
import { setTimeout as wait } from 'node:timers/promises'
import { freePort } from '../../app/run/parts/ports.mjs'
import { temporaryFolder } from './temporary'

const ROOT = path.resolve(import.meta.dirname, '../..')
const UP = 'Ctrl-C stops everything'

/** Polls until `check` gives something, or fails with `what` when the time is over. */
export async function until<T>(what: string, check: () => Promise<T> | T, ms = 60_000): Promise<NonNullable<T>> {
  for (const end = Date.now() + ms; Date.now() < end; await wait(50)) {
    const found = await check()
    if (found) return found
  }
  throw new Error(`not in ${ms} ms: ${what}`)
}

/** A data folder and two ports that outlive one start, so that a second start can find what the first stored. */
export async function newPlace() {
  const folder = temporaryFolder('run')
  const [port, realtimePort] = [await freePort(), await freePort()]
  return {
    folder,
    port,
    realtimePort,
    url: `http://localhost:${port}`,
    remove: () => rmSync(folder, { recursive: true, force: true }),
  }
}
export type Place = Awaited<ReturnType<typeof newPlace>>

/** The process whose command line holds every one of these words; null when there is none. */
export function findProcess(...words: string[]): number | null {
  for (const entry of readdirSync('/proc')) {
    const pid = Number(entry)
    if (!pid || pid === process.pid) continue
    try {
      const line = readFileSync(`/proc/${pid}/cmdline`, 'utf8').replaceAll('\0', ' ')
      if (line && words.every((word) => line.includes(word))) return pid
    } catch {}
  }
  return null
}

/** The three processes of a running stack (the starter's own pid aside). The web app and sidecar are told apart by parent. */
export function stackPids(place: Place, starter: number) {
  const child = (words: string) => {
    for (const entry of readdirSync('/proc')) {
      const pid = Number(entry)
      if (!pid) continue
      try {
        const line = readFileSync(`/proc/${pid}/cmdline`, 'utf8').replaceAll('\0', ' ')
        const parent = Number(/^PPid:\s+(\d+)/m.exec(readFileSync(`/proc/${pid}/status`, 'utf8'))?.[1])
        if (parent === starter && line.includes(words)) return pid
      } catch {}
    }
    return null
  }
  return {
    web: child('build/web/main.js'),
    sidecar: child('build/realtime/main.js'),
    database: findProcess('mariadbd', `--datadir=${place.folder}/db`, '--no-defaults --datadir'),
  }
}

/** Runs `npm start`'s program in a place. `up()` resolves once it says it is up; `ended` with the exit code. */
export function startStack(place: Place, env: NodeJS.ProcessEnv = {}) {
  const { DATABASE_URL: _, NODE_ENV: __, VITEST: ___, ...rest } = process.env
  const child: ChildProcess = spawn(process.execPath, ['app/run/start.mjs'], {
    cwd: ROOT,
    env: {
      ...rest,
      AUTH_SECRET: '',
      LIVE_SECRET: '',
      APP_URL: '',
      LOG_LEVEL: 'info',
      DOAB_VAR: place.folder,
      PORT: String(place.port),
      REALTIME_PORT: String(place.realtimePort),
      ...env,
    },
    stdio: ['ignore', 'pipe', 'pipe'],
  })
  let output = ''
  let errors = ''
  child.stdout?.on('data', (text) => {
    output += text
  })
  child.stderr?.on('data', (text) => {
    errors += text
  })
  const ended = new Promise<number | null>((resolve) => child.once('close', (code) => resolve(code)))
  return {
    pid: child.pid ?? 0,
    ended,
    output: () => output,
    errors: () => errors,
    up: () =>
      until(
        'the stack is up',
        () => {
          if (child.exitCode !== null) throw new Error(`it ended with ${child.exitCode}:\n${output}\n${errors}`)
          return output.includes(UP)
        },
        180_000,
      ),
    stop: async () => {
      child.kill('SIGTERM')
      return ended
    },
    kill: async () => {
      child.kill('SIGKILL')
      return ended
    },
  }
}
