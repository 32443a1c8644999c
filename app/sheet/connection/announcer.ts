import type { Presence } from '~/live'

/** What moves with the pointer goes out at most this often, ms. */
const EVERY = 33
/** The end of a gesture waits for its edit to be stored, at most this long, so that nobody sees the old place in between. */
const HOLD = 300
const MOVING: ReadonlySet<string> = new Set(['pointer', 'gesture', 'reading', 'view', 'laser'])

type Own = Partial<Omit<Presence, 'who'>>
type Options = { publish(state: Own): void; unstored(): boolean }

/** Gathers what this page tells of itself and sends it neither too often nor too early. */
export class Announcer {
  private own: Own = {}
  private last = 0
  private timer: ReturnType<typeof setTimeout> | null = null
  private hold: ReturnType<typeof setTimeout> | null = null
  private stopped = false
  constructor(private readonly options: Options) {}

  present(change: Own) {
    if (change.gesture === null && this.own.gesture && this.options.unstored()) {
      this.hold ??= setTimeout(() => this.release(), HOLD)
      const { gesture: _, ...rest } = change
      change = rest
    } else if (change.gesture !== undefined) this.drop('hold')
    this.own = { ...this.own, ...change }
    const words = Object.keys(change)
    if (words.length === 0) return
    if (change.gesture === null || words.some((word) => !MOVING.has(word))) return this.flush()
    const wait = this.last + EVERY - Date.now()
    if (wait <= 0) this.flush()
    else this.timer ??= setTimeout(() => this.flush(), wait)
  }

  /** Everything is stored: a gesture that has ended may go. */
  release() {
    if (!this.hold) return
    this.drop('hold')
    this.own = { ...this.own, gesture: null }
    this.flush()
  }

  private flush() {
    this.drop('timer')
    if (this.stopped) return
    this.last = Date.now()
    this.options.publish(this.own)
  }

  private drop(which: 'timer' | 'hold') {
    const running = this[which]
    if (running) clearTimeout(running)
    this[which] = null
  }

  stop() {
    this.stopped = true
    this.drop('timer')
    this.drop('hold')
  }
}
