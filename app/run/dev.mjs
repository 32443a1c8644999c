import path from 'node:path'
import { bundle, bundleOptions } from './bundle.mjs'
import { greet } from './parts/greeting.mjs'
import { installPackages } from './parts/packages.mjs'
import { ROOT } from './parts/places.mjs'
import { prepareDatabase } from './parts/prepare.mjs'
import { startProcess, waitHealthy } from './parts/processes.mjs'
import { command, say } from './parts/say.mjs'
import { runStack } from './parts/stack.mjs'

// npm run dev: the app with hot reload, the sidecar restarted on every change, a database of this clone's own.

/** Rebuilds the sidecar on every change and tells when a new one is there. @param {string} out @param {() => void} changed */
async function watchRealtime(out, changed) {
  const { context } = await import('esbuild')
  /** @type {import('esbuild').Plugin} */
  const built = {
    name: 'built',
    setup: (build) =>
      build.onEnd(({ errors }) => {
        if (errors.length === 0) changed()
      }),
  }
  const watching = await context({ ...bundleOptions('realtime', out), plugins: [built] })
  await watching.watch()
}

await command(async () => {
  await installPackages({ dev: true })
  return runStack('development', async ({ settings, env, own, logs, keep }) => {
    // Inside the clone, where the packages are found; by port, because several may run from one clone.
    const out = path.join(ROOT, 'build/dev', String(settings.port))
    await bundle(['prepare'], out)
    await prepareDatabase(path.join(out, 'prepare/main.js'), { env, own, real: settings.real })

    const web = keep(() =>
      startProcess({
        name: 'web',
        args: [
          'node_modules/@react-router/dev/bin.js',
          'dev',
          '--port',
          String(settings.port),
          '--strictPort',
          '--host',
          process.env.HOST || '127.0.0.1',
        ],
        env,
        logs,
      }),
    )
    /** @type {import('./parts/processes.mjs').Started | null} */
    let sidecar = null
    const start = () =>
      startProcess({
        name: 'live',
        args: ['--enable-source-maps', path.join(out, 'realtime/main.js')],
        env,
        logs,
      })
    let turn = Promise.resolve()
    await watchRealtime(out, () => {
      // One after the other: the old one must let go of the port first. A sidecar that falls waits for the next change.
      turn = turn.then(async () => {
        await sidecar?.stop()
        sidecar = start()
      })
    })
    process.once('exit', () => void sidecar?.stop())

    const why = await waitHealthy(`http://127.0.0.1:${settings.port}/health`, web, 90_000)
    if (why) say(`The web app does not answer yet (${why}).`)
    else greet(settings)
  })
})
