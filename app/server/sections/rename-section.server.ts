import { eq } from 'drizzle-orm'
import * as Y from 'yjs'
import { writeEdits } from '~/live'
import type { Database } from '../../../drizzle/client'
import { appendUpdates } from '../../../drizzle/log'
import { section as table } from '../../../drizzle/schema'
import { writeAudit } from '../audit/write-audit.server'
import type { Person } from '../context.server'
import { pokeSidecar } from '../live/poke.server'
import { askSection } from './ask-section.server'
import { readTitle } from './section-title.server'
import { withStored } from './stored-section.server'

/**
 * Gives a section another title: an edit of its document like any other, written through the log. Sheets that are open see it when
 * the sidecar next compares its rooms with the log; the poke makes that now.
 */
export async function renameSection(db: Database, person: Person, sectionId: string, given: string): Promise<void> {
  const changed = await db.transaction(async (tx) => {
    const { section } = await askSection(tx, person, sectionId, 'section.rename')
    const title = readTitle(given)
    // Locked before reading, as every append does: nothing can be stored between the reading and the writing.
    await tx.select({ id: table.id }).from(table).where(eq(table.id, sectionId)).for('update')
    const written = await withStored(tx, sectionId, ({ live, epoch }, { doc }) => {
      if (live.section.title === title) return null
      const before = Y.encodeStateVector(doc)
      writeEdits(doc, [{ do: 'set', path: 'title', value: title }], 'rename')
      return { epoch, update: Y.encodeStateAsUpdate(doc, before), was: live.section.title }
    })
    if (!written) return false
    const { epoch, update, was } = written
    await appendUpdates(tx, [{ sectionId, epoch, update, userId: person.userId }])
    await tx.update(table).set({ title, updatedAt: new Date() }).where(eq(table.id, sectionId))
    await writeAudit(tx, person, {
      practiceId: section.practiceId,
      act: 'section.rename',
      on: `section:${sectionId}`,
      label: title,
      details: { was },
    })
    return true
  })
  if (changed) pokeSidecar()
}
