import { and, eq } from 'drizzle-orm'
import type { Database } from '../../../drizzle/client'
import { link } from '../../../drizzle/schema'
import { writeAudit } from '../audit/write-audit.server'
import type { Person } from '../context.server'
import { notFound } from '../errors.server'
import { pokeSidecar } from '../live/poke.server'
import { askSection } from '../sections/ask-section.server'

/** Ends a link at once, the sheets open by it included. Ending it twice changes nothing. */
export async function revokeLink(db: Database, person: Person, sectionId: string, linkId: string): Promise<void> {
  await db.transaction(async (tx) => {
    const { section } = await askSection(tx, person, sectionId, 'link.revoke')
    const [found] = await tx
      .select({ label: link.label, revokedAt: link.revokedAt })
      .from(link)
      .where(and(eq(link.id, linkId), eq(link.sectionId, sectionId)))
      .for('update')
    if (!found) throw notFound()
    if (found.revokedAt) return
    await tx.update(link).set({ revokedAt: new Date() }).where(eq(link.id, linkId))
    await writeAudit(tx, person, {
      practiceId: section.practiceId,
      act: 'link.revoke',
      on: `link:${linkId}`,
      label: found.label,
      details: { section: sectionId },
    })
  })
  pokeSidecar()
}
