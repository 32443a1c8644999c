import path from 'node:path'
import { buildIfChanged } from './parts/build.mjs'
import { greet } from './parts/greeting.mjs'
import { installPackages } from './parts/packages.mjs'
import { ROOT } from './parts/places.mjs'
import { prepareDatabase } from './parts/prepare.mjs'
import { startProcess, waitHealthy } from './parts/processes.mjs'
import { command, Failure } from './parts/say.mjs'
import { runStack } from './parts/stack.mjs'

// npm start: everything from a bare clone to a running Doab. Written in plain JavaScript without packages, because it runs
// before there are any.

await command(async () => {
  await installPackages()
  return runStack('production', async ({ settings, env, own, logs, keep }) => {
    await buildIfChanged()
    await prepareDatabase(path.join(ROOT, 'build/prepare/main.js'), { env, own, real: settings.real })
    /** @param {string} name @param {string} bundle */
    const program = (name, bundle) =>
      keep(() => startProcess({ name, args: ['--enable-source-maps', `build/${bundle}/main.js`], env, logs }))
    const web = program('web', 'web')
    const live = program('live', 'realtime')
    const [webWhy, liveWhy] = await Promise.all([
      waitHealthy(`http://127.0.0.1:${settings.port}/health`, web, 60_000),
      waitHealthy(`http://127.0.0.1:${settings.realtimePort}/health`, live, 60_000),
    ])
    if (webWhy) throw new Failure(`The web app does not come up: ${webWhy}. Its log: ${path.join(logs, 'web.log')}`)
    if (liveWhy)
      throw new Failure(`The live connection does not come up: ${liveWhy}. Its log: ${path.join(logs, 'live.log')}`)

    greet(settings)
  })
})
