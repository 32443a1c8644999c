import { and, desc, eq, isNotNull, isNull, or } from 'drizzle-orm'
import type { Executor } from '../../../drizzle/client'
import { member, section, site, siteShare } from '../../../drizzle/schema'
import type { Person } from '../context.server'
import { freshViews, lastChange, type View } from '../sections/refresh-view.server'

export type RecentRow = View & { id: string; title: string; site: { id: string; name: string }; updatedAt: Date }

const HOW_MANY = 12

/** The sections last drawn on, of the practice the person is working in and of sites shared with them. */
export async function listRecent(db: Executor, person: Person): Promise<RecentRow[]> {
  const here = person.practice ? and(isNotNull(member.id), eq(section.practiceId, person.practice.id)) : undefined
  const rows = await db
    .select({ id: section.id, title: section.title, siteId: site.id, siteName: site.name, updatedAt: lastChange })
    .from(section)
    .innerJoin(site, eq(site.id, section.siteId))
    .leftJoin(member, and(eq(member.organizationId, section.practiceId), eq(member.userId, person.userId)))
    .leftJoin(siteShare, and(eq(siteShare.siteId, site.id), eq(siteShare.userId, person.userId)))
    .where(and(or(here, isNotNull(siteShare.userId)), isNull(section.archivedAt), isNull(site.archivedAt)))
    .orderBy(desc(lastChange), desc(section.id))
    .limit(HOW_MANY)
  const views = await freshViews(
    db,
    rows.map(({ id }) => id),
  )
  return rows.map(({ id, title, siteId, siteName, updatedAt }) => ({
    id,
    title,
    site: { id: siteId, name: siteName },
    updatedAt,
    ...(views.get(id) ?? { thumbnail: null, highest: null, toLeft: null, toRight: null }),
  }))
}
