import type { Executor } from '../../../drizzle/client'
import { outbox } from '../../../drizzle/schema'
import { type Letter, writeLetter } from './letters.server'

/**
 * Puts a letter into the outbox. Hand in the transaction of the deed it reports: the letter then exists exactly when the deed
 * does. The sender loop takes it from there.
 */
export async function queueMail(executor: Executor, letter: Letter): Promise<string> {
  const id = crypto.randomUUID()
  const { subject, text, html } = writeLetter(letter)
  await executor.insert(outbox).values({ id, kind: letter.kind, to: letter.to, subject, text, html })
  return id
}
