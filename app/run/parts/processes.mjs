import { spawn } from 'node:child_process'
import { createWriteStream, existsSync, mkdirSync, renameSync, statSync } from 'node:fs'
import path from 'node:path'
import { createInterface } from 'node:readline'
import { setTimeout as wait } from 'node:timers/promises'
import { fileURLToPath } from 'node:url'
import { ROOT } from './places.mjs'
import { complain, dim } from './say.mjs'

const LEASH = path.join(path.dirname(fileURLToPath(import.meta.url)), 'leash.mjs')
const LARGE = 10_000_000

/** @param {string} folder @param {string} name */
function logStream(folder, name) {
  mkdirSync(folder, { recursive: true })
  const file = path.join(folder, `${name}.log`)
  if (existsSync(file) && statSync(file).size > LARGE) renameSync(file, `${file}.old`)
  return createWriteStream(file, { flags: 'a' })
}

/**
 * One line for the terminal, or null for what only the log needs: a log entry is shown from "warn" up.
 * @param {string} line
 */
function shown(line) {
  if (!line.startsWith('{')) return line.trim() ? line : null
  try {
    const entry = JSON.parse(line)
    if (typeof entry.level !== 'number') return line
    if (entry.level < 40) return null
    return [entry.msg, entry.err?.message].filter(Boolean).join(': ')
  } catch {
    return line
  }
}

/**
 * @typedef {object} Started
 * @property {string} name
 * @property {() => Promise<void>} stop
 * @property {Promise<{ code: number | null, signal: NodeJS.Signals | null }>} ended
 */

/**
 * Starts a node program on the leash, in a process group of its own, its output in a log file and what matters of it on the
 * terminal.
 * @param {{ name: string, args: string[], env: NodeJS.ProcessEnv, logs: string }} options
 * @returns {Started}
 */
export function startProcess({ name, args, env, logs }) {
  const child = spawn(process.execPath, ['--import', LEASH, ...args], {
    cwd: ROOT,
    env,
    detached: true,
    stdio: ['ignore', 'pipe', 'pipe', 'ipc'],
  })
  const file = logStream(logs, name)
  for (const stream of [child.stdout, child.stderr]) {
    if (!stream) continue
    createInterface({ input: stream }).on('line', (line) => {
      file.write(`${line}\n`)
      const text = shown(line)
      if (text !== null) process.stdout.write(`${dim(name.padEnd(4))}  ${text}\n`)
    })
  }
  /** @type {Started['ended']} */
  const ended = new Promise((resolve) => {
    child.once('error', () => resolve({ code: 1, signal: null }))
    child.once('exit', (code, signal) => resolve({ code, signal }))
  })
  ended.then(() => file.end())
  /** @param {NodeJS.Signals} signal */
  const kill = (signal) => {
    // The whole group: what the program itself started goes with it.
    try {
      if (child.pid) process.kill(-child.pid, signal)
    } catch {}
  }
  const stop = async () => {
    child.kill('SIGTERM')
    const inTime = await Promise.race([ended.then(() => true), wait(12_000, false, { ref: false })])
    if (!inTime) complain(`${name} did not stop in 12 seconds and was ended.`)
    kill('SIGKILL')
    await ended
  }
  return { name, stop, ended }
}

/**
 * Waits until an address answers 200, or the process behind it ends.
 * @param {string} address @param {Started} started @param {number} ms
 * @returns {Promise<string | null>} why it does not answer; null when it does
 */
export async function waitHealthy(address, started, ms) {
  let last = 'no answer'
  let over = false
  started.ended.then(() => {
    over = true
  })
  for (const end = Date.now() + ms; Date.now() < end; await wait(50)) {
    if (over) return 'it ended while starting'
    try {
      const answer = await fetch(address, { signal: AbortSignal.timeout(3000) })
      if (answer.ok) return null
      last = `it answers ${answer.status}`
    } catch {}
  }
  return last
}
