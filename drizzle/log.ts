import { and, asc, eq, gt, inArray, lt, lte, sql } from 'drizzle-orm'
import * as Y from 'yjs'
import type { Executor } from './client'
import { section, sectionSnapshot, sectionUpdate } from './schema'

/**
 * The update log of live sections: append, load, fold. Used by the sidecar, the web server and the seed, so that there is one
 * opinion on what is stored. DEVELOPERS.md "Live document" explains the whole.
 *
 * The one rule everything rests on: whoever appends holds the row lock of the section (SELECT … FOR UPDATE) from before the
 * sequence numbers are drawn until the commit. Within a section, commit order therefore equals `seq` order, and whoever reads
 * up to some `seq` has read everything at or below it; a reader, a fold or another sidecar can never miss a late, lower row.
 */

export type NewUpdate = { sectionId: string; epoch: number; update: Uint8Array; userId: string | null }
/** What an append did for one section: `before` is the last seq that was stored before it (0: none; null: not asked). */
export type Appended = { sectionId: string; before: number; last: number }

/** The section is not there, or its epoch has moved on (an earlier version was restored); nothing was stored. */
export class NotAppended extends Error {
  constructor(
    readonly gone: string[],
    readonly stale: string[],
  ) {
    super(
      `not stored: ${[...gone.map((id) => `${id} is gone`), ...stale.map((id) => `${id} has a new epoch`)].join(', ')}`,
    )
    this.name = 'NotAppended'
  }
}

/** What is stored cannot be read as a document. Never answered with an empty one: that would overwrite the stored one. */
export class LogUnreadable extends Error {
  constructor(sectionId: string, why: string) {
    super(`the log of section ${sectionId} cannot be read: ${why}`)
    this.name = 'LogUnreadable'
  }
}

/** Folded rows are kept this long, so that the history can say who changed what when; versions are kept beyond it. */
export const KEEP_ROWS_DAYS = 180

/**
 * Store updates of any number of sections in one transaction, in the order given.
 * @throws NotAppended when one of the sections is gone or has another epoch; then nothing at all is stored.
 */
export async function appendUpdates(db: Executor, updates: NewUpdate[]): Promise<Appended[]> {
  if (updates.length === 0) return []
  const ids = [...new Set(updates.map((u) => u.sectionId))].sort()
  const done = await appendInOneTrip(db, updates)
  if (done) return ids.map((id) => ({ sectionId: id, before: done.before.get(id) ?? 0, last: done.last.get(id) ?? 0 }))
  return db.transaction(async (tx) => {
    // Locked in one order everywhere, so two sidecars cannot wait for each other.
    const locked = await tx
      .select({ id: section.id, epoch: section.epoch })
      .from(section)
      .where(inArray(section.id, ids))
      .orderBy(asc(section.id))
      .for('update')
    const epochs = new Map(locked.map((row) => [row.id, row.epoch]))
    const gone = ids.filter((id) => !epochs.has(id))
    const stale = [
      ...new Set(
        updates.filter((u) => epochs.has(u.sectionId) && epochs.get(u.sectionId) !== u.epoch).map((u) => u.sectionId),
      ),
    ]
    if (gone.length || stale.length) throw new NotAppended(gone, stale)

    const before = new Map((await lastSeqs(tx, ids)).map((row) => [row.sectionId, row.seq]))
    const [result] = await tx.insert(sectionUpdate).values(updates)
    const last = new Map<string, number>()
    // One insert of known length draws consecutive numbers (innodb_autoinc_lock_mode 0 and 1; MariaDB's default is 1).
    updates.forEach((update, i) => {
      last.set(update.sectionId, result.insertId + i)
    })
    return ids.map((id) => ({
      sectionId: id,
      before: before.get(id) ?? 0,
      last: last.get(id) ?? 0,
    }))
  })
}

/**
 * The same transaction as one statement of MariaDB's, so that a commit costs one trip instead of four: on a busy machine each
 * trip waits for two processes to be scheduled, and every edit waits for the commit before it is shown.
 * What stood before is read under the same lock: the app, too, writes rows (a new title), which an open room must notice.
 * @returns first and last seq around each section's rows, or null when a section is gone or stale and nothing was stored.
 */
async function appendInOneTrip(
  db: Executor,
  updates: NewUpdate[],
): Promise<{ before: Map<string, number>; last: Map<string, number> } | null> {
  const sections = [...new Map(updates.map((u) => [`${u.sectionId} ${u.epoch}`, u])).values()]
  const wanted = sql.join(
    sections.map((u) => sql`(id = ${u.sectionId} and epoch = ${u.epoch})`),
    sql` or `,
  )
  const rows = sql.join(
    updates.map((u) => sql`(${u.sectionId}, ${u.epoch}, ${sql.param(u.update, sectionUpdate.update)}, ${u.userId})`),
    sql`, `,
  )
  const [sets] = await db.execute(sql`begin not atomic
    declare found int default 0;
    declare exit handler for sqlexception begin rollback; resignal; end;
    start transaction;
    select count(*) into found from (select id from section where ${wanted} order by id for update) locked;
    if found = ${sections.length} then
      select s.id as section_id, greatest(
        coalesce((select max(u.seq) from section_update u where u.section_id = s.id and u.epoch = s.epoch), 0),
        coalesce((select n.seq from section_snapshot n where n.section_id = s.id and n.epoch = s.epoch), 0)) as before_seq
        from section s where ${wanted};
      insert into section_update (section_id, epoch, \`update\`, user_id) values ${rows};
      select last_insert_id() as first;
      commit;
    else
      rollback;
    end if;
  end`)
  const first = firstOf(sets)
  if (first === null) return null
  return {
    before: beforeOf(sets),
    last: new Map(updates.map((update, i) => [update.sectionId, first + i])),
  }
}

/** The seqs that stood before, from the result sets of `appendInOneTrip`. */
function beforeOf(sets: unknown): Map<string, number> {
  const before = new Map<string, number>()
  for (const set of Array.isArray(sets) ? sets : [])
    for (const row of Array.isArray(set) ? set : [set])
      if (typeof row === 'object' && row !== null && 'before_seq' in row)
        before.set(String(row.section_id), Number(row.before_seq))
  return before
}

/** The one number in the result sets of `appendInOneTrip`. */
function firstOf(sets: unknown): number | null {
  for (const set of Array.isArray(sets) ? sets : []) {
    const row: unknown = Array.isArray(set) ? set[0] : set
    if (typeof row === 'object' && row !== null && 'first' in row) return Number(row.first)
  }
  return null
}

/** Epoch and last stored seq of each section that exists. */
export async function lastSeqs(
  db: Executor,
  sectionIds: string[],
): Promise<{ sectionId: string; epoch: number; seq: number }[]> {
  if (sectionIds.length === 0) return []
  const rows = await db
    .select({
      sectionId: section.id,
      epoch: section.epoch,
      // Spelt out: in a select from one table Drizzle leaves the table names away, and `epoch = epoch` would then compare the
      // inner column with itself.
      row: sql<number | null>`(select u.seq from section_update u
        where u.section_id = section.id and u.epoch = section.epoch order by u.seq desc limit 1)`,
      folded: sql<number | null>`(select s.seq from section_snapshot s
        where s.section_id = section.id and s.epoch = section.epoch)`,
    })
    .from(section)
    .where(inArray(section.id, sectionIds))
  return rows.map(({ sectionId, epoch, row, folded }) => ({
    sectionId,
    epoch,
    seq: Math.max(Number(row ?? 0), Number(folded ?? 0)),
  }))
}

export type Parts = {
  epoch: number
  /** Last seq in the parts (or `after` when there is nothing newer). */
  seq: number
  snapshot: Uint8Array | null
  rows: { seq: number; update: Uint8Array }[]
}

/**
 * The snapshot and the log past it, as stored, in one consistent read. With `after`, only what is newer than that seq: the
 * snapshot is then left out unless it goes beyond `after` (the rows in between may have been folded and dropped).
 * @returns null when there is no such section.
 */
export async function loadParts(db: Executor, sectionId: string, after = -1): Promise<Parts | null> {
  return db.transaction(
    async (tx) => {
      const [head] = await tx
        .select({ epoch: section.epoch, folded: sectionSnapshot.seq })
        .from(section)
        .leftJoin(
          sectionSnapshot,
          and(eq(sectionSnapshot.sectionId, section.id), eq(sectionSnapshot.epoch, section.epoch)),
        )
        .where(eq(section.id, sectionId))
      if (!head) return null
      const wanted = head.folded !== null && head.folded > after
      const [snapshot] = wanted
        ? await tx
            .select({ seq: sectionSnapshot.seq, state: sectionSnapshot.state })
            .from(sectionSnapshot)
            .where(and(eq(sectionSnapshot.sectionId, sectionId), eq(sectionSnapshot.epoch, head.epoch)))
        : []
      const from = Math.max(after, snapshot?.seq ?? -1)
      const rows = await tx
        .select({ seq: sectionUpdate.seq, update: sectionUpdate.update })
        .from(sectionUpdate)
        .where(
          and(eq(sectionUpdate.sectionId, sectionId), eq(sectionUpdate.epoch, head.epoch), gt(sectionUpdate.seq, from)),
        )
        .orderBy(asc(sectionUpdate.seq))
      return { epoch: head.epoch, seq: rows.at(-1)?.seq ?? from, snapshot: snapshot?.state ?? null, rows }
    },
    { isolationLevel: 'repeatable read', accessMode: 'read only' },
  )
}

export type Loaded = {
  doc: Y.Doc
  epoch: number
  seq: number
  /** The parts as stored; together they are the document. */
  parts: Uint8Array[]
  /** Log rows past the snapshot. */
  rows: number
  /** Stored rows that could not be read and were left out; such a log is never folded, so nothing is made worse. */
  damaged: { seq: number; why: string }[]
}

const why = (error: unknown) => (error instanceof Error ? error.message : String(error))

/** null when the update can be decoded to its end; otherwise what is wrong with it. */
export function flaw(update: Uint8Array): string | null {
  try {
    Y.decodeUpdate(update)
    return null
  } catch (error) {
    return why(error)
  }
}

/**
 * The section's document as stored.
 * @returns null when there is no such section.
 * @throws LogUnreadable when nothing is stored, or the snapshot is broken and the kept rows do not make up for it.
 */
export async function loadDoc(db: Executor, sectionId: string): Promise<Loaded | null> {
  const found = await loadParts(db, sectionId)
  return found && assemble(db, sectionId, found)
}

/** Builds the document from its stored parts. @throws LogUnreadable as `loadDoc`. */
export async function assemble(db: Executor, sectionId: string, found: Parts): Promise<Loaded> {
  const { epoch, seq, snapshot, rows } = found
  if (!snapshot && rows.length === 0) throw new LogUnreadable(sectionId, 'nothing is stored')
  const parts = [...(snapshot ? [snapshot] : []), ...rows.map((row) => row.update)]
  const doc = new Y.Doc()
  try {
    doc.transact(() => {
      for (const part of parts) Y.applyUpdate(doc, part, 'log')
    }, 'log')
    return { doc, epoch, seq, parts, rows: rows.length, damaged: [] }
  } catch {
    doc.destroy()
    return assembleDamaged(db, sectionId, found)
  }
}

/** Something stored cannot be read: finds out what, leaves it out, and makes up for a broken snapshot from the kept rows. */
async function assembleDamaged(db: Executor, sectionId: string, found: Parts): Promise<Loaded> {
  const { epoch, seq, snapshot } = found
  const rows = [...found.rows]
  const damaged: Loaded['damaged'] = []
  const sound: { seq: number; update: Uint8Array }[] = []
  const broken = snapshot && flaw(snapshot)
  if (snapshot && broken === null) sound.push({ seq: 0, update: snapshot })
  else if (snapshot) {
    const older = await rowsBefore(db, sectionId, epoch, rows[0]?.seq ?? Number.MAX_SAFE_INTEGER)
    if (older.length === 0) throw new LogUnreadable(sectionId, `the snapshot is broken (${broken})`)
    damaged.push({ seq: 0, why: `the snapshot is broken (${broken}); read from the log instead` })
    rows.unshift(...older)
  }
  for (const row of rows) {
    const wrong = flaw(row.update)
    if (wrong === null) sound.push(row)
    else damaged.push({ seq: row.seq, why: wrong })
  }
  // Decodable does not mean applicable: one at a time, starting afresh without the culprit.
  let doc = new Y.Doc()
  const kept: Uint8Array[] = []
  for (const part of sound) {
    try {
      Y.applyUpdate(doc, part.update, 'log')
      kept.push(part.update)
    } catch (error) {
      damaged.push({ seq: part.seq, why: why(error) })
      doc = new Y.Doc()
      for (const good of kept) Y.applyUpdate(doc, good, 'log')
    }
  }
  if (broken && doc.store.pendingStructs !== null)
    throw new LogUnreadable(sectionId, 'the snapshot is broken and the log does not reach back to the beginning')
  return { doc, epoch, seq, parts: kept, rows: rows.length, damaged }
}

const rowsBefore = (db: Executor, sectionId: string, epoch: number, before: number) =>
  db
    .select({ seq: sectionUpdate.seq, update: sectionUpdate.update })
    .from(sectionUpdate)
    .where(
      and(
        eq(sectionUpdate.sectionId, sectionId),
        eq(sectionUpdate.epoch, epoch),
        sql`${sectionUpdate.seq} < ${before}`,
      ),
    )
    .orderBy(asc(sectionUpdate.seq))

export type State = { state: Uint8Array; epoch: number; seq: number; damaged: Loaded['damaged'] }

/**
 * The section's stored state as one update (`Y.applyUpdate(new Y.Doc(), state)`), with its epoch and last seq.
 * @returns null when there is no such section. @throws LogUnreadable as `loadDoc`.
 */
export async function loadState(db: Executor, sectionId: string): Promise<State | null> {
  const loaded = await loadDoc(db, sectionId)
  if (!loaded) return null
  const { doc, epoch, seq, parts, damaged } = loaded
  const only = parts.length === 1 ? parts[0] : undefined
  const state = only ?? Y.encodeStateAsUpdate(doc)
  doc.destroy()
  return { state, epoch, seq, damaged }
}

/**
 * Store the first state of a section (or of a new epoch). Only the server does this, once, inside the transaction that
 * creates the section: a document seeded by pages ends up doubled.
 */
export async function createLog(
  tx: Executor,
  sectionId: string,
  state: Uint8Array,
  options: { epoch?: number; userId?: string | null } = {},
): Promise<{ seq: number }> {
  const epoch = options.epoch ?? 1
  const [result] = await tx
    .insert(sectionUpdate)
    .values({ sectionId, epoch, update: state, userId: options.userId ?? null })
  await tx.insert(sectionSnapshot).values({ sectionId, epoch, seq: result.insertId, state })
  return { seq: result.insertId }
}

export type Compacted = { folded: number; dropped: number; seq: number; skipped?: string }

/**
 * Fold the log into the snapshot row. The state is read and merged without any lock (everything at or below its last seq is
 * in it, see above; what arrives meanwhile has a higher seq and stays in the log); then one transaction writes the snapshot
 * unless a newer one is there, reads it back, and only then drops folded rows that are older than KEEP_ROWS_DAYS.
 */
export async function compact(
  db: Executor,
  sectionId: string,
  options: { keepDays?: number; atLeastRows?: number } = {},
): Promise<Compacted> {
  const loaded = await loadDoc(db, sectionId)
  if (!loaded) return { folded: 0, dropped: 0, seq: 0, skipped: 'gone' }
  const { doc, epoch, seq, rows, damaged } = loaded
  const pending = doc.store.pendingStructs !== null || doc.store.pendingDs !== null
  const state = Y.encodeStateAsUpdate(doc)
  doc.destroy()
  if (damaged.length) return { folded: 0, dropped: 0, seq, skipped: `${damaged.length} rows cannot be read` }
  if (pending) return { folded: 0, dropped: 0, seq, skipped: 'the log has a gap' }
  if (rows < (options.atLeastRows ?? 1)) return { folded: 0, dropped: 0, seq, skipped: 'nothing to fold' }
  const dropped = await saveSnapshot(db, { sectionId, epoch, seq, state, keepDays: options.keepDays ?? KEEP_ROWS_DAYS })
  return { folded: rows, dropped, seq }
}

/** The writing half of `compact`. `state` must hold everything of that epoch at or below `seq`. Returns the rows dropped. */
export async function saveSnapshot(
  db: Executor,
  {
    sectionId,
    epoch,
    seq,
    state,
    keepDays,
  }: { sectionId: string; epoch: number; seq: number; state: Uint8Array; keepDays: number },
): Promise<number> {
  return db.transaction(async (tx) => {
    const own = and(eq(sectionSnapshot.sectionId, sectionId), eq(sectionSnapshot.epoch, epoch))
    const [{ affectedRows: newer }] = await tx
      .update(sectionSnapshot)
      .set({ seq, state, at: sql`now(3)` })
      .where(and(own, lt(sectionSnapshot.seq, seq)))
    const [{ affectedRows: first }] = newer
      ? [{ affectedRows: 0 }]
      : await tx.insert(sectionSnapshot).ignore().values({ sectionId, epoch, seq, state })
    const [back] = await tx
      .select({ seq: sectionSnapshot.seq, state: sectionSnapshot.state })
      .from(sectionSnapshot)
      .where(own)
    const same = back?.seq === seq && Buffer.compare(back.state, state) === 0
    // Somebody else's may stand there instead if it reaches at least as far and can be read.
    const asGood = back && back.seq >= seq && flaw(back.state) === null
    if (newer || first ? !same : !asGood)
      throw new LogUnreadable(sectionId, 'the snapshot just written does not read back')
    const [result] = await tx
      .delete(sectionUpdate)
      .where(
        and(
          eq(sectionUpdate.sectionId, sectionId),
          eq(sectionUpdate.epoch, epoch),
          lte(sectionUpdate.seq, seq),
          sql`${sectionUpdate.at} < now(3) - interval ${keepDays} day`,
        ),
      )
    return result.affectedRows
  })
}
