import { and, asc, count, desc, eq, isNotNull, isNull, like, or, type SQL, sql } from 'drizzle-orm'
import type { Act } from '~/access/acts'
import { allowed } from '~/access/decide'
import { gradesOf } from '~/access/facts.server'
import type { Executor } from '../../../drizzle/client'
import { member, section, site, siteShare } from '../../../drizzle/schema'
import type { Person } from '../context.server'
import { PER_PAGE, paged, pattern } from '../sections/paging.server'

export type SiteSort = 'name' | 'number' | 'updated' | 'sections'
export type SiteQuery = { search?: string; sort?: SiteSort; descending?: boolean; archived?: boolean; page?: number }
export type SiteRow = {
  id: string
  name: string
  number: string
  place: string
  client: string
  /** Sections that are not archived. */
  sections: number
  updatedAt: Date
  archived: boolean
  /** Shared with the person from another practice. */
  shared: boolean
  acts: Act[]
}

const sections = sql<number>`(select count(*) from ${section} s where s.site_id = ${site.id} and s.archived_at is null)`
const ORDER: Record<SiteSort, SQL> = {
  name: sql`${site.name}`,
  number: sql`${site.number}`,
  updated: sql`${site.updatedAt}`,
  sections,
}

/** The sites the person may see: those of the practice they are working in, and those shared with them. 20 a page. */
export async function listSites(
  db: Executor,
  person: Person,
  query: SiteQuery,
): Promise<{ rows: SiteRow[]; total: number; pages: number }> {
  const { search, sort = 'name', descending = false, archived = false } = query
  const belongs = and(eq(member.organizationId, site.practiceId), eq(member.userId, person.userId))
  const isShared = and(eq(siteShare.siteId, site.id), eq(siteShare.userId, person.userId))
  const here = person.practice ? and(isNotNull(member.id), eq(site.practiceId, person.practice.id)) : undefined
  const found = search?.trim() ? pattern(search) : null
  const wanted = and(
    or(here, isNotNull(siteShare.userId)),
    archived ? isNotNull(site.archivedAt) : isNull(site.archivedAt),
    found
      ? or(like(site.name, found), like(site.number, found), like(site.place, found), like(site.client, found))
      : undefined,
  )
  const [counted] = await db
    .select({ total: count() })
    .from(site)
    .leftJoin(member, belongs)
    .leftJoin(siteShare, isShared)
    .where(wanted)
  const { total, pages, offset } = paged(counted?.total ?? 0, query.page)
  const rows = await db
    .select({ site, sections, role: member.role, share: siteShare.role })
    .from(site)
    .leftJoin(member, belongs)
    .leftJoin(siteShare, isShared)
    .where(wanted)
    // The id last, so that equal rows do not change places between two pages.
    .orderBy((descending ? desc : asc)(ORDER[sort]), asc(site.id))
    .limit(PER_PAGE)
    .offset(offset)
  return {
    rows: rows.map((row) => {
      const { id, name, number, place, client, updatedAt, archivedAt, ownerId } = row.site
      const standing = {
        grades: gradesOf(row.role, row.share, ownerId === person.userId),
        archived: archivedAt !== null,
      }
      return {
        id,
        name,
        number,
        place,
        client,
        sections: Number(row.sections),
        updatedAt,
        archived: standing.archived,
        shared: row.role === null,
        acts: allowed(standing),
      }
    }),
    total,
    pages,
  }
}
