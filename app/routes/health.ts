import { sql } from 'drizzle-orm'
import { db } from '~/server/db.server'
import { log } from '~/server/log.server'

/** 200 when the database answers within two seconds, 503 otherwise. */
export async function loader() {
  let timer: NodeJS.Timeout | undefined
  const late = new Promise<never>((_, reject) => {
    timer = setTimeout(() => reject(new Error('no answer within two seconds')), 2000)
  })
  try {
    await Promise.race([db.execute(sql`select 1`), late])
    return Response.json({ ok: true, database: 'answers' }, { headers: { 'cache-control': 'no-store' } })
  } catch (error) {
    log.error({ err: error }, 'health: the database does not answer')
    return Response.json(
      { ok: false, database: 'does not answer' },
      { status: 503, headers: { 'cache-control': 'no-store' } },
    )
  } finally {
    clearTimeout(timer)
  }
}
