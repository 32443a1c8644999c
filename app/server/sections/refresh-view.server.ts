import { and, eq, inArray, lt, lte, ne, not, or, sql } from 'drizzle-orm'
import { thumbnailSvg } from '~/export'
import { solveSteady } from '~/solver'
import type { Executor } from '../../../drizzle/client'
import { lastSeqs } from '../../../drizzle/log'
import { section, sectionView } from '../../../drizzle/schema'
import { log } from '../log.server'
import { NO_READINGS, type Readings, readingsOf, storedReadings } from './readings.server'
import { type Stored, storedSection } from './stored-section.server'

export type View = Readings & { thumbnail: string | null }

/** A drawing that fails must not take the page with it. */
export function drawn(what: string, draw: () => string): string | null {
  try {
    return draw()
  } catch (error) {
    log.error({ err: error, what }, 'a drawing failed')
    return null
  }
}

/** Stores what lists show of a section: document, thumbnail, readings, title. A newer view that is there already stays. */
export async function refreshView(db: Executor, sectionId: string, stored: Stored): Promise<View> {
  const { epoch, seq } = stored
  const document = stored.live.section
  const solution = solveSteady(document)
  const thumbnail = drawn('thumbnail', () => thumbnailSvg(document, solution))
  const readings = readingsOf(solution)
  const view = { epoch, seq, document, thumbnail, readings, at: new Date() }
  await db
    .insert(sectionView)
    .ignore()
    .values({ sectionId, ...view })
  await db
    .update(sectionView)
    .set(view)
    .where(
      and(
        eq(sectionView.sectionId, sectionId),
        or(lt(sectionView.epoch, epoch), and(eq(sectionView.epoch, epoch), lte(sectionView.seq, seq))),
      ),
    )
  const title = document.title.trim().slice(0, 200)
  // Whoever drew on since has the newer title.
  const newer = sql`exists (select 1 from section_update u
    where u.section_id = ${sectionId} and u.epoch = ${epoch} and u.seq > ${seq})`
  if (title)
    await db
      .update(section)
      .set({ title })
      .where(and(eq(section.id, sectionId), eq(section.epoch, epoch), ne(section.title, title), not(newer)))
  return { ...readings, thumbnail }
}

/**
 * The views of some sections, made anew where the log has gone on since. A section that cannot be read has an empty view: one bad
 * log must not keep a list from opening.
 */
export async function freshViews(db: Executor, sectionIds: string[]): Promise<Map<string, View>> {
  const views = new Map<string, View>()
  if (sectionIds.length === 0) return views
  const kept = await db.select().from(sectionView).where(inArray(sectionView.sectionId, sectionIds))
  const keptOf = new Map(kept.map((row) => [row.sectionId, row]))
  for (const { sectionId, epoch, seq } of await lastSeqs(db, sectionIds)) {
    const row = keptOf.get(sectionId)
    if (row && row.epoch === epoch && row.seq >= seq && row.thumbnail !== null)
      views.set(sectionId, { ...storedReadings(row.readings), thumbnail: row.thumbnail })
    else views.set(sectionId, await remade(db, sectionId))
  }
  return views
}

async function remade(db: Executor, sectionId: string): Promise<View> {
  try {
    return await refreshView(db, sectionId, await storedSection(db, sectionId))
  } catch (error) {
    log.warn({ err: error, sectionId }, 'a view cannot be made')
    return { ...NO_READINGS, thumbnail: null }
  }
}

/** When the section last changed: the newest row of its log, or its own row when that is newer. */
export const lastChange = sql<Date>`greatest(${section.updatedAt}, coalesce((select u.at from section_update u
  where u.section_id = ${section.id} and u.epoch = ${section.epoch} order by u.seq desc limit 1), ${section.updatedAt}))`.mapWith(
  section.updatedAt,
)
