import { and, asc, count, desc, eq, inArray, isNotNull, isNull, like, type SQL, sql } from 'drizzle-orm'
import type { Executor } from '../../../drizzle/client'
import { section, user } from '../../../drizzle/schema'
import type { Person } from '../context.server'
import { askSite } from '../sites/ask-site.server'
import { PER_PAGE, paged, pattern } from './paging.server'
import { freshViews, lastChange, type View } from './refresh-view.server'

export type SectionSort = 'title' | 'updated' | 'created'
export type SectionQuery = {
  search?: string
  sort?: SectionSort
  descending?: boolean
  archived?: boolean
  page?: number
}
export type SectionRow = View & {
  id: string
  title: string
  updatedAt: Date
  /** Who drew last, or made it. */
  updatedBy: string | null
  archived: boolean
}

const ORDER: Record<SectionSort, SQL> = {
  title: sql`${section.title}`,
  updated: lastChange,
  created: sql`${section.createdAt}`,
}

const lastHand = sql<string | null>`coalesce((select u.user_id from section_update u
  where u.section_id = ${section.id} and u.epoch = ${section.epoch} and u.user_id is not null
  order by u.seq desc limit 1), ${section.createdBy})`

/** The sections of a site with their small drawings and readings, 20 a page. */
export async function listSections(
  db: Executor,
  person: Person,
  siteId: string,
  query: SectionQuery,
): Promise<{ rows: SectionRow[]; total: number; pages: number }> {
  await askSite(db, person, siteId, 'site.see')
  const { search, sort = 'title', descending = false, archived = false } = query
  const wanted = and(
    eq(section.siteId, siteId),
    archived ? isNotNull(section.archivedAt) : isNull(section.archivedAt),
    search?.trim() ? like(section.title, pattern(search)) : undefined,
  )
  const [counted] = await db.select({ total: count() }).from(section).where(wanted)
  const { total, pages, offset } = paged(counted?.total ?? 0, query.page)
  // `section` is joined with itself in no way, but a join makes Drizzle write table names, which the sub-selects need.
  const rows = await db
    .select({
      id: section.id,
      title: section.title,
      updatedAt: lastChange,
      hand: lastHand,
      archivedAt: section.archivedAt,
    })
    .from(section)
    .innerJoin(user, eq(user.id, section.createdBy))
    .where(wanted)
    .orderBy((descending ? desc : asc)(ORDER[sort]), asc(section.id))
    .limit(PER_PAGE)
    .offset(offset)
  const views = await freshViews(
    db,
    rows.map(({ id }) => id),
  )
  const hands = [...new Set(rows.map(({ hand }) => hand).filter((hand) => hand !== null))]
  const people = hands.length
    ? await db.select({ id: user.id, name: user.name }).from(user).where(inArray(user.id, hands))
    : []
  const nameOf = new Map(people.map(({ id, name }) => [id, name]))
  return {
    rows: rows.map(({ id, title, updatedAt, hand, archivedAt }) => ({
      id,
      title,
      ...(views.get(id) ?? { thumbnail: null, highest: null, toLeft: null, toRight: null }),
      updatedAt,
      updatedBy: hand ? (nameOf.get(hand) ?? null) : null,
      archived: archivedAt !== null,
    })),
    total,
    pages,
  }
}
