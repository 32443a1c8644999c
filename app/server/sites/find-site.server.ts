import { eq } from 'drizzle-orm'
import type { Act } from '~/access/acts'
import { allowed } from '~/access/decide'
import type { Executor } from '../../../drizzle/client'
import { site, user } from '../../../drizzle/schema'
import type { Person } from '../context.server'
import { notFound } from '../errors.server'
import { askSite } from './ask-site.server'

export type SiteFound = {
  id: string
  practiceId: string
  name: string
  number: string
  place: string
  client: string
  note: string
  owner: string
  archived: boolean
  updatedAt: Date
}

/** One site with everything written about it, and what the person may do there. */
export async function findSite(
  db: Executor,
  person: Person,
  siteId: string,
): Promise<{ site: SiteFound; acts: Act[] }> {
  const { standing } = await askSite(db, person, siteId, 'site.see')
  const [row] = await db
    .select({ site, owner: user.name })
    .from(site)
    .innerJoin(user, eq(user.id, site.ownerId))
    .where(eq(site.id, siteId))
  if (!row) throw notFound()
  const { id, practiceId, name, number, place, client, note, archivedAt, updatedAt } = row.site
  const archived = archivedAt !== null
  return {
    site: { id, practiceId, name, number, place, client, note: note ?? '', owner: row.owner, archived, updatedAt },
    acts: allowed(standing),
  }
}
