import { eq } from 'drizzle-orm'
import type { Database } from '../../../drizzle/client'
import { site } from '../../../drizzle/schema'
import { writeAudit } from '../audit/write-audit.server'
import type { Person } from '../context.server'
import { askSite } from './ask-site.server'
import { readSiteWords, type SiteWords } from './site-words.server'

/** Replaces what is written about a site. */
export async function editSite(db: Database, person: Person, siteId: string, given: SiteWords): Promise<void> {
  await db.transaction(async (tx) => {
    const facts = await askSite(tx, person, siteId, 'site.edit')
    const words = readSiteWords(given)
    await tx
      .update(site)
      .set({ ...words, updatedAt: new Date() })
      .where(eq(site.id, siteId))
    const { practiceId, name } = facts.site
    const details = name === words.name ? undefined : { was: name }
    await writeAudit(tx, person, { practiceId, act: 'site.edit', on: `site:${siteId}`, label: words.name, details })
  })
}
