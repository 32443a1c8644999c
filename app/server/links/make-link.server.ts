import { randomBytes } from 'node:crypto'
import type { Database } from '../../../drizzle/client'
import { link } from '../../../drizzle/schema'
import { writeAudit } from '../audit/write-audit.server'
import type { Person } from '../context.server'
import { AppError } from '../errors.server'
import { hashToken } from '../live/issue-ticket.server'
import { askSection } from '../sections/ask-section.server'

export type NewLink = { label: string; expiresAt?: Date | null }

/**
 * Makes a read-only link to a section. The token is returned this once; only its SHA-256 is stored, so that nobody who reads the
 * database can open the section with it.
 */
export async function makeLink(
  db: Database,
  person: Person,
  sectionId: string,
  { label, expiresAt = null }: NewLink,
): Promise<{ id: string; token: string }> {
  return db.transaction(async (tx) => {
    const { section } = await askSection(tx, person, sectionId, 'link.make')
    const tidy = label.trim()
    if (!tidy || tidy.length > 200) throw new AppError('invalid', 'Say in at most 200 characters whom the link is for.')
    if (expiresAt && !(expiresAt.getTime() > Date.now()))
      throw new AppError('invalid', 'The link would be over already. Choose a later day.')
    const id = crypto.randomUUID()
    const token = randomBytes(24).toString('base64url')
    await tx
      .insert(link)
      .values({ id, sectionId, tokenHash: hashToken(token), label: tidy, createdBy: person.userId, expiresAt })
    await writeAudit(tx, person, {
      practiceId: section.practiceId,
      act: 'link.make',
      on: `link:${id}`,
      label: tidy,
      details: { section: sectionId, expiresAt },
    })
    return { id, token }
  })
}
