import { CLOSE } from '~/live/codes'
import type { Connection as Db } from '../drizzle/client'
import {
  appendUpdates,
  assemble,
  KEEP_ROWS_DAYS,
  LogUnreadable,
  lastSeqs,
  loadParts,
  saveSnapshot,
} from '../drizzle/log'
import { automaticVersion } from '../drizzle/versions'
import { Refusal } from './admit'
import type { Limits } from './limits'
import type { Log } from './log'
import type { PresenceEntry } from './protocol'
import { Room } from './room'
import { Writer } from './writer'

type Options = {
  db: Db['db']
  limits: Limits
  log: Log
  /** Somebody sent what can only have been made to do harm. */
  onHostile(holder: string): void
  onStored(sectionId: string, seq: number): void
  onPresence(sectionId: string, entries: PresenceEntry[]): void
  onOpen(sectionId: string): void
  onClose(sectionId: string): void
}

/** Handed the stored parts as soon as they are read, before the document is built; resolves when they have left. */
export type Early = (parts: Uint8Array[]) => Promise<void>

/** Every room of this process: loaded once, closed when long empty, kept up with the log. */
export class Rooms {
  private readonly rooms = new Map<string, Promise<Room>>()
  private readonly open = new Map<string, Room>()
  private readonly writer: Writer
  private readonly jobs = new Map<string, Promise<void>>()
  private readonly fetching = new Map<Room, { again: boolean; done: Promise<void> }>()
  private timer: NodeJS.Timeout | null = null
  private readonly lastVersion = new Map<string, number>()

  constructor(private readonly options: Options) {
    this.writer = new Writer({
      append: (updates) => appendUpdates(options.db, updates),
      lanes: 4,
      log: options.log,
    })
  }

  start() {
    this.timer = setInterval(() => this.tick(), 250)
  }

  get all(): Iterable<Room> {
    return this.open.values()
  }
  get size() {
    return this.open.size
  }
  find(sectionId: string) {
    return this.open.get(sectionId)
  }

  /** The section's room of that epoch, loaded from the log when it is not open. @throws Refusal when it cannot be. */
  async enter(sectionId: string, epoch: number, early: Early = async () => {}): Promise<Room> {
    let loading = this.rooms.get(sectionId)
    if (loading) {
      const room = await loading
      // A version was restored and this process has not heard of it yet.
      if (room.epoch < epoch) room.shut(CLOSE.epoch)
      if (!room.closed) return room
      this.drop(room)
      loading = this.rooms.get(sectionId)
    }
    if (!loading) {
      loading = this.load(sectionId, early)
      this.rooms.set(sectionId, loading)
      loading.then(
        (room) => this.open.set(sectionId, room),
        () => this.rooms.delete(sectionId),
      )
    }
    return loading
  }

  private async load(sectionId: string, early: Early): Promise<Room> {
    const { db, log, limits } = this.options
    this.options.onOpen(sectionId)
    try {
      const found = await loadParts(db, sectionId)
      if (!found) throw new Refusal(CLOSE.gone)
      // Building a large document holds up this process for a while; the page can build its own meanwhile.
      const parts = [...(found.snapshot ? [found.snapshot] : []), ...found.rows.map((row) => row.update)]
      await Promise.race([early(parts), new Promise((r) => setTimeout(r, 200))])
      const loaded = await assemble(db, sectionId, found)
      for (const { seq, why } of loaded.damaged)
        log.error({ sectionId, seq, why }, 'a stored row cannot be read; left out')
      return new Room(sectionId, loaded, {
        limits,
        log,
        wake: (room) => this.writer.wake(room),
        onStored: (room, seq) => this.options.onStored(room.sectionId, seq),
        onPresence: (room, entries) => this.options.onPresence(room.sectionId, entries),
        behind: (room) => void this.catchUp(room),
        foldable: (room) => this.fold(room),
        broken: (room, by, why) => {
          log.error({ sectionId, why }, 'an update broke the document in memory; building it anew from the log')
          if (by) this.options.onHostile(by.who.id)
          void this.mend(room)
        },
      })
    } catch (error) {
      this.options.onClose(sectionId)
      if (error instanceof Refusal) throw error
      log.error({ sectionId, why: error instanceof Error ? error.message : String(error) }, 'a room cannot be loaded')
      if (error instanceof LogUnreadable) throw new Refusal(CLOSE.unreadable)
      throw new Refusal(CLOSE.drain, 'The database does not answer. The page tries again.')
    }
  }

  /** Until the log can be read; the members stay and wait. */
  private async mend(room: Room) {
    while (!room.closed) {
      try {
        // What is on its way must be in what is read.
        while (room.storing) await new Promise((r) => setTimeout(r, 5))
        const found = await loadParts(this.options.db, room.sectionId)
        if (!found || found.epoch !== room.epoch) return room.shut(found ? CLOSE.epoch : CLOSE.gone)
        return room.mend(await assemble(this.options.db, room.sectionId, found))
      } catch (error) {
        if (error instanceof LogUnreadable) return room.shut(CLOSE.unreadable)
        await new Promise((r) => setTimeout(r, 200))
      }
    }
  }

  /** Reads rows of other processes from the log and relays them. Calls made meanwhile share one further read. */
  catchUp(room: Room): Promise<void> {
    const running = this.fetching.get(room)
    if (running) {
      running.again = true
      return running.done
    }
    const state = { again: false, done: Promise.resolve() }
    state.done = (async () => {
      try {
        do {
          state.again = false
          const parts = await loadParts(this.options.db, room.sectionId, room.known)
          if (room.closed) return
          if (!parts) room.shut(CLOSE.gone)
          else room.takeIn(parts)
        } while (state.again && !room.closed)
      } catch (error) {
        this.options.log.warn(
          { why: error instanceof Error ? error.message : String(error) },
          'the log cannot be read now',
        )
      } finally {
        this.fetching.delete(room)
      }
    })()
    this.fetching.set(room, state)
    return state.done
  }

  /** Compares every open room with the log: whatever message was lost, a room is right again within a second. */
  async compare() {
    const rooms = [...this.open.values()].filter((room) => room.members.size > 0)
    const seqs = new Map(
      (
        await lastSeqs(
          this.options.db,
          rooms.map((r) => r.sectionId),
        )
      ).map((s) => [s.sectionId, s]),
    )
    for (const room of rooms) {
      const stored = seqs.get(room.sectionId)
      if (!stored) room.shut(CLOSE.gone)
      else if (stored.epoch !== room.epoch) room.shut(CLOSE.epoch)
      else if (stored.seq > room.known) void this.catchUp(room)
    }
  }

  private fold(room: Room) {
    this.job(room.sectionId, async () => {
      if (room.closed || room.damaged) return
      room.rowsSinceFold = 0
      const { state, seq, epoch } = room.snapshot()
      await saveSnapshot(this.options.db, { sectionId: room.sectionId, epoch, seq, state, keepDays: KEEP_ROWS_DAYS })
      await this.version(room)
    })
  }

  /** A version of one's own about every quarter of an hour of drawing. */
  private async version(room: Room) {
    if (!room.changedSinceVersion || room.mending) return
    room.changedSinceVersion = false
    this.lastVersion.set(room.sectionId, Date.now())
    await automaticVersion(this.options.db, room.sectionId, undefined, room.snapshot())
  }

  /** One background job a section at a time; a second one asked for meanwhile is not needed. */
  private job(sectionId: string, work: () => Promise<void>) {
    if (this.jobs.has(sectionId)) return
    const running = work()
      .catch((error: unknown) => {
        this.options.log.warn(
          { sectionId, why: error instanceof Error ? error.message : String(error) },
          'folding failed; the log is whole',
        )
      })
      .finally(() => this.jobs.delete(sectionId))
    this.jobs.set(sectionId, running)
  }

  private tick() {
    const now = Date.now()
    for (const room of [...this.open.values()]) {
      if (room.closed) {
        this.drop(room)
        continue
      }
      room.tellStalled(now)
      if (
        room.changedSinceVersion &&
        now - (this.lastVersion.get(room.sectionId) ?? 0) > 15 * 60_000 &&
        !room.damaged
      ) {
        this.lastVersion.set(room.sectionId, now)
        this.job(room.sectionId, () => this.version(room))
      }
      if (room.emptySince !== null && now - room.emptySince > this.options.limits.idleRoom && !room.busy)
        this.retire(room)
    }
  }

  private retire(room: Room) {
    this.drop(room)
    this.job(room.sectionId, this.farewell(room))
    room.shut(CLOSE.drain)
  }

  /** What is left to do for a room nobody is in: a short log, and a version when something was drawn. */
  private farewell(room: Room): () => Promise<void> {
    const { sectionId, changedSinceVersion: changed } = room
    const fold = room.rowsSinceFold >= this.options.limits.foldRowsIdle
    if (room.damaged || room.mending || (!fold && !changed)) return async () => {}
    const snapshot = room.snapshot()
    return async () => {
      if (fold) await saveSnapshot(this.options.db, { sectionId, keepDays: KEEP_ROWS_DAYS, ...snapshot })
      if (changed) await automaticVersion(this.options.db, sectionId, undefined, snapshot)
    }
  }

  private drop(room: Room) {
    if (this.open.get(room.sectionId) !== room) return
    this.open.delete(room.sectionId)
    this.rooms.delete(room.sectionId)
    this.lastVersion.delete(room.sectionId)
    this.options.onClose(room.sectionId)
  }

  /** Everything stored (as far as the database lets us), long logs folded, nobody left. */
  async close(within: number) {
    if (this.timer) clearInterval(this.timer)
    const settled = await this.writer.settle(within)
    const rooms = [...this.open.values()]
    for (const room of rooms) {
      if (settled && !room.closed) this.job(room.sectionId, this.farewell(room))
      room.shut(CLOSE.drain)
    }
    await Promise.all([...this.jobs.values(), ...[...this.fetching.values()].map((f) => f.done)])
    this.writer.stop()
    this.open.clear()
    this.rooms.clear()
  }
}
