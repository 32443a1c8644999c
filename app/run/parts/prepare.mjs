import { spawn } from 'node:child_process'
import { ROOT } from './places.mjs'
import { Failure, say } from './say.mjs'

/**
 * Migrates the database and loads the demo once, in a process of its own (a bundle of app/run/prepare.ts).
 * @param {string} file the bundle
 * @param {{ env: NodeJS.ProcessEnv, own: boolean, real: boolean }} options
 */
export async function prepareDatabase(file, { env, own, real }) {
  const child = spawn(process.execPath, ['--enable-source-maps', file], {
    cwd: ROOT,
    env: { ...env, DOAB_OWN_DATABASE: own ? 'yes' : 'no', DOAB_DEMO: real ? 'refuse' : 'load' },
    stdio: ['ignore', 'pipe', 'pipe'],
  })
  let errors = ''
  child.stdout.on('data', (text) => {
    if (String(text).includes('seeding')) say('Loading the demo …')
  })
  child.stderr.on('data', (text) => {
    errors += text
  })
  const code = await new Promise((resolve) => child.once('close', resolve))
  if (code !== 0) throw new Failure(errors.trim() || 'The database could not be prepared.')
}
