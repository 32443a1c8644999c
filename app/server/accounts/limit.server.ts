import { eq, sql } from 'drizzle-orm'
import { rateLimit } from '../../../drizzle/schema'
import { db } from '../db.server'
import { AppError } from '../errors.server'

// better-auth limits only its own /api/auth calls; what a form's action does is counted here, in the same table.

export type Limit = { key: string; max: number; minutes: number }

const MINUTE = 60_000

/** Refuses with 429 when the count under this key is used up. Does not count. */
export async function refuseWhenOver(limit: Limit): Promise<void> {
  const [row] = await db.select().from(rateLimit).where(eq(rateLimit.key, limit.key))
  if (!row) return
  const left = row.lastRequest + limit.minutes * MINUTE - Date.now()
  if (left <= 0 || row.count < limit.max) return
  const minutes = Math.max(1, Math.ceil(left / MINUTE))
  throw new AppError(
    'too-many',
    `Too many tries. Wait ${minutes} ${minutes === 1 ? 'minute' : 'minutes'}, then try again.`,
    { 'retry-after': String(Math.ceil(left / 1000)) },
  )
}

/** Counts one more under this key; a window that is over starts again at one. */
export async function count(limit: Limit): Promise<void> {
  const now = Date.now()
  const over = sql`${rateLimit.lastRequest} < ${now - limit.minutes * MINUTE}`
  await db
    .insert(rateLimit)
    .values({ id: crypto.randomUUID(), key: limit.key, count: 1, lastRequest: now })
    // MariaDB assigns left to right: the count must be judged by the window's old start.
    .onDuplicateKeyUpdate({
      set: {
        count: sql`if(${over}, 1, ${rateLimit.count} + 1)`,
        lastRequest: sql`if(${over}, ${now}, ${rateLimit.lastRequest})`,
      },
    })
}

/** Forgets the count, as after the right password. */
export async function forget(key: string): Promise<void> {
  await db.delete(rateLimit).where(eq(rateLimit.key, key))
}

/** The words of a "too many tries" refusal, to show beside the form that was kept; any other error is thrown on. */
export function wordsWhenLimited(error: unknown): string {
  if (error instanceof AppError && error.code === 'too-many') return error.message
  throw error
}
