import { spawn } from 'node:child_process'
import { createHash } from 'node:crypto'
import { existsSync, mkdirSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import path from 'node:path'
import { bundle } from '../bundle.mjs'
import { ROOT } from './places.mjs'
import { Failure, say } from './say.mjs'

const SOURCES = [
  'app',
  'realtime',
  'drizzle',
  'public',
  'package-lock.json',
  'vite.config.ts',
  'react-router.config.ts',
  'tsconfig.json',
]
const STAMP = path.join(ROOT, 'build/stamp')

/** @param {string} place @returns {string[]} */
function files(place) {
  const full = path.join(ROOT, place)
  if (!existsSync(full)) return []
  return readdirSync(full, { withFileTypes: true, recursive: true })
    .filter((entry) => entry.isFile() && !/\.test\.tsx?$/.test(entry.name))
    .map((entry) => path.join(entry.parentPath, entry.name))
}

/** A number that changes whenever anything the build is made from changes. */
export function sourceHash() {
  const hash = createHash('sha256').update(process.version)
  for (const place of SOURCES) {
    const list = path.extname(place) ? [path.join(ROOT, place)] : files(place).sort()
    for (const file of list) if (existsSync(file)) hash.update(path.relative(ROOT, file)).update(readFileSync(file))
  }
  return hash.digest('hex')
}

/** Builds the app and the bundles unless build/ was made from these very sources. */
export async function buildIfChanged() {
  const hash = sourceHash()
  if (existsSync(STAMP) && readFileSync(STAMP, 'utf8') === hash) return
  say('Building …')
  rmSync(STAMP, { force: true })
  const child = spawn(process.execPath, ['node_modules/@react-router/dev/bin.js', 'build'], {
    cwd: ROOT,
    env: { ...process.env, NODE_ENV: 'production' },
    stdio: ['ignore', 'pipe', 'pipe'],
  })
  const abandon = () => child.kill()
  process.once('exit', abandon)
  let output = ''
  for (const stream of [child.stdout, child.stderr])
    stream.on('data', (text) => {
      output += text
    })
  const code = await new Promise((resolve) => child.once('close', resolve))
  process.off('exit', abandon)
  if (code !== 0) throw new Failure(`The build failed:\n${output.trim().split('\n').slice(-30).join('\n')}`)
  await bundle(['prepare', 'web', 'realtime'])
  mkdirSync(path.dirname(STAMP), { recursive: true })
  writeFileSync(STAMP, hash)
}
