import type * as Y from 'yjs'
import { createStore } from 'zustand/vanilla'
import type { Act } from '~/access/acts'
import { applyEdits, type Edit, type LiveSection, LOCAL, type Presence, readLive, writeEdits } from '~/live'
import { toCase } from './case-edits'
import { answerOf, footingOf, gatherProblems, problemsOf, readingAt, solveHere } from './compute'
import type { Connection } from './connection/types'
import { exists } from './exists'
import { animationFrames, type Frames } from './frames'
import { createHistory } from './history'
import type { LinkState, Peer, Sheet, SheetState } from './state'

export type SheetOptions = {
  sectionId: string
  /** Holds the section already (the loader's state) or fills when the connection delivers it. */
  doc: Y.Doc
  acts: Act[]
  may: 'write' | 'read'
  connection?: Connection
  /** Where to start: case, units, theme, view … */
  initial?: Partial<
    Omit<SheetState, 'sectionId' | 'live' | 'solution' | 'footing' | 'problems' | 'acts' | 'may' | 'read'>
  >
  /** For tests. */
  frames?: (run: () => void) => Frames
  now?: () => number
}

export type OpenSheet = Sheet & {
  readonly doc: Y.Doc
  /** The connection's news. Use `attach` for a real connection; these are what it calls. */
  hear: { link(state: LinkState): void; may(may: 'write' | 'read'): void; peers(peers: Peer[]): void }
  attach(connection: Connection): void
  /** Show the others something of oneself that is no part of the state (pointer, view in metres, laser). */
  present(change: Partial<Omit<Presence, 'who'>>): void
  /** Oneself, as the server says; null before it has. */
  me(): Presence['who'] | null
  /** The reading line moved to x with the next frame, together with what else changes in it. */
  readAlong(x: number): void
  /**
   * As `subscribe`, but told of every frame of a drag. Those who subscribe hear of a drag at half pace: numbers beside the
   * drawing need no more, and the drawing gets the time.
   */
  watch(listener: () => void): () => void
  /** Work out now what waits for the next frame. */
  settle(): void
  /** Stop listening; a gesture in progress is dropped. The connection and the document stay the caller's. */
  close(): void
}

/** State that the others see as it changes. */
const SHOWN = ['picked', 'caseId', 'tool', 'reading', 'presenting'] as const
/** Subscribers hear of a drag at most this often, ms: every other frame. */
const TELL_EVERY = 30
/** While something is dragged the footing follows at this pace, ms. */
const FOOTING_EVERY = 200
/** The others keep seeing a finished gesture at most this long, ms, until its edit has reached them. */
const LINGER = 2000

type InProgress = { id: string; edits: Edit[]; make: ((stored: LiveSection) => Edit[]) | null; pickedBefore: string[] }

/**
 * One open sheet: the stored document, everybody's gestures over it, and what follows from them, worked out at most once per
 * frame. Nothing here draws; panels, tools and the canvas read `get()` and are told by `subscribe`.
 */
export function createSheet(options: SheetOptions): OpenSheet {
  const { doc } = options
  let connection: Connection | null = null
  let unlisten: (() => void) | null = null
  let stored = readLive(doc)
  let docChanged = false
  let along: number | null = null
  let own: InProgress | null = null
  let linger: ReturnType<typeof setTimeout> | null = null
  let gestures = 0
  let said = 0
  let footingDue = false
  let footedAt = 0
  let footLater: ReturnType<typeof setTimeout> | null = null
  const now = options.now ?? Date.now

  const first = solveHere(stored.section, options.initial?.caseId ?? null)
  const store = createStore<SheetState>()(() => ({
    caseId: null,
    tool: 'pick',
    picked: [],
    reading: null,
    view: null,
    units: 'si',
    snap: true,
    grid: true,
    showArrows: true,
    showFlowLines: false,
    showMarkup: true,
    theme: 'light',
    link: { kind: 'connecting' },
    peers: [],
    following: null,
    layerId: null,
    presenting: false,
    hint: null,
    says: null,
    seen: null,
    wheel: 'pan',
    penMode: false,
    ...options.initial,
    sectionId: options.sectionId,
    live: stored,
    solution: first.solution,
    footing: first.footing,
    problems: gatherProblems(stored, first),
    read: readingAt(first.solution, options.initial?.reading ?? null),
    may: options.may,
    acts: options.acts,
    canUndo: false,
    canRedo: false,
  }))
  const get = store.getState
  const put = (change: Partial<SheetState>) => store.setState(change)

  const listeners = new Set<() => void>()
  let pacing = false
  let toldAt = 0
  let tellLater: ReturnType<typeof setTimeout> | null = null
  function tell() {
    if (tellLater !== null) clearTimeout(tellLater)
    tellLater = null
    toldAt = now()
    for (const listener of [...listeners]) listener()
  }
  store.subscribe(() => {
    if (!pacing) tell()
  })

  let solvedSection = stored.section
  let solvedCase = get().caseId

  /** Peers' gestures, in an order that is the same on every sheet. Link holders may not edit, so theirs are not looked at. */
  const foreignEdits = () =>
    [...get().peers]
      .sort((a, b) => a.clientId - b.clientId)
      .flatMap((peer) => (peer.gesture && peer.who.kind === 'person' ? peer.gesture.edits : []))

  function work() {
    if (docChanged) {
      docChanged = false
      stored = readLive(doc)
      if (own?.make) own.edits = toCase(own.make(stored), get().caseId, stored.section)
    }
    const edits = own ? [...foreignEdits(), ...own.edits] : foreignEdits()
    const live = edits.length > 0 ? applyEdits(stored, edits) : stored
    const { caseId: wanted, picked } = get()
    const reading = along ?? get().reading
    along = null
    const caseId = wanted !== null && live.section.cases.some((one) => one.id === wanted) ? wanted : null
    const change: Partial<SheetState> = {}
    if (live !== get().live) change.live = live
    if (caseId !== wanted) change.caseId = caseId
    if (live.section !== solvedSection || caseId !== solvedCase) {
      const answer = answerOf(live.section, caseId)
      solvedSection = live.section
      solvedCase = caseId
      footingDue = true
      change.solution = answer.solution
      change.problems = gatherProblems(live, answer, get().problems)
      change.read = readingAt(answer.solution, reading)
    } else if (live !== get().live)
      change.problems = gatherProblems(live, { problems: problemsOf(get().solution) }, get().problems)
    if (footingDue && (edits.length === 0 || now() - footedAt >= FOOTING_EVERY)) {
      footingDue = false
      footedAt = now()
      change.footing = footingOf(live.section, caseId, change.solution ?? get().solution)
    }
    // A drag that comes to rest gets its footing without another move.
    if (footingDue) footLater ??= setTimeout(footNow, FOOTING_EVERY)
    if (live !== get().live) {
      const kept = picked.filter((path) => exists(live, path))
      if (kept.length !== picked.length) change.picked = kept
    }
    if (reading !== get().reading) {
      change.reading = reading
      change.read = readingAt(change.solution ?? get().solution, reading)
    }
    if (Object.keys(change).length > 0) {
      pacing = edits.length > 0 && now() - toldAt < TELL_EVERY
      put(change)
      if (pacing) tellLater ??= setTimeout(tell, TELL_EVERY)
      pacing = false
    }
    if (change.reading !== undefined) connection?.present({ reading })
    if (change.picked) connection?.present({ picked: change.picked })
  }
  const frames = (options.frames ?? animationFrames)(work)
  function footNow() {
    footLater = null
    frames.ask()
  }

  const history = createHistory(doc, {
    change: () => put({ canUndo: history.canUndo(), canRedo: history.canRedo() }),
    select: (picked) => {
      put({ picked })
      connection?.present({ picked })
    },
    now: options.now,
  })

  const onUpdate = () => {
    docChanged = true
    frames.ask()
  }
  doc.on('update', onUpdate)

  const say: Sheet['say'] = (text, tone = 'plain') => {
    said += 1
    put({ says: { text, n: said, tone } })
  }
  const mayWrite = () => {
    if (get().may === 'write') return true
    say('You are reading this section; it cannot be changed from here.', 'trouble')
    return false
  }

  function write(edits: Edit[], pickedBefore: string[], join?: string) {
    history.step(() => writeEdits(doc, edits, LOCAL), { before: pickedBefore, after: get().picked }, join)
    frames.ask()
    frames.now()
  }

  function stopLinger() {
    if (linger !== null) clearTimeout(linger)
    linger = null
  }
  /** A finished gesture stays visible to the others until its edit is stored, so that nothing jumps back in between. */
  function letGo(finished: boolean) {
    stopLinger()
    const gone = () => {
      linger = null
      connection?.present({ gesture: null })
    }
    if (!finished || connection === null || get().link.kind !== 'storing') gone()
    else linger = setTimeout(gone, LINGER)
  }

  const gesture: Sheet['gesture'] = {
    get active() {
      return own !== null
    },
    start() {
      if (own) gesture.cancel()
      stopLinger()
      gestures += 1
      own = { id: `${doc.clientID}.${gestures}`, edits: [], make: null, pickedBefore: get().picked }
    },
    show(edits) {
      if (!own || get().may !== 'write') return
      own.make = typeof edits === 'function' ? edits : null
      own.edits = toCase(typeof edits === 'function' ? edits(stored) : edits, get().caseId, stored.section)
      connection?.present({ gesture: { id: own.id, edits: own.edits } })
      frames.ask()
    },
    finish() {
      const done = own
      if (!done) return false
      if (docChanged) work()
      own = null
      if (done.edits.length === 0 || !mayWrite()) {
        letGo(false)
        frames.ask()
        return false
      }
      write(done.edits, done.pickedBefore)
      letGo(true)
      return true
    },
    cancel() {
      if (!own) return
      own = null
      letGo(false)
      frames.ask()
    },
  }

  const sheet: OpenSheet = {
    doc,
    get,
    subscribe(listener) {
      listeners.add(listener)
      return () => listeners.delete(listener)
    },
    watch: (listener) => store.subscribe(listener),
    set(change) {
      if (change.reading !== undefined) along = null
      put(change)
      if (change.caseId !== undefined) {
        frames.ask()
        frames.now()
      }
      if (change.reading !== undefined) put({ read: readingAt(get().solution, change.reading) })
      const shown = SHOWN.filter((key) => key in change)
      if (shown.length > 0) connection?.present(Object.fromEntries(shown.map((key) => [key, get()[key]])))
      if (change.following !== undefined) follow()
    },
    stored: () => {
      if (docChanged) work()
      return stored
    },
    say,
    edit(edits, join, pick) {
      if (edits.length === 0) return true
      if (!mayWrite()) return false
      const before = get().picked
      if (pick) sheet.set({ picked: pick })
      write(toCase(edits, get().caseId, stored.section), before, join)
      return true
    },
    gesture,
    undo() {
      gesture.cancel()
      if (mayWrite()) history.undo()
      settle()
    },
    redo() {
      gesture.cancel()
      if (mayWrite()) history.redo()
      settle()
    },
    hear: {
      link(link) {
        put({ link })
        if (linger !== null && link.kind !== 'storing') letGo(false)
      },
      may(may) {
        if (may === get().may) return
        put({ may })
        if (may === 'read') gesture.cancel()
      },
      peers(peers) {
        const before = get().peers
        if (before.length === 0 && peers.length === 0) return
        put({ peers })
        if (get().following !== null) follow()
        if (hasGesture(before) || hasGesture(peers)) frames.ask()
      },
    },
    attach(next) {
      unlisten?.()
      connection = next
      const hear = () => {
        if (next.state !== get().link) sheet.hear.link(next.state)
        if (next.may !== null) sheet.hear.may(next.may)
        if (next.peers !== get().peers) sheet.hear.peers(next.peers)
      }
      unlisten = next.subscribe(hear)
      hear()
      next.present(Object.fromEntries(SHOWN.map((key) => [key, get()[key]])))
    },
    present: (change) => connection?.present(change),
    readAlong(x) {
      along = x
      frames.ask()
    },
    me: () => connection?.who ?? null,
    settle,
    close() {
      gesture.cancel()
      stopLinger()
      if (footLater !== null) clearTimeout(footLater)
      if (tellLater !== null) clearTimeout(tellLater)
      frames.stop()
      unlisten?.()
      doc.off('update', onUpdate)
      history.close()
    },
  }

  function settle() {
    frames.ask()
    frames.now()
  }

  /** The case follows with the person followed; the view does so on the canvas, which knows its own size. */
  function follow() {
    const peer = get().peers.find((one) => one.clientId === get().following)
    if (!peer) {
      if (get().following !== null && get().link.kind !== 'offline') put({ following: null })
      return
    }
    if (peer.caseId !== undefined && peer.caseId !== get().caseId) {
      put({ caseId: peer.caseId })
      frames.ask()
    }
  }

  if (options.connection) sheet.attach(options.connection)
  return sheet
}

const hasGesture = (peers: Peer[]) => peers.some((peer) => peer.gesture)
