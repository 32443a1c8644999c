import { type Connection, connect } from '../../drizzle/client'
import { env } from './env.server'
import { log } from './log.server'

const SLOW = 200

/** Times every query and logs the slow ones, without their values. */
function watched(connection: Connection): Connection {
  const { pool } = connection
  const query = pool.query.bind(pool) as (...args: unknown[]) => Promise<unknown>
  const timed = async (...args: unknown[]) => {
    const from = performance.now()
    try {
      return await query(...args)
    } finally {
      const ms = Math.round(performance.now() - from)
      if (ms > SLOW) {
        const first = args[0] as string | { sql: string }
        log.warn({ ms, sql: typeof first === 'string' ? first : first.sql }, 'slow query')
      }
    }
  }
  Object.assign(pool, { query: timed })
  return connection
}

// Hot reload evaluates this file again; the pool survives on globalThis, else each save would open ten more connections.
const kept = globalThis as { doabConnection?: Connection }
kept.doabConnection ??= watched(connect(env.DATABASE_URL))

export const { db, pool } = kept.doabConnection

/** Closes the pool; the last thing a stopping web process does. */
export async function closeDatabase() {
  const connection = kept.doabConnection
  kept.doabConnection = undefined
  await connection?.close()
}
