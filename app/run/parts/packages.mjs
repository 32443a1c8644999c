import { spawn } from 'node:child_process'
import { existsSync, readFileSync } from 'node:fs'
import path from 'node:path'
import { ROOT } from './places.mjs'
import { Failure, say } from './say.mjs'

/** @typedef {{ version?: string, optional?: boolean, peer?: boolean, dev?: boolean, link?: boolean }} Entry */

/**
 * Whether node_modules holds exactly what package-lock.json asks for.
 * @param {boolean} dev with the packages for tests
 */
export function packagesFit(dev) {
  const hidden = path.join(ROOT, 'node_modules/.package-lock.json')
  if (!existsSync(hidden)) return false
  /** @type {Record<string, Entry>} */
  const asked = JSON.parse(readFileSync(path.join(ROOT, 'package-lock.json'), 'utf8')).packages
  /** @type {Record<string, Entry>} */
  const present = JSON.parse(readFileSync(hidden, 'utf8')).packages
  return Object.entries(asked).every(([place, entry]) => {
    if (place === '' || entry.optional || entry.link || (entry.dev && !dev)) return true
    return present[place]?.version === entry.version && existsSync(path.join(ROOT, place, 'package.json'))
  })
}

/**
 * Installs the packages unless they are already right.
 * @param {{ dev?: boolean }} [options]
 */
export async function installPackages({ dev = process.env.NODE_ENV !== 'production' } = {}) {
  if (packagesFit(dev)) return
  say('Installing the packages …')
  const fresh = !existsSync(path.join(ROOT, 'node_modules'))
  const args = [
    fresh ? 'ci' : 'install',
    '--no-audit',
    '--no-fund',
    '--loglevel=error',
    `--include=${dev ? 'dev' : 'prod'}`,
  ]
  if (!dev) args.push('--omit=dev')
  const npm = process.env.npm_execpath
  const [file, ...rest] = npm?.endsWith('.js') ? [process.execPath, npm, ...args] : ['npm', ...args]
  const code = await new Promise((resolve) => {
    const child = spawn(file, rest, { cwd: ROOT, stdio: ['ignore', 'inherit', 'inherit'] })
    child.once('error', () => resolve(1))
    child.once('exit', (status) => resolve(status ?? 1))
  })
  if (code !== 0)
    throw new Failure(
      'npm could not install the packages (its own words are above). Check the network and start again.',
    )
}
