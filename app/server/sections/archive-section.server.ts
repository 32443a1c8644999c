import { eq } from 'drizzle-orm'
import type { Database } from '../../../drizzle/client'
import { section as table } from '../../../drizzle/schema'
import { writeAudit } from '../audit/write-audit.server'
import type { Person } from '../context.server'
import { pokeSidecar } from '../live/poke.server'
import { askSection } from './ask-section.server'

/** Puts a section away, or takes it out again. Put away it can be read, not drawn on; open sheets turn read-only. */
export async function archiveSection(
  db: Database,
  person: Person,
  sectionId: string,
  archived: boolean,
): Promise<void> {
  await db.transaction(async (tx) => {
    const { section } = await askSection(tx, person, sectionId, 'section.archive')
    const now = new Date()
    await tx
      .update(table)
      .set({ archivedAt: archived ? now : null, updatedAt: now })
      .where(eq(table.id, sectionId))
    await writeAudit(tx, person, {
      practiceId: section.practiceId,
      act: archived ? 'section.archive' : 'section.restore',
      on: `section:${sectionId}`,
      label: section.title,
    })
  })
  pokeSidecar()
}
