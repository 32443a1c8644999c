import { desc, eq } from 'drizzle-orm'
import type { Executor } from '../../../drizzle/client'
import { link, user } from '../../../drizzle/schema'
import type { Person } from '../context.server'
import { askSection } from '../sections/ask-section.server'

export type LinkRow = {
  id: string
  label: string
  by: string
  state: 'live' | 'expired' | 'revoked'
  expiresAt: Date | null
  revokedAt: Date | null
  lastUsedAt: Date | null
  uses: number
  createdAt: Date
}

/** The read-only links of a section, newest first. Their tokens are not among it: nobody has them but who was given one. */
export async function listLinks(db: Executor, person: Person, sectionId: string): Promise<LinkRow[]> {
  await askSection(db, person, sectionId, 'link.see')
  const rows = await db
    .select({ link, by: user.name })
    .from(link)
    .innerJoin(user, eq(user.id, link.createdBy))
    .where(eq(link.sectionId, sectionId))
    .orderBy(desc(link.createdAt), desc(link.id))
  const now = new Date()
  return rows.map(({ link: { id, label, expiresAt, revokedAt, lastUsedAt, uses, createdAt }, by }) => ({
    id,
    label,
    by,
    state: revokedAt ? 'revoked' : expiresAt && expiresAt <= now ? 'expired' : 'live',
    expiresAt,
    revokedAt,
    lastUsedAt,
    uses,
    createdAt,
  }))
}
