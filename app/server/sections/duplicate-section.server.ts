import type { Database } from '../../../drizzle/client'
import { writeAudit } from '../audit/write-audit.server'
import type { Person } from '../context.server'
import { askSite } from '../sites/ask-site.server'
import { addSection } from './add-section.server'
import { askSection } from './ask-section.server'
import { storedSection } from './stored-section.server'

/** Makes a copy beside a section, with its mark-up, without its history, links and comments. */
export async function duplicateSection(db: Database, person: Person, sectionId: string): Promise<{ id: string }> {
  return db.transaction(async (tx) => {
    const { section } = await askSection(tx, person, sectionId, 'section.duplicate')
    // A copy is a new section on the site, which an archived site does not take.
    await askSite(tx, person, section.siteId, 'section.create')
    const { live } = await storedSection(tx, sectionId)
    const title = `Copy of ${live.section.title}`.slice(0, 200)
    const id = await addSection(tx, {
      siteId: section.siteId,
      practiceId: section.practiceId,
      createdBy: person.userId,
      section: { ...live.section, title },
      markup: live.markup,
    })
    await writeAudit(tx, person, {
      practiceId: section.practiceId,
      act: 'section.duplicate',
      on: `section:${id}`,
      label: title,
      details: { of: sectionId },
    })
    return { id }
  })
}
