import { sql } from 'drizzle-orm'
import { db } from './db.server'
import { log } from './log.server'

const PATIENCE = 2_000

/** Whether the database answers within two seconds. */
export async function databaseAnswers(): Promise<boolean> {
  let timer: NodeJS.Timeout | undefined
  const late = new Promise<never>((_, reject) => {
    timer = setTimeout(() => reject(new Error(`no answer within ${PATIENCE} ms`)), PATIENCE)
  })
  try {
    await Promise.race([db.execute(sql`select 1`), late])
    return true
  } catch (error) {
    log.error({ err: error }, 'the database does not answer')
    return false
  } finally {
    clearTimeout(timer)
  }
}
