import type { Appended, NewUpdate } from '../drizzle/log'
import { NotAppended } from '../drizzle/log'
import type { Log } from './log'

/** Something that has edits to store, in order: a room. */
export type Source = {
  readonly sectionId: string
  /** Everything waiting, at most about `bytes`; the source keeps it until told. Empty when nothing waits. */
  take(bytes: number): NewUpdate[]
  /** What was taken is committed. `done` is null when nothing had to be written. */
  stored(done: Appended | null): void
  /** It can never be stored: the section is gone, has a new epoch, or the database cannot hold it. */
  refused(why: 'gone' | 'stale' | 'unstorable'): void
  /** More has been waiting since `take`. */
  hasMore(): boolean
}

type Append = (updates: NewUpdate[]) => Promise<Appended[]>
type Options = { append: Append; lanes: number; log: Log; batchBytes?: number }

/**
 * Group commit. Rooms are spread over a few lanes; a lane has one transaction at a time under way, with everything that its
 * rooms had waiting when it began. While it runs the next batch gathers, so there is no timer to tune: an idle room is stored
 * at once, a busy one in ever larger groups. When the database is away a lane tries again, in order, until it is back.
 */
export class Writer {
  private readonly lanes: Lane[]
  private next = 0
  private readonly laneOf = new WeakMap<Source, Lane>()
  constructor(options: Options) {
    this.lanes = Array.from({ length: options.lanes }, () => new Lane(options))
  }
  wake(source: Source) {
    let lane = this.laneOf.get(source)
    if (!lane) {
      lane = this.lanes[this.next++ % this.lanes.length] as Lane
      this.laneOf.set(source, lane)
    }
    lane.wake(source)
  }
  /** Resolves when nothing waits any more, or after `within` ms. */
  async settle(within: number): Promise<boolean> {
    const end = Date.now() + within
    while (this.lanes.some((lane) => lane.busy)) {
      if (Date.now() > end) return false
      await new Promise((r) => setTimeout(r, 5))
    }
    return true
  }
  stop() {
    for (const lane of this.lanes) lane.stop()
  }
}

class Lane {
  private readonly waiting = new Set<Source>()
  private running = false
  private stopped = false
  constructor(private readonly options: Options) {}
  get busy() {
    return this.running || this.waiting.size > 0
  }
  stop() {
    this.stopped = true
  }
  wake(source: Source) {
    this.waiting.add(source)
    if (this.running) return
    this.running = true
    // After the frames already read in this turn of the loop, so that they share the commit.
    setImmediate(() => void this.run())
  }

  private async run() {
    while (this.waiting.size > 0 && !this.stopped) {
      const sources = [...this.waiting]
      this.waiting.clear()
      let room = this.options.batchBytes ?? 4 << 20
      const batches = new Map<Source, NewUpdate[]>()
      for (const source of sources) {
        if (room <= 0) {
          this.waiting.add(source)
          continue
        }
        const updates = source.take(room)
        batches.set(source, updates)
        room -= updates.reduce((n, u) => n + u.update.length, 0)
      }
      await this.store(batches)
      for (const source of batches.keys()) if (source.hasMore()) this.waiting.add(source)
    }
    this.running = false
  }

  /** Until everything in it is stored or refused for good. */
  private async store(batches: Map<Source, NewUpdate[]>) {
    for (let tries = 0; batches.size > 0 && !this.stopped; tries++) {
      try {
        const done = new Map((await this.options.append([...batches.values()].flat())).map((d) => [d.sectionId, d]))
        for (const source of batches.keys()) source.stored(done.get(source.sectionId) ?? null)
        return
      } catch (error) {
        if (error instanceof NotAppended) {
          for (const source of batches.keys()) {
            const why = error.gone.includes(source.sectionId)
              ? 'gone'
              : error.stale.includes(source.sectionId)
                ? 'stale'
                : null
            if (!why) continue
            batches.delete(source)
            source.refused(why)
          }
          continue
        }
        if (UNSTORABLE.has(codeOf(error))) {
          // One room's load must not hold up the others of its lane: each by itself, and the one that fails alone is refused.
          const [first] = batches
          if (batches.size > 1) for (const [source, updates] of batches) await this.store(new Map([[source, updates]]))
          else if (first) first[0].refused('unstorable')
          return
        }
        // A commit whose answer was lost is written a second time; the same update twice changes nothing.
        if (tries % 20 === 0)
          this.options.log.warn({ tries, why: messageOf(error) }, 'edits are held: they cannot be stored now')
        await new Promise((r) => setTimeout(r, Math.min(500, 20 * 2 ** Math.min(tries, 5))))
      }
    }
  }
}

/** What no later try can cure. */
const UNSTORABLE = new Set(['ER_NET_PACKET_TOO_LARGE', 'ER_DATA_TOO_LONG'])
const inner = (error: unknown): unknown => (error instanceof Error && error.cause ? error.cause : error)
const codeOf = (error: unknown): string => {
  const cause = inner(error)
  return typeof cause === 'object' && cause !== null && 'code' in cause ? String(cause.code) : ''
}
const messageOf = (error: unknown): string => {
  const cause = inner(error)
  return cause instanceof Error ? cause.message : String(cause)
}
