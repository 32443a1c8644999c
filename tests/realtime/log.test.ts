import { and, eq } from 'drizzle-orm'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import * as Y from 'yjs'
import {
  appendUpdates,
  compact,
  createLog,
  LogUnreadable,
  lastSeqs,
  loadDoc,
  loadParts,
  loadState,
  NotAppended,
} from '../../drizzle/log'
import { section, sectionSnapshot, sectionUpdate, sectionVersion } from '../../drizzle/schema'
import { automaticVersion, history, nameVersion, restoreVersion } from '../../drizzle/versions'
import { testConnection } from '../setup/clean'
import { firstState, makePractice, type Practice, seeded } from './support'

/** A writer with its own document: each call gives one update. */
function pen(state = firstState()) {
  const doc = new Y.Doc()
  Y.applyUpdate(doc, state)
  return (key: string, value: unknown): Uint8Array => {
    const before = Y.encodeStateVector(doc)
    doc.getMap('m').set(key, value)
    return Y.encodeStateAsUpdate(doc, before)
  }
}

describe('the update log', () => {
  const connection = testConnection(12)
  const { db } = connection
  let practice: Practice
  beforeAll(async () => {
    practice = await makePractice(db)
  })
  afterAll(() => connection.close())

  const rowsOf = (sectionId: string) => db.select().from(sectionUpdate).where(eq(sectionUpdate.sectionId, sectionId))
  const contents = async (sectionId: string) => (await loadDoc(db, sectionId))?.doc.getMap('m').toJSON()

  it('reads back what was appended, in order, with who wrote it', async () => {
    const sectionId = await practice.section()
    const write = pen()
    const userId = practice.principal.userId
    const first = await appendUpdates(db, [
      { sectionId, epoch: 1, update: write('a', 1), userId },
      { sectionId, epoch: 1, update: write('a', 2), userId },
    ])
    const second = await appendUpdates(db, [{ sectionId, epoch: 1, update: write('b', 3), userId }])
    expect(second[0]?.before).toBe(first[0]?.last)
    expect(await contents(sectionId)).toEqual({ a: 2, b: 3 })
    expect((await lastSeqs(db, [sectionId]))[0]?.seq).toBe(second[0]?.last)
    expect((await history(db, sectionId)).map((row) => row.userId)).toEqual([userId, userId, userId, null])
  })

  it('stores many sections in one transaction, and none of them when one has moved on', async () => {
    const [one, two] = [await practice.section(), await practice.section()]
    const update = pen()('a', 1)
    await db.update(section).set({ epoch: 2 }).where(eq(section.id, two))
    const append = appendUpdates(db, [
      { sectionId: one, epoch: 1, update, userId: null },
      { sectionId: two, epoch: 1, update, userId: null },
      { sectionId: 'nowhere', epoch: 1, update, userId: null },
    ])
    await expect(append).rejects.toMatchObject({ stale: [two], gone: ['nowhere'] })
    await expect(append).rejects.toBeInstanceOf(NotAppended)
    expect(await contents(one)).toEqual({})
    // The sidecar's way in one trip keeps to the same.
    const inOne = appendUpdates(db, [
      { sectionId: one, epoch: 1, update, userId: null },
      { sectionId: two, epoch: 1, update, userId: null },
    ])
    await expect(inOne).rejects.toMatchObject({ stale: [two], gone: [] })
    expect(await contents(one)).toEqual({})
  })

  it('stores in one trip exactly as in four, bytes and order alike', async () => {
    const [one, two] = [await practice.section(), await practice.section()]
    const { userId } = practice.principal
    const write = pen()
    const odd = write('odd', '\\\'" \u0000 % ? `')
    const done = await appendUpdates(db, [
      { sectionId: one, epoch: 1, update: write('a', 1), userId },
      { sectionId: two, epoch: 1, update: pen()('b', 2), userId: null },
      { sectionId: one, epoch: 1, update: odd, userId },
    ])
    const rows = await rowsOf(one)
    expect(rows.at(-1)?.seq).toBe(done.find((d) => d.sectionId === one)?.last)
    expect(Buffer.compare(rows.at(-1)?.update ?? new Uint8Array(), odd)).toBe(0)
    expect((await lastSeqs(db, [two]))[0]?.seq).toBe(done.find((d) => d.sectionId === two)?.last)
    expect(await contents(two)).toEqual({ b: 2 })
    expect(rows.map((row) => row.userId)).toEqual([null, userId, userId])
  })

  it('says what stood before, so that a room notices a row of somebody else’s', async () => {
    const sectionId = await practice.section()
    const write = pen()
    const one = (value: number) => appendUpdates(db, [{ sectionId, epoch: 1, update: write('a', value), userId: null }])
    const [first] = await one(1)
    const [second] = await one(2)
    expect(second?.before).toBe(first?.last)
    await compact(db, sectionId, { keepDays: -1 })
    const [third] = await one(3)
    expect(third?.before).toBe(second?.last)
  })

  it('loses nothing when folding meets appending, whoever appends', async () => {
    const sectionId = await practice.section()
    let appending = true
    const expected: Record<string, number> = {}
    const writers = [1, 2, 3].map(async (w) => {
      const write = pen()
      for (let i = 0; i < 60; i++) {
        const key = `w${w}.${i}`
        await appendUpdates(db, [{ sectionId, epoch: 1, update: write(key, i), userId: null }])
        expected[key] = i
      }
    })
    const folding = [0, 1].map(async () => {
      let folds = 0
      // keepDays −1 drops every folded row at once: nothing but the snapshot can then save it.
      while (appending) if ((await compact(db, sectionId, { keepDays: -1 })).folded > 0) folds++
      return folds
    })
    await Promise.all(writers)
    appending = false
    const folds = (await Promise.all(folding)).reduce((n, f) => n + f, 0)
    expect(folds).toBeGreaterThan(3)
    expect(await contents(sectionId)).toEqual(expected)
    await compact(db, sectionId, { keepDays: -1 })
    expect(await rowsOf(sectionId)).toEqual([])
    expect(await contents(sectionId)).toEqual(expected)
  })

  it('lets a reader that is behind catch up although the rows it missed were folded and dropped', async () => {
    const sectionId = await practice.section()
    const write = pen()
    const seen = (await loadParts(db, sectionId))?.seq ?? 0
    for (let i = 0; i < 10; i++) await appendUpdates(db, [{ sectionId, epoch: 1, update: write('n', i), userId: null }])
    await compact(db, sectionId, { keepDays: -1 })
    await appendUpdates(db, [{ sectionId, epoch: 1, update: write('last', true), userId: null }])
    const parts = await loadParts(db, sectionId, seen)
    expect(parts?.snapshot).not.toBeNull()
    expect(parts?.rows).toHaveLength(1)
    const next = await loadParts(db, sectionId, parts?.seq)
    expect(next).toMatchObject({ snapshot: null, rows: [], seq: parts?.seq })
  })

  it('keeps rows that are young enough to say who changed what, and an older snapshot never replaces a newer one', async () => {
    const sectionId = await practice.section()
    const write = pen()
    await appendUpdates(db, [{ sectionId, epoch: 1, update: write('a', 1), userId: practice.principal.userId }])
    const folded = await compact(db, sectionId)
    expect(folded).toMatchObject({ folded: 1, dropped: 0 })
    expect(await rowsOf(sectionId)).toHaveLength(2)
    expect(await compact(db, sectionId)).toMatchObject({ skipped: 'nothing to fold' })
  })

  it('leaves out a row that cannot be read, says so, and never folds such a log', async () => {
    const sectionId = await practice.section()
    const write = pen()
    const [good, bad, later] = [write('a', 1), write('lost', 1), pen()('b', 2)]
    for (const update of [good, bad, later]) await appendUpdates(db, [{ sectionId, epoch: 1, update, userId: null }])
    const rows = await rowsOf(sectionId)
    await db
      .update(sectionUpdate)
      .set({ update: new Uint8Array([1, 1, 255, 255, 7]) })
      .where(eq(sectionUpdate.seq, rows[2]?.seq ?? 0))
    const loaded = await loadDoc(db, sectionId)
    expect(loaded?.damaged).toHaveLength(1)
    expect(loaded?.damaged[0]?.seq).toBe(rows[2]?.seq)
    expect(loaded?.doc.getMap('m').toJSON()).toEqual({ a: 1, b: 2 })
    expect((await compact(db, sectionId)).skipped).toMatch(/cannot be read/)
  })

  it('reads the kept rows when the snapshot is broken, and refuses rather than show an empty sheet', async () => {
    const sectionId = await practice.section()
    const write = pen()
    await appendUpdates(db, [{ sectionId, epoch: 1, update: write('a', 1), userId: null }])
    await compact(db, sectionId)
    const spoil = () =>
      db
        .update(sectionSnapshot)
        .set({ state: new Uint8Array([9, 9, 9]) })
        .where(and(eq(sectionSnapshot.sectionId, sectionId), eq(sectionSnapshot.epoch, 1)))
    await spoil()
    expect(await contents(sectionId)).toEqual({ a: 1 })
    await db.delete(sectionUpdate).where(eq(sectionUpdate.sectionId, sectionId))
    await expect(loadState(db, sectionId)).rejects.toBeInstanceOf(LogUnreadable)
    expect(await loadState(db, 'nowhere')).toBeNull()
  })

  it('restores an old version as a new epoch, reversibly, and refuses late edits of the old one', async () => {
    const sectionId = await practice.section()
    const { userId } = practice.principal
    const write = pen()
    await appendUpdates(db, [{ sectionId, epoch: 1, update: write('a', 'old'), userId }])
    const named = await nameVersion(db, { sectionId, name: 'For the client', userId })
    await appendUpdates(db, [{ sectionId, epoch: 1, update: write('a', 'new'), userId }])
    const restored = await restoreVersion(db, { sectionId, versionId: named?.id ?? '', userId })
    expect(restored?.epoch).toBe(2)
    expect(await contents(sectionId)).toEqual({ a: 'old' })
    const late = appendUpdates(db, [{ sectionId, epoch: 1, update: write('a', 'late'), userId }])
    await expect(late).rejects.toMatchObject({ stale: [sectionId] })
    await restoreVersion(db, { sectionId, versionId: restored?.before ?? '', userId })
    expect(await contents(sectionId)).toEqual({ a: 'new' })
    const kinds = await db
      .select({ kind: sectionVersion.kind })
      .from(sectionVersion)
      .where(eq(sectionVersion.sectionId, sectionId))
    expect(kinds.map((v) => v.kind).sort()).toEqual(['automatic', 'automatic', 'named', 'restored', 'restored'])
    expect(await restoreVersion(db, { sectionId, versionId: 'nowhere', userId })).toBeNull()
  })

  it('keeps one automatic version for a stretch of drawing, made by one of several processes', async () => {
    const sectionId = await practice.section()
    const { userId } = practice.principal
    await appendUpdates(db, [{ sectionId, epoch: 1, update: pen()('a', 1), userId }])
    const made = await Promise.all([1, 2, 3].map(() => automaticVersion(db, sectionId)))
    expect(made.filter(Boolean)).toHaveLength(1)
    expect(await automaticVersion(db, sectionId, 0)).toBeNull()
    await appendUpdates(db, [{ sectionId, epoch: 1, update: pen()('b', 1), userId }])
    expect(await automaticVersion(db, sectionId)).toBeNull()
    expect(await automaticVersion(db, sectionId, 0)).not.toBeNull()
  })

  it('folds a random history into exactly what its updates say', async () => {
    const random = seeded(7)
    const sectionId = await practice.section()
    const doc = new Y.Doc()
    Y.applyUpdate(doc, firstState())
    for (let i = 0; i < 120; i++) {
      const before = Y.encodeStateVector(doc)
      const key = `k${random.int(12)}`
      doc.transact(() => {
        const m = doc.getMap<unknown>('m')
        if (random.bool(0.3)) m.delete(key)
        else m.set(key, random.bool() ? i : new Y.Map([['z', i]]))
      })
      const update = Y.encodeStateAsUpdate(doc, before)
      await appendUpdates(db, [{ sectionId, epoch: 1, update, userId: null }])
      if (random.bool(0.1)) await compact(db, sectionId, { keepDays: random.bool() ? -1 : 30 })
    }
    expect(await contents(sectionId)).toEqual(doc.getMap('m').toJSON())
  })

  it('refuses to make a log twice', async () => {
    const sectionId = await practice.section()
    await expect(createLog(db, sectionId, firstState())).rejects.toThrow()
  })
})
