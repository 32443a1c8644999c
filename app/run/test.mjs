import { spawn } from 'node:child_process'
import { existsSync, mkdtempSync, readFileSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { aptInstall } from './parts/apt.mjs'
import { buildIfChanged } from './parts/build.mjs'
import { needMariadb } from './parts/mariadb.mjs'
import { installPackages } from './parts/packages.mjs'
import { ROOT } from './parts/places.mjs'
import { bold, command, Failure, say } from './parts/say.mjs'

// npm test: everything, from a bare machine. Type check and lint count as one each; the last line sums it up.

const results = mkdtempSync(path.join(tmpdir(), 'doab-results-'))
const CHROMIUM = '/usr/bin/chromium'

/** The tests choose their own database, ports and secrets: what the shell has set must not lead them elsewhere. */
const OURS = ['DATABASE_URL', 'PORT', 'HOST', 'REALTIME_PORT', 'REALTIME_URL', 'APP_URL', 'AUTH_SECRET', 'LIVE_SECRET']
const OTHERS = ['SMTP_URL', 'MAIL_FROM', 'REDIS_URL', 'DOAB_VAR', 'DOAB_LOCAL', 'TRUST_PROXY', 'LOG_LEVEL', 'NODE_ENV']
const env = { ...process.env }
for (const name of [...OURS, ...OTHERS]) delete env[name]

/** @type {Set<number>} */
const groups = new Set()
const endAll = () => {
  for (const pid of groups) {
    try {
      process.kill(-pid, 'SIGTERM')
    } catch {}
  }
}
for (const signal of /** @type {const} */ (['SIGINT', 'SIGTERM', 'SIGHUP']))
  process.on(signal, () => {
    endAll()
    rmSync(results, { recursive: true, force: true })
    process.exit(130)
  })

/**
 * Runs one program of node_modules with its output on the terminal; gives its exit code. Whatever it left running goes too.
 * @param {string[]} args @param {NodeJS.ProcessEnv} [extra]
 * @returns {Promise<number>}
 */
function run(args, extra = {}) {
  return new Promise((resolve) => {
    const child = spawn(process.execPath, args, {
      cwd: ROOT,
      env: { ...env, ...extra },
      stdio: ['ignore', 'inherit', 'inherit'],
      detached: true,
    })
    if (child.pid) groups.add(child.pid)
    child.once('error', () => resolve(1))
    child.once('exit', (code) => {
      if (child.pid) {
        groups.delete(child.pid)
        try {
          process.kill(-child.pid, 'SIGKILL')
        } catch {}
      }
      resolve(code ?? 1)
    })
  })
}

let passed = 0
let failed = 0
/** @param {boolean} good */
const note = (good) => {
  if (good) passed += 1
  else failed += 1
}

/**
 * Adds what a runner counted. One that ended badly without a failed test (a file that does not load) counts as a failure.
 * @param {number} code @param {{ passed: number, failed: number } | null} counted
 */
function add(code, counted) {
  passed += counted?.passed ?? 0
  failed += counted?.failed ?? 0
  if (!counted || (code !== 0 && counted.failed === 0)) failed += 1
}

/** @param {string} name @returns {any} */
const read = (name) => {
  const file = path.join(results, name)
  return existsSync(file) ? JSON.parse(readFileSync(file, 'utf8')) : null
}

await command(async () => {
  await installPackages({ dev: true })
  await needMariadb()
  if (!existsSync(CHROMIUM)) await aptInstall(['chromium'], 'Chromium')

  say(bold('Type check'))
  const types =
    (await run(['node_modules/@react-router/dev/bin.js', 'typegen'])) ||
    (await run(['node_modules/typescript/bin/tsc', '--noEmit']))
  note(types === 0)

  say(bold('Lint'))
  note((await run(['node_modules/@biomejs/biome/bin/biome', 'check', '.'])) === 0)

  say(bold('Build'))
  try {
    await buildIfChanged()
    note(true)
  } catch (error) {
    if (!(error instanceof Failure)) throw error
    console.error(error.message)
    note(false)
  }

  say(bold('Unit, component and integration tests'))
  const vitest = path.join(results, 'vitest.json')
  const vitestCode = await run([
    'node_modules/vitest/vitest.mjs',
    'run',
    '--reporter=default',
    '--reporter=json',
    `--outputFile.json=${vitest}`,
  ])
  const unit = read('vitest.json')
  add(vitestCode, unit && { passed: unit.numPassedTests, failed: unit.numFailedTests })

  say(bold('End to end, in Chromium against the production build'))
  const browserCode = await run(
    [
      'node_modules/@playwright/test/cli.js',
      'test',
      '--config=tests/browser/playwright.config.ts',
      '--reporter=list,json',
    ],
    { PLAYWRIGHT_JSON_OUTPUT_NAME: path.join(results, 'browser.json') },
  )
  const browser = read('browser.json')?.stats
  add(browserCode, browser && { passed: browser.expected + browser.flaky, failed: browser.unexpected })

  rmSync(results, { recursive: true, force: true })
  process.stdout.write(`\n${passed} passed, ${failed} failed\n`)
  return failed === 0 ? 0 : 1
})
