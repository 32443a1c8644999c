import { connect } from '../drizzle/client'
import { log } from './log'
import { create } from './server'

// The process: settings from the environment, one sidecar, orderly end on SIGTERM and SIGINT.

function setting(name: string, least = 1): string {
  const value = process.env[name]
  if (value && value.length >= least) return value
  console.error(
    `The live connection needs ${name}${least > 1 ? ` (at least ${least} characters)` : ''}. Start Doab with npm start or npm run dev.`,
  )
  process.exit(1)
}

const connection = connect(setting('DATABASE_URL'), { connectionLimit: 12 })
const port = Number(process.env.REALTIME_PORT || 3001)
const sidecar = create({
  connection,
  liveSecret: setting('LIVE_SECRET', 32),
  appUrl: process.env.APP_URL || undefined,
  redisUrl: process.env.REDIS_URL || undefined,
  trustProxy: Boolean(process.env.TRUST_PROXY),
})

let ending = false
async function end(code: number) {
  if (ending) return
  ending = true
  const hard = setTimeout(() => process.exit(code || 1), 10_000)
  try {
    await sidecar.close()
    await connection.close()
  } catch (error) {
    log.error({ why: String(error) }, 'closing failed')
  }
  clearTimeout(hard)
  process.exit(code)
}
process.on('SIGTERM', () => void end(0))
process.on('SIGINT', () => void end(0))
process.on('uncaughtException', (error) => {
  // Whatever is not committed is still in the pages; a process in an unknown state must not go on storing.
  log.error({ why: error.stack ?? error.message }, 'unexpected error')
  void end(1)
})
process.on('unhandledRejection', (error) => {
  log.error({ why: error instanceof Error ? error.stack : String(error) }, 'unexpected rejection')
  void end(1)
})

try {
  const listening = await sidecar.listen(port, process.env.HOST || undefined)
  log.info({ port: listening }, 'live connection ready')
} catch (error) {
  const taken = error instanceof Error && 'code' in error && error.code === 'EADDRINUSE'
  console.error(
    taken
      ? `Port ${port} is taken: set REALTIME_PORT to a free one.`
      : `The live connection cannot start: ${String(error)}`,
  )
  process.exit(1)
}
