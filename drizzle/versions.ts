import { randomUUID } from 'node:crypto'
import { and, desc, eq, gt, isNotNull, sql } from 'drizzle-orm'
import type { Executor } from './client'
import { createLog, loadState } from './log'
import { section, sectionUpdate, sectionVersion } from './schema'

/** Automatic versions closer together than this are not made. */
export const VERSION_EVERY_MINUTES = 15
/** Automatic versions older than this are thinned out to one a day; named and restored ones stay. */
export const THIN_AFTER_DAYS = 60

const lockSection = async (tx: Executor, sectionId: string) => {
  const [row] = await tx.select({ epoch: section.epoch }).from(section).where(eq(section.id, sectionId)).for('update')
  return row ?? null
}

/** Who last changed the section under this epoch, and when; null when nobody has since it was made. */
async function lastHand(db: Executor, sectionId: string, epoch: number) {
  const [row] = await db
    .select({ userId: sectionUpdate.userId, at: sectionUpdate.at })
    .from(sectionUpdate)
    .where(and(eq(sectionUpdate.sectionId, sectionId), eq(sectionUpdate.epoch, epoch), isNotNull(sectionUpdate.userId)))
    .orderBy(desc(sectionUpdate.seq))
    .limit(1)
  return row ?? null
}

/**
 * Keeps the stored state as an automatic version, unless one was kept a short while ago or nothing has changed since the last.
 * Safe to call from several processes at once: the section's row lock lets one of them do it.
 * @returns the version's id, or null when none was needed.
 */
export async function automaticVersion(
  db: Executor,
  sectionId: string,
  everyMinutes = VERSION_EVERY_MINUTES,
  /** The state, when the caller has it in memory; else it is read from the log. */
  given?: { state: Uint8Array; epoch: number; seq: number },
): Promise<string | null> {
  return db.transaction(async (tx) => {
    const locked = await lockSection(tx, sectionId)
    if (!locked) return null
    const [last] = await tx
      .select({ seq: sectionVersion.seq, epoch: sectionVersion.epoch, createdAt: sectionVersion.createdAt })
      .from(sectionVersion)
      .where(eq(sectionVersion.sectionId, sectionId))
      .orderBy(desc(sectionVersion.createdAt))
      .limit(1)
    if (last && Date.now() - last.createdAt.getTime() < everyMinutes * 60_000) return null
    const loaded = given ? null : await loadState(tx, sectionId)
    const stored = given ?? (loaded?.damaged.length ? null : loaded)
    if (!stored || stored.epoch !== locked.epoch || (last && last.epoch === stored.epoch && last.seq >= stored.seq))
      return null
    const hand = await lastHand(tx, sectionId, stored.epoch)
    const id = randomUUID()
    await tx.insert(sectionVersion).values({
      id,
      sectionId,
      epoch: stored.epoch,
      seq: stored.seq,
      kind: 'automatic',
      state: stored.state,
      createdBy: hand?.userId ?? null,
    })
    await thin(tx, sectionId)
    return id
  })
}

/** Of old automatic versions, keeps the last one of each day. */
async function thin(tx: Executor, sectionId: string) {
  await tx.execute(sql`
    delete old from ${sectionVersion} old
    join ${sectionVersion} later on later.section_id = old.section_id and later.kind = 'automatic'
      and date(later.created_at) = date(old.created_at) and later.created_at > old.created_at
    where old.section_id = ${sectionId} and old.kind = 'automatic'
      and old.created_at < now(3) - interval ${THIN_AFTER_DAYS} day`)
}

/** Keeps the stored state under a name. @returns null when there is no such section. */
export async function nameVersion(
  db: Executor,
  version: { sectionId: string; name: string; userId: string },
): Promise<{ id: string; epoch: number; seq: number } | null> {
  return db.transaction(async (tx) => {
    if (!(await lockSection(tx, version.sectionId))) return null
    const stored = await loadState(tx, version.sectionId)
    if (!stored) return null
    const { epoch, seq, state } = stored
    const id = randomUUID()
    await tx.insert(sectionVersion).values({
      id,
      sectionId: version.sectionId,
      epoch,
      seq,
      kind: 'named',
      name: version.name,
      state,
      createdBy: version.userId,
    })
    return { id, epoch, seq }
  })
}

/**
 * Makes an old version the present one, as a new epoch whose first row is the old state. Nothing is lost: the state just left
 * is kept as a version first, and restoring that one undoes the restoring.
 * @returns null when there is no such section or version.
 */
export async function restoreVersion(
  db: Executor,
  wanted: { sectionId: string; versionId: string; userId: string },
): Promise<{ epoch: number; seq: number; before: string } | null> {
  const { sectionId, versionId, userId } = wanted
  return db.transaction(async (tx) => {
    // From here on no sidecar can store an edit of the old epoch: appending takes this lock and compares the epoch.
    const locked = await lockSection(tx, sectionId)
    if (!locked) return null
    const [version] = await tx
      .select({ state: sectionVersion.state, name: sectionVersion.name, createdAt: sectionVersion.createdAt })
      .from(sectionVersion)
      .where(and(eq(sectionVersion.id, versionId), eq(sectionVersion.sectionId, sectionId)))
    if (!version) return null
    const present = await loadState(tx, sectionId)
    if (!present) return null
    const before = randomUUID()
    await tx.insert(sectionVersion).values({
      id: before,
      sectionId,
      epoch: present.epoch,
      seq: present.seq,
      kind: 'automatic',
      name: '',
      state: present.state,
      createdBy: userId,
    })
    const epoch = locked.epoch + 1
    await tx.update(section).set({ epoch, updatedAt: new Date() }).where(eq(section.id, sectionId))
    const { seq } = await createLog(tx, sectionId, version.state, { epoch, userId })
    await tx.insert(sectionVersion).values({
      id: randomUUID(),
      sectionId,
      epoch,
      seq,
      kind: 'restored',
      name: version.name || version.createdAt.toISOString(),
      state: version.state,
      createdBy: userId,
      createdAt: new Date(Date.now() + 1),
    })
    return { epoch, seq, before }
  })
}

/** Rows of the log as a history: who changed the section when, newest first. Rows of older epochs are there too. */
export async function history(
  db: Executor,
  sectionId: string,
  options: { before?: number; limit?: number } = {},
): Promise<{ seq: number; epoch: number; userId: string | null; at: Date; bytes: number }[]> {
  return db
    .select({
      seq: sectionUpdate.seq,
      epoch: sectionUpdate.epoch,
      userId: sectionUpdate.userId,
      at: sectionUpdate.at,
      bytes: sql<number>`length(${sectionUpdate.update})`.mapWith(Number),
    })
    .from(sectionUpdate)
    .where(
      and(
        eq(sectionUpdate.sectionId, sectionId),
        options.before === undefined ? undefined : sql`${sectionUpdate.seq} < ${options.before}`,
        gt(sectionUpdate.seq, 0),
      ),
    )
    .orderBy(desc(sectionUpdate.seq))
    .limit(options.limit ?? 200)
}
