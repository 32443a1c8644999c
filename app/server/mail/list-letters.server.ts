import { desc, eq } from 'drizzle-orm'
import { outbox } from '../../../drizzle/schema'
import { db } from '../db.server'
import { env } from '../env.server'
import { notFound } from '../errors.server'

const SHOWN = 100

/** Letters of the outbox, newest first, for the mailbox page; there is no such page on a server for real people. */
export async function listLetters() {
  if (env.DOAB_LOCAL !== 'yes') throw notFound()
  const { id, to, subject, state, createdAt } = outbox
  return db.select({ id, to, subject, state, createdAt }).from(outbox).orderBy(desc(createdAt)).limit(SHOWN)
}

/** One letter in full; null when there is none. */
export async function readLetter(id: string) {
  if (env.DOAB_LOCAL !== 'yes') throw notFound()
  const [letter] = await db.select().from(outbox).where(eq(outbox.id, id))
  return letter ?? null
}
