import { and, desc, eq, inArray } from 'drizzle-orm'
import type { Act } from '~/access/acts'
import { can } from '~/access/decide'
import { standingForSection } from '~/access/facts.server'
import type { Database } from '../../../drizzle/client'
import { audit, sectionVersion, user } from '../../../drizzle/schema'
import { history, nameVersion, restoreVersion } from '../../../drizzle/versions'
import { AppError, must, notFound } from '../errors.server'
import { pokeSidecar } from './poke.server'

/** Who asks; a `Person` of the request context passes. */
export type By = { userId: string; name: string; address: string }

export type VersionRow = {
  id: string
  kind: 'automatic' | 'named' | 'restored'
  name: string
  epoch: number
  seq: number
  at: Date
  /** Who last drew before it was kept (automatic) or who made it. */
  by: string | null
}

async function allowed(db: Database, by: By, sectionId: string, act: Act) {
  const facts = await standingForSection(db, { kind: 'person', userId: by.userId }, sectionId)
  if (!facts) throw notFound()
  must(can(facts.standing, act))
  return facts.section
}

const note = (
  db: Pick<Database, 'insert'>,
  by: By,
  section: { id: string; practiceId: string; title: string },
  act: string,
  details: object,
) =>
  db.insert(audit).values({
    practiceId: section.practiceId,
    actorId: by.userId,
    actorName: by.name,
    act,
    on: `section:${section.id}`,
    label: section.title,
    details,
    address: by.address,
  })

/** The section's versions, newest first. @throws AppError when the history is not theirs to see. */
export async function listVersions(db: Database, by: By, sectionId: string): Promise<VersionRow[]> {
  await allowed(db, by, sectionId, 'history.see')
  return db
    .select({
      id: sectionVersion.id,
      kind: sectionVersion.kind,
      name: sectionVersion.name,
      epoch: sectionVersion.epoch,
      seq: sectionVersion.seq,
      at: sectionVersion.createdAt,
      by: user.name,
    })
    .from(sectionVersion)
    .leftJoin(user, eq(user.id, sectionVersion.createdBy))
    .where(eq(sectionVersion.sectionId, sectionId))
    .orderBy(desc(sectionVersion.createdAt))
}

/** A version's state as one Yjs update, to look at or to compare: apply it to a new document and read that with `readLive`. */
export async function versionState(db: Database, by: By, sectionId: string, versionId: string): Promise<Uint8Array> {
  await allowed(db, by, sectionId, 'history.see')
  const [found] = await db
    .select({ state: sectionVersion.state })
    .from(sectionVersion)
    .where(and(eq(sectionVersion.id, versionId), eq(sectionVersion.sectionId, sectionId)))
  if (!found) throw notFound()
  return found.state
}

/** Keeps the present state under a name. */
export async function makeVersion(db: Database, by: By, sectionId: string, name: string): Promise<{ id: string }> {
  const section = await allowed(db, by, sectionId, 'section.edit')
  const tidy = name.trim()
  if (!tidy || tidy.length > 200) throw new AppError('invalid', 'Give the version a name of at most 200 characters.')
  const made = await nameVersion(db, { sectionId, name: tidy, userId: by.userId })
  if (!made) throw notFound()
  await note(db, by, section, 'version.name', { version: made.id, name: tidy })
  return { id: made.id }
}

/**
 * Makes a version the present state, as a new epoch; the state just left is kept as a version, so it can be undone the same way.
 * Open sheets are told to reload within two seconds; what they had not stored stays with them and can be saved as a copy.
 */
export async function restore(
  db: Database,
  by: By,
  sectionId: string,
  versionId: string,
): Promise<{ epoch: number; before: string }> {
  const section = await allowed(db, by, sectionId, 'history.restore')
  const done = await restoreVersion(db, { sectionId, versionId, userId: by.userId })
  if (!done) throw notFound()
  await note(db, by, section, 'version.restore', { version: versionId, epoch: done.epoch })
  pokeSidecar()
  return { epoch: done.epoch, before: done.before }
}

export type Stretch = {
  userId: string | null
  name: string | null
  from: Date
  to: Date
  edits: number
  firstSeq: number
  lastSeq: number
}
/** Edits of one person with no longer pause than this are one stretch of drawing. */
const PAUSE = 5 * 60_000

/** Who changed the section when, newest first: the rows of the log gathered into stretches of drawing. */
export async function listChanges(
  db: Database,
  by: By,
  sectionId: string,
  options: { before?: number; limit?: number } = {},
): Promise<Stretch[]> {
  await allowed(db, by, sectionId, 'history.see')
  const rows = await history(db, sectionId, { limit: options.limit ?? 500, before: options.before })
  const stretches: Stretch[] = []
  for (const row of rows) {
    const last = stretches.at(-1)
    if (last && last.userId === row.userId && last.from.getTime() - row.at.getTime() < PAUSE) {
      last.from = row.at
      last.firstSeq = row.seq
      last.edits++
    } else
      stretches.push({
        userId: row.userId,
        name: null,
        from: row.at,
        to: row.at,
        edits: 1,
        firstSeq: row.seq,
        lastSeq: row.seq,
      })
  }
  const ids = [...new Set(stretches.map((s) => s.userId).filter((id): id is string => id !== null))]
  const names = ids.length
    ? await db.select({ id: user.id, name: user.name }).from(user).where(inArray(user.id, ids))
    : []
  const nameOf = new Map(names.map((n) => [n.id, n.name]))
  return stretches.map((s) => ({ ...s, name: s.userId ? (nameOf.get(s.userId) ?? null) : null }))
}
