import path from 'node:path'
import { pathToFileURL } from 'node:url'
import type { ServerBuild } from 'react-router'
import { env } from '../env.server'
import { log } from '../log.server'
import { createApp } from './app.server'

// The web process: bundled to build/web/main.js, started by npm start.

/** A request may take this long to finish once the server was told to stop. */
const GRACE = 8_000

const folder = path.resolve('build')
const build: ServerBuild = await import(pathToFileURL(path.join(folder, 'server/index.js')).href)
// What app/entry.server.tsx exports beside the handler.
const entry = build.entry.module as unknown as { shutdown: () => Promise<void> }

const server = createApp(build, path.join(folder, 'client')).listen({ port: env.PORT, host: env.HOST }, () => {
  log.info({ port: env.PORT, address: env.APP_URL }, 'listening')
})

server.on('error', (error: NodeJS.ErrnoException) => {
  const why = error.code === 'EADDRINUSE' ? `Port ${env.PORT} is taken by another program (PORT).` : error.message
  log.fatal(why)
  process.exit(1)
})

let stopping = false
function stop(signal: string) {
  if (stopping) return
  stopping = true
  log.info({ signal }, 'stopping')
  setTimeout(() => process.exit(1), GRACE).unref()
  server.close(() => {
    entry
      .shutdown()
      .then(() => process.exit(0))
      .catch((error: unknown) => {
        log.error({ err: error }, 'stopping failed')
        process.exit(1)
      })
  })
  server.closeIdleConnections()
}
process.on('SIGTERM', () => stop('SIGTERM'))
process.on('SIGINT', () => stop('SIGINT'))
// A promise nobody waited for is a mistake of ours, but no reason to drop everybody's requests.
process.on('unhandledRejection', (error) => log.error({ err: error }, 'unhandled rejection'))
