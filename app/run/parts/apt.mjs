import { spawnSync } from 'node:child_process'
import { Failure, say } from './say.mjs'

/**
 * Installs Debian packages; as anybody but root, stops with the one line to run.
 * @param {string[]} packages @param {string} what what they are, for the message @param {string} [otherwise] another way
 */
export async function aptInstall(packages, what, otherwise = '') {
  const line = `apt-get install -y --no-install-recommends ${packages.join(' ')}`
  const advice = [`${what} is missing. Run: sudo ${line}`, otherwise].filter(Boolean).join('  ')
  if (process.getuid?.() !== 0 || spawnSync('apt-get', ['--version']).status !== 0) throw new Failure(advice)
  say(`Installing ${what} …`)
  const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' }
  const install = () => spawnSync('sh', ['-c', `${line} -qq`], { env, encoding: 'utf8' })
  let done = install()
  if (done.status !== 0) {
    // The package lists of a fresh machine are empty.
    spawnSync('apt-get', ['update', '-qq'], { env })
    done = install()
  }
  if (done.status !== 0) throw new Failure(`${advice}\n${(done.stderr || '').trim().slice(-600)}`)
}
