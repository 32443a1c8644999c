import * as Y from 'yjs'
import { CLOSE, type CloseCode, SAYS } from '~/live/codes'
import type { Appended, Loaded, NewUpdate, Parts } from '../drizzle/log'
import type { Limits } from './limits'
import type { Log } from './log'
import { type Announcer, PresenceBook } from './presence'
import {
  acknowledgement,
  noticeFrame,
  type PresenceEntry,
  presenceFrame,
  stepOne,
  stepTwo,
  updateFrame,
  wholeState,
} from './protocol'
import { Measure } from './validate'
import type { Source } from './writer'

/** What a room needs of a connection. */
export type Member = Announcer & {
  /** Person whose edits these are, for the log; null cannot write. */
  readonly userId: string | null
  /** Document messages received and not taken so far. */
  received: number
  refused: number
  readonly closing: boolean
  /** We asked for everything it has and its answer (step 2) is still to come. */
  asked: boolean
  send(frame: Uint8Array): void
  sendPresence(frame: Uint8Array): void
  close(code: CloseCode, why?: string): void
}

/** What its author is told after the commit; `bad` when this very message was refused, wholly or in part. */
type Acknowledged = { n: number; refused: number; bad: boolean }

/** In order: edits to store, and what must not leave before everything ahead of it is stored. */
type Item =
  | ({ is: 'edit'; update: Uint8Array; by: Member | null } & Acknowledged)
  | ({ is: 'nothing-new'; by: Member } & Acknowledged)
  | { is: 'state'; frames: Uint8Array[]; to: Member }

type Surroundings = {
  limits: Limits
  log: Log
  wake(room: Room): void
  /** A commit happened: tell the other sidecars. */
  onStored(room: Room, seq: number): void
  onPresence(room: Room, entries: PresenceEntry[]): void
  /** Rows of somebody else lie between ours: fetch them. */
  behind(room: Room): void
  /** Enough rows to be worth a fold. */
  foldable(room: Room): void
  /** An update threw half way: the document in memory must be built anew from the log, see `mend`. */
  broken(room: Room, by: Member | null, why: string): void
}

/** Above this many bytes or pieces the tail of a kept state is not worth more than encoding afresh. */
const TAIL = { bytes: 128 << 10, pieces: 300 }

/**
 * One section being worked on. Everything that changes it goes one way: apply → wait → committed → acknowledge → relay.
 * What has been applied but not committed is seen by nobody: answers to a joining page wait for the commit too.
 */
export class Room implements Source {
  readonly members = new Set<Member>()
  readonly presence: PresenceBook
  private doc: Y.Doc
  private measure: Measure
  /** While the document is built anew after a hostile update: what came meanwhile, to be done afterwards in order. */
  private meanwhile: (() => void)[] | null = null
  /** Last seq up to which this document holds everything of the log. */
  known: number
  readonly epoch: number
  readonly damaged: boolean
  rowsSinceFold: number
  changedSinceVersion = false
  foldedAt = 0
  private waiting: Item[] = []
  private underWay: Item[] = []
  private heldBytes = 0
  private captured: Uint8Array[] = []
  /** Since when the oldest uncommitted edit waits; null when everything is stored. */
  waitingSince: number | null = null
  private toldStalled = false
  closed = false
  emptySince: number | null = Date.now()
  /** The whole state as last encoded, and what came after it: joining costs no encoding. */
  private kept: { base: Uint8Array; tail: Uint8Array[]; bytes: number } | null = null
  private crowd = new Map<number, PresenceEntry>()
  private crowdTimer: NodeJS.Timeout | null = null

  constructor(
    readonly sectionId: string,
    loaded: Loaded,
    private readonly around: Surroundings,
  ) {
    this.doc = loaded.doc
    this.epoch = loaded.epoch
    this.known = loaded.seq
    this.damaged = loaded.damaged.length > 0
    this.rowsSinceFold = loaded.rows
    this.presence = new PresenceBook(around.limits)
    dropPending(this.doc)
    this.measure = new Measure(
      this.doc,
      around.limits,
      loaded.parts.reduce((n, part) => n + part.length, 0),
    )
    const [base, ...tail] = loaded.parts
    const bytes = tail.reduce((n, part) => n + part.length, 0)
    if (base && !this.damaged && tail.length <= TAIL.pieces && bytes <= TAIL.bytes) this.kept = { base, tail, bytes }
    this.doc.on('update', this.capture)
  }

  private readonly capture = (update: Uint8Array) => void this.captured.push(update)

  get busy() {
    return this.waiting.length > 0 || this.underWay.length > 0
  }

  join(member: Member) {
    if (this.meanwhile) return void this.meanwhile.push(() => this.join(member))
    if (member.closing) return
    this.members.add(member)
    this.emptySince = null
    member.send(noticeFrame({ say: 'may', may: member.may, epoch: this.epoch }))
    if (this.toldStalled) member.send(noticeFrame({ say: 'stalled' }))
    this.ask(member)
    const others = this.presence.all()
    if (others.length) member.sendPresence(presenceFrame(others))
  }

  /** Sync step 1 the other way: what have you that is not here? */
  ask(member: Member) {
    member.asked = true
    member.send(stepOne(Y.encodeStateVector(this.doc)))
  }

  leave(member: Member) {
    if (!this.members.delete(member)) return
    this.tellPresence(this.presence.leave(member), null)
    if (this.members.size === 0) this.emptySince = Date.now()
  }

  /** Sync step 1: what the page is missing, once everything in it is stored. */
  answer(member: Member, stateVector: Uint8Array) {
    if (this.meanwhile) return void this.meanwhile.push(() => this.answer(member, stateVector))
    const frames = this.stateFrames(stateVector)
    if (this.busy) this.push({ is: 'state', frames, to: member })
    else for (const frame of frames) member.send(frame)
  }

  private stateFrames(stateVector: Uint8Array): Uint8Array[] {
    const fromNothing = stateVector.length === 0 || (stateVector.length === 1 && stateVector[0] === 0)
    if (!fromNothing) return [stepTwo(Y.encodeStateAsUpdate(this.doc, stateVector))]
    if (!this.kept) this.kept = { base: Y.encodeStateAsUpdate(this.doc), tail: [], bytes: 0 }
    return wholeState(this.kept.base, this.kept.tail)
  }

  /** An update or sync step 2 of a member. Counted, checked, applied, queued for the commit. */
  edit(member: Member, update: Uint8Array, is: 'step2' | 'update') {
    if (this.meanwhile) return void this.meanwhile.push(() => this.edit(member, update, is))
    if (!this.members.has(member)) return
    member.received++
    if (is === 'step2') member.asked = false
    if (member.may !== 'write' || member.userId === null) {
      member.refused++
      // Every page answers our question with a step 2, readers too; only a true update is worth a word.
      if (is === 'update') member.send(noticeFrame({ say: 'refused', why: SAYS[CLOSE.noRight] }))
      return this.dealtWith(member, true)
    }
    const verdict = this.measure.check(update)
    if (!verdict.ok) {
      const code = verdict.because === 'hostile' ? CLOSE.hostile : CLOSE.tooBig
      return member.close(code, verdict.because === 'hostile' ? undefined : verdict.why)
    }
    const fresh = this.apply(update, member)
    if (fresh === 'broken') return
    const bad = dropPending(this.doc) && is === 'update'
    if (bad) {
      // It builds on edits that never came here (made offline, mostly). What could stand alone is in; a step 2 brings the rest.
      member.refused++
      if (!member.asked) this.ask(member)
    }
    const [first, ...more] = fresh
    if (!first) return this.dealtWith(member, bad)
    const piece = more.length ? Y.mergeUpdates(fresh) : first
    this.measure.grown(piece.length, verdict.objects)
    this.keep(piece)
    this.push({ is: 'edit', update: piece, by: member, n: member.received, refused: member.refused, bad })
    if (this.heldBytes > this.around.limits.held)
      for (const other of [...this.members])
        if (other.may === 'write')
          other.close(CLOSE.drain, 'The database does not answer. What you drew is kept in this page.')
  }

  /** @returns what it changed, or 'broken' when the document threw half way. */
  private apply(update: Uint8Array, by: Member | null): Uint8Array[] | 'broken' {
    this.captured = []
    try {
      Y.applyUpdate(this.doc, update, by ?? 'log')
      return this.captured
    } catch (error) {
      this.meanwhile ??= []
      by?.close(CLOSE.hostile)
      this.around.broken(this, by, error instanceof Error ? error.message : String(error))
      return 'broken'
    } finally {
      this.captured = []
    }
  }

  /** The stored document, to go on with after a hostile update; edits on their way to the log are put on top again. */
  mend(loaded: Loaded) {
    if (this.closed) return loaded.doc.destroy()
    this.doc.destroy()
    this.doc = loaded.doc
    for (const item of [...this.underWay, ...this.waiting]) if (item.is === 'edit') Y.applyUpdate(this.doc, item.update)
    dropPending(this.doc)
    this.doc.on('update', this.capture)
    this.kept = null
    this.measure = new Measure(this.doc, this.around.limits, Y.encodeStateAsUpdate(this.doc).length)
    if (loaded.seq > this.known && !this.busy) {
      // Rows of other sidecars came in with it; the members have not seen them yet.
      this.known = loaded.seq
      this.relay([{ update: Y.encodeStateAsUpdate(this.doc), by: null }])
    }
    const then = this.meanwhile ?? []
    this.meanwhile = null
    for (const go of then) go()
    if (this.waiting.length) this.around.wake(this)
  }

  private keep(update: Uint8Array) {
    if (!this.kept) return
    this.kept.tail.push(update)
    this.kept.bytes += update.length
    if (this.kept.tail.length > TAIL.pieces || this.kept.bytes > TAIL.bytes) this.kept = null
  }

  private dealtWith(member: Member, bad: boolean) {
    if (this.busy) this.push({ is: 'nothing-new', by: member, n: member.received, refused: member.refused, bad })
    else member.send(acknowledgement(member.received, member.refused))
  }

  private push(item: Item) {
    this.waiting.push(item)
    if (item.is === 'edit') {
      this.heldBytes += item.update.length
      this.waitingSince ??= Date.now()
    }
    this.around.wake(this)
  }

  // ——— the writer's side ———

  hasMore() {
    return this.waiting.length > 0 && !this.meanwhile
  }

  /** A batch is on its way to the log. */
  get storing() {
    return this.underWay.length > 0
  }

  take(bytes: number): NewUpdate[] {
    // While the document is built anew from the log, the log must hold still for this room.
    if (this.meanwhile) return []
    let count = 0
    for (let left = bytes; count < this.waiting.length && left > 0; count++) {
      const item = this.waiting[count] as Item
      if (item.is === 'edit') left -= item.update.length
    }
    this.underWay = this.waiting.splice(0, count)
    return this.underWay.flatMap((item) =>
      item.is === 'edit'
        ? [{ sectionId: this.sectionId, epoch: this.epoch, update: item.update, userId: item.by?.userId ?? null }]
        : [],
    )
  }

  stored(done: Appended | null) {
    if (this.closed) return
    const items = this.underWay
    this.underWay = []
    const edits = items.filter((item) => item.is === 'edit')
    this.heldBytes -= edits.reduce((n, edit) => n + edit.update.length, 0)
    this.waitingSince = this.waiting.some((item) => item.is === 'edit') ? Date.now() : null
    if (done) {
      // Somebody else's rows between what we know and ours: we still know only the former.
      if (done.before === this.known) this.known = done.last
      else this.around.behind(this)
      this.rowsSinceFold += edits.length
      this.changedSinceVersion = true
    }
    const acknowledged = new Map<Member, Acknowledged>()
    const acknowledge = (member: Member) => {
      const last = acknowledged.get(member)
      if (last) member.send(acknowledgement(last.n, last.refused))
    }
    for (const item of items) {
      if (item.is === 'state') for (const frame of item.frames) item.to.send(frame)
      else if (item.by) {
        // One acknowledgement for many messages, but never one for a refused message and what follows it: the page takes an
        // acknowledgement with a new refusal to cover nothing.
        if (item.bad || acknowledged.get(item.by)?.bad) acknowledge(item.by)
        acknowledged.set(item.by, item)
      }
    }
    for (const member of acknowledged.keys()) acknowledge(member)
    this.relay(edits)
    if (done) {
      this.around.onStored(this, done.last)
      if (this.rowsSinceFold >= this.around.limits.foldRows && !this.damaged) this.around.foldable(this)
    }
  }

  private relay(edits: { update: Uint8Array; by: Member | null }[]) {
    if (edits.length === 0) return
    const by = edits.every((edit) => edit.by === edits[0]?.by) ? edits[0]?.by : null
    const update = edits.length === 1 ? (edits[0]?.update as Uint8Array) : Y.mergeUpdates(edits.map((e) => e.update))
    const frame = updateFrame(update)
    // In a mixed batch the authors get their own edit back too; one frame for all is cheaper than one for each, and harmless.
    for (const member of [...this.members]) if (member !== by) member.send(frame)
  }

  refused(why: 'gone' | 'stale' | 'unstorable') {
    this.shut(why === 'gone' ? CLOSE.gone : why === 'stale' ? CLOSE.epoch : CLOSE.tooBig)
  }

  // ——— other sidecars' edits, read from the log ———

  /** Takes in rows that are already stored and relays what is new here. */
  takeIn(parts: Parts) {
    if (this.meanwhile) return
    if (parts.epoch !== this.epoch) return this.shut(CLOSE.epoch)
    const fresh: Uint8Array[] = []
    for (const part of [...(parts.snapshot ? [parts.snapshot] : []), ...parts.rows.map((row) => row.update)]) {
      const changed = this.apply(part, null)
      if (changed === 'broken') return
      fresh.push(...changed)
    }
    dropPending(this.doc)
    this.known = Math.max(this.known, parts.seq)
    this.rowsSinceFold += parts.rows.length
    for (const piece of fresh) {
      this.measure.grown(piece.length, 0)
      this.keep(piece)
    }
    // An edit of ours that is not committed yet is not in `fresh` (it was applied before), so nothing leaks.
    this.relay(fresh.map((update) => ({ update, by: null })))
  }

  // ——— presence ———

  announce(member: Member, entries: PresenceEntry[]) {
    this.tellPresence(this.presence.take(entries, member), member)
  }

  /** Everybody's presence, to one who asks. */
  tellAll(member: Member) {
    const all = this.presence.all()
    if (all.length) member.sendPresence(presenceFrame(all))
  }

  tellPresence(entries: PresenceEntry[], from: Member | null, ours = true) {
    if (entries.length === 0) return
    if (ours) this.around.onPresence(this, entries)
    if (this.members.size <= this.around.limits.crowd) {
      const frame = presenceFrame(entries)
      for (const member of this.members) if (member !== from) member.sendPresence(frame)
      return
    }
    // In a crowd, one frame for everybody's latest word instead of n × n frames.
    for (const entry of entries) this.crowd.set(entry.clientId, entry)
    this.crowdTimer ??= setTimeout(() => {
      this.crowdTimer = null
      const frame = presenceFrame([...this.crowd.values()])
      this.crowd.clear()
      for (const member of this.members) member.sendPresence(frame)
    }, this.around.limits.presenceTick)
  }

  // ——— care ———

  /** Told once when storing takes too long, and once when it works again. */
  tellStalled(now: number) {
    const stalled = this.waitingSince !== null && now - this.waitingSince > this.around.limits.stalledAfter
    if (stalled === this.toldStalled) return
    this.toldStalled = stalled
    const frame = noticeFrame({ say: stalled ? 'stalled' : 'storing' })
    for (const member of this.members) member.send(frame)
  }

  /** Its document is being built anew and must not be folded now. */
  get mending() {
    return this.meanwhile !== null
  }

  /** The state to fold, with the seq it surely holds everything of. */
  snapshot(): { state: Uint8Array; seq: number; epoch: number } {
    const state = this.kept && this.kept.tail.length === 0 ? this.kept.base : Y.encodeStateAsUpdate(this.doc)
    this.kept = { base: state, tail: [], bytes: 0 }
    return { state, seq: this.known, epoch: this.epoch }
  }

  shut(code: CloseCode, why?: string) {
    this.closed = true
    for (const member of [...this.members]) member.close(code, why)
    if (this.crowdTimer) clearTimeout(this.crowdTimer)
    this.waiting = []
    this.underWay = []
    this.waitingSince = null
    this.doc.destroy()
  }
}

/** Forgets what could not be integrated; its owner is asked for it again. Says whether there was any. */
function dropPending(doc: Y.Doc): boolean {
  const { store } = doc
  if (store.pendingStructs === null && store.pendingDs === null) return false
  store.pendingStructs = null
  store.pendingDs = null
  return true
}
