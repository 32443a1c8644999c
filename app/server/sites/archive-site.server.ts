import { eq } from 'drizzle-orm'
import type { Database } from '../../../drizzle/client'
import { site } from '../../../drizzle/schema'
import { writeAudit } from '../audit/write-audit.server'
import type { Person } from '../context.server'
import { pokeSidecar } from '../live/poke.server'
import { askSite } from './ask-site.server'

/** Puts a site away, or takes it out again. Its sections can then be read but not drawn on; open sheets turn read-only. */
export async function archiveSite(db: Database, person: Person, siteId: string, archived: boolean): Promise<void> {
  const changed = await db.transaction(async (tx) => {
    const facts = await askSite(tx, person, siteId, 'site.archive')
    if (facts.site.archived === archived) return false
    const now = new Date()
    await tx
      .update(site)
      .set({ archivedAt: archived ? now : null, updatedAt: now })
      .where(eq(site.id, siteId))
    const { practiceId, name } = facts.site
    const act = archived ? 'site.archive' : 'site.restore'
    await writeAudit(tx, person, { practiceId, act, on: `site:${siteId}`, label: name })
    return true
  })
  if (changed) pokeSidecar()
}
