import { eq, sql } from 'drizzle-orm'
import type { Actor } from '~/access/facts.server'
import type { Executor } from '../../../drizzle/client'
import { link } from '../../../drizzle/schema'
import { AppError, notFound } from '../errors.server'
import { hashToken } from '../live/issue-ticket.server'

export type LinkFound = { actor: Extract<Actor, { kind: 'link' }>; sectionId: string }

/**
 * Whom a token lets in, and to what. `count` notes the use (a page opened; not every download from it).
 * @throws AppError not-found for a token that never was, gone for a link that is over, whatever ended it.
 */
export async function findLink(db: Executor, token: string, options: { count?: boolean } = {}): Promise<LinkFound> {
  const [found] = await db
    .select()
    .from(link)
    .where(eq(link.tokenHash, hashToken(token)))
  if (!found) throw notFound()
  const over = found.revokedAt !== null || (found.expiresAt !== null && found.expiresAt <= new Date())
  if (over) throw new AppError('gone', 'This link is over. Ask whoever sent it for a new one.')
  if (found.shows === 'issued')
    throw new AppError('forbidden', 'This link shows issued revisions, not the sheet being drawn.')
  if (options.count)
    await db
      .update(link)
      .set({ uses: sql`${link.uses} + 1`, lastUsedAt: new Date() })
      .where(eq(link.id, found.id))
  return { actor: { kind: 'link', linkId: found.id }, sectionId: found.sectionId }
}
