import { and, asc, eq, lt, lte, or } from 'drizzle-orm'
import type { Database } from '../../../drizzle/client'
import { outbox } from '../../../drizzle/schema'
import type { Transport } from './transport.server'

/** Waiting times after the first, second, … failure, in minutes; after the last the letter is given up. */
export const BACK_OFF = [1, 5, 15, 60, 240]
/** A claim older than this belonged to a process that died while sending. */
const CLAIM = 10 * 60_000
const BATCH = 20

type Row = typeof outbox.$inferSelect

/**
 * Takes due letters for this process, in a transaction with the rows locked, so that no two processes send the same one. A
 * letter whose sender died comes up again after ten minutes; it may then arrive twice, never not at all, and carries the same
 * Message-ID both times.
 */
async function claim(db: Database, now: Date): Promise<Row[]> {
  return db.transaction(async (tx) => {
    const due = await tx
      .select()
      .from(outbox)
      .where(
        or(
          and(eq(outbox.state, 'waiting'), lte(outbox.nextTryAt, now)),
          and(eq(outbox.state, 'sending'), lt(outbox.nextTryAt, now)),
        ),
      )
      .orderBy(asc(outbox.createdAt))
      .limit(BATCH)
      .for('update', { skipLocked: true })
    for (const row of due)
      await tx
        .update(outbox)
        .set({ state: 'sending', tries: row.tries + 1, nextTryAt: new Date(now.getTime() + CLAIM) })
        .where(eq(outbox.id, row.id))
    return due.map((row) => ({ ...row, tries: row.tries + 1 }))
  })
}

/** A wrong address stays wrong: 5xx answers of the mail server are not tried again. */
const isFinal = (error: unknown) =>
  typeof error === 'object' &&
  error !== null &&
  'responseCode' in error &&
  typeof error.responseCode === 'number' &&
  error.responseCode >= 500 &&
  error.responseCode !== 535

/** Sends what is due; gives how many left the waiting line, so the caller knows whether to look again at once. */
export async function sendDue(db: Database, transport: Transport, now = new Date()): Promise<number> {
  const rows = await claim(db, now)
  for (const row of rows) {
    const own = and(eq(outbox.id, row.id), eq(outbox.state, 'sending'))
    try {
      const { to, subject, text, html } = row
      const state = await transport.deliver({ to, subject, text, html, messageId: `<${row.id}@doab>` })
      await db.update(outbox).set({ state, sentAt: new Date(), error: null }).where(own)
    } catch (error) {
      const wait = BACK_OFF[row.tries - 1]
      const next = wait === undefined || isFinal(error) ? null : new Date(now.getTime() + wait * 60_000)
      const words = error instanceof Error ? error.message : String(error)
      await db
        .update(outbox)
        .set({ state: next ? 'waiting' : 'failed', error: words.slice(0, 2000), ...(next && { nextTryAt: next }) })
        .where(own)
    }
  }
  return rows.length
}
