import * as decoding from 'lib0/decoding'
import { WebsocketProvider } from 'y-websocket'
import * as Y from 'yjs'
import type { Presence } from '~/live'
import { CLOSE, MESSAGE, type Notice, SAYS } from '../../live/codes'
import type { LinkState, Peer } from '../state'
import { Announcer } from './announcer'
import { countingSocket } from './counting-socket'
import { Ledger } from './ledger'
import { LocalStore, leftoversOf } from './local-store'
import { fetchTicket, NoTicket } from './ticket'
import type { Connection, ConnectOptions, Ticket } from './types'

/** No word from the server for this long means the line is dead, whatever the browser believes. */
const SILENCE = 12_000
/** Not acknowledged for this long while connected: said plainly. */
const UNCONFIRMED = 5_000
const BACKOFF = { first: 250, most: 15_000, flood: 5_000 }
/** Trying again would end the same way. */
const FINAL: ReadonlySet<number> = new Set([CLOSE.hostile, CLOSE.epoch, CLOSE.tooBig])
const LOST = 'You may no longer draw in this section. What is not stored is kept here; save it as a copy.'

const says = (code: number, reason = ''): string => SAYS[code as keyof typeof SAYS] ?? reason

/**
 * Joins the section's live document: fetches a ticket, keeps edits on this machine, connects, reconnects, says what is stored.
 * Nothing starts on import, so server code may import this file; call it in the browser only.
 */
export function connect(options: ConnectOptions): Connection {
  return new SheetConnection(options)
}

class SheetConnection implements Connection {
  state: LinkState = { kind: 'connecting' }
  may: 'write' | 'read' | null = null
  who: Presence['who'] | null = null
  peers: Peer[] = []
  readonly loaded: Promise<void>

  private readonly doc: Y.Doc
  private readonly ledger = new Ledger()
  private readonly announcer: Announcer
  private readonly listeners = new Set<() => void>()
  private provider: WebsocketProvider | null = null
  private local: LocalStore | null = null
  private sectionId: string | null
  private epoch: number | null
  private tries = 0
  private retryTimer: ReturnType<typeof setTimeout> | null = null
  private readonly watch: ReturnType<typeof setInterval>
  private attempting = false
  private closed = false
  private synced = false
  private ready = false
  private everJoined = false
  private stalled = false
  private refusal: { code: number; says: string } | null = null
  private unconfirmedSince: number | null = null
  private lastHeard = 0
  private peersDue = false

  constructor(private readonly options: ConnectOptions) {
    this.doc = options.doc
    this.sectionId = 'sectionId' in options ? options.sectionId : null
    this.epoch = options.epoch ?? null
    this.announcer = new Announcer({
      publish: (own) => this.provider?.awareness.setLocalState({ ...own, who: this.who }),
      unstored: () => this.synced && this.ledger.waiting > 0,
    })
    this.doc.on('update', this.onUpdate)
    this.watch = setInterval(() => this.look(), 1_000)
    globalThis.addEventListener?.('online', this.onOnline)
    globalThis.addEventListener?.('offline', this.onOffline)
    globalThis.addEventListener?.('beforeunload', this.onUnload)
    this.loaded = this.openLocal()
    options.onState?.(this.state)
    void this.loaded.then(() => this.attempt())
  }

  get waiting() {
    return this.ledger.waiting
  }

  subscribe(listener: () => void) {
    this.listeners.add(listener)
    return () => void this.listeners.delete(listener)
  }

  present(change: Partial<Omit<Presence, 'who'>>) {
    this.announcer.present(change)
  }

  copy() {
    return Y.encodeStateAsUpdate(this.doc)
  }

  async leftovers() {
    const { userKey } = this.options
    if (userKey === null || this.sectionId === null || this.epoch === null) return []
    return leftoversOf(userKey, this.sectionId, this.epoch)
  }

  retry() {
    if (this.refusal && FINAL.has(this.refusal.code)) return
    this.refusal = null
    this.tries = 0
    void this.attempt()
  }

  close() {
    if (this.closed) return
    this.closed = true
    clearInterval(this.watch)
    if (this.retryTimer) clearTimeout(this.retryTimer)
    this.announcer.stop()
    this.doc.off('update', this.onUpdate)
    globalThis.removeEventListener?.('online', this.onOnline)
    globalThis.removeEventListener?.('offline', this.onOffline)
    globalThis.removeEventListener?.('beforeunload', this.onUnload)
    this.provider?.destroy()
    this.provider?.awareness.destroy()
    void this.local?.close()
  }

  // ——— local edits ———

  private async openLocal(): Promise<void> {
    const { userKey, keepLocally = true } = this.options
    if (!keepLocally || userKey === null || this.sectionId === null || this.epoch === null) return
    if (typeof indexedDB === 'undefined' || this.local) return
    this.local = LocalStore.of(userKey, this.sectionId, this.epoch, this.doc)
    const { local, ledger } = this
    ledger.inherit(local.inherited)
    const slow = new Promise<'slow'>((resolve) => setTimeout(resolve, 3_000, 'slow'))
    const found = await Promise.race([local.loaded, slow])
    // A store that opens late: what it holds was not in the first answer to the server, so it counts as waiting again.
    if (found === 'slow')
      void local.loaded.then(
        (late) => late === 'found' && ledger.inherit(Math.max(0, local.inherited - ledger.waiting)),
      )
    if (found === 'found') this.isReady('local')
    this.say()
  }

  private readonly onUpdate = (_update: Uint8Array, _origin: unknown, _doc: Y.Doc, transaction: Y.Transaction) => {
    // Only what was drawn here; what came from the server or the local store is not an edit of this page.
    if (!transaction.local) return
    this.ledger.edit()
    this.unconfirmedSince ??= Date.now()
    this.say()
  }

  // ——— connecting ———

  private async attempt(): Promise<void> {
    if (this.closed || this.attempting || this.refusal || this.provider?.ws) return
    if (this.retryTimer) clearTimeout(this.retryTimer)
    this.retryTimer = null
    this.attempting = true
    try {
      const { options } = this
      const ticket = await (options.fetchTicket ?? fetchTicket)(
        'token' in options ? { token: options.token } : { sectionId: options.sectionId },
      )
      if (!this.closed) await this.join(ticket)
    } catch (error) {
      if (error instanceof NoTicket) this.refuse(error.code, error.message || says(error.code))
      else this.again()
    } finally {
      this.attempting = false
    }
  }

  private async join(ticket: Ticket) {
    this.sectionId ??= ticket.sectionId
    if (this.epoch === null) {
      this.epoch = ticket.epoch
      await this.openLocal()
      if (this.closed) return
    }
    if (ticket.epoch !== this.epoch) return this.refuse(CLOSE.epoch)
    this.who = ticket.who
    const provider = this.provider ?? this.makeProvider(ticket)
    provider.serverUrl = ticket.url.replace(/\/+$/, '')
    provider.params = { ticket: ticket.ticket }
    this.lastHeard = Date.now()
    provider.connect()
  }

  private makeProvider(ticket: Ticket): WebsocketProvider {
    const Base = this.options.WebSocket ?? globalThis.WebSocket
    const provider = new WebsocketProvider(ticket.url, ticket.sectionId, this.doc, {
      connect: false,
      // Tabs meet on the server: what one tab shows another must be stored as well.
      disableBc: true,
      WebSocketPolyfill: countingSocket(Base, { document: (whole) => this.ledger.message(whole) }),
      shouldReconnect: () => false,
    })
    this.provider = provider
    provider.messageHandlers[MESSAGE.acknowledge] = (_encoder, decoder) => {
      const dealt = decoding.readVarUint(decoder)
      this.onAcknowledged(dealt, decoding.readVarUint(decoder))
    }
    provider.messageHandlers[MESSAGE.notice] = (_encoder, decoder) =>
      this.onNotice(JSON.parse(decoding.readVarString(decoder)))
    provider.awareness.setLocalState({ who: ticket.who })
    provider.awareness.on('change', this.onAwareness)
    provider.on('status', ({ status }) => {
      if (status !== 'connected') return
      this.ledger.connected()
      // The server has told the others that we left; only a higher clock makes them listen again.
      provider.awareness.setLocalState(provider.awareness.getLocalState())
    })
    provider.on('sync', (synced) => {
      this.synced = synced
      if (synced) {
        this.everJoined = true
        this.tries = 0
        if (this.ledger.waiting > 0) this.unconfirmedSince = Date.now()
        this.isReady('server')
      }
      this.say()
    })
    provider.on('connection-close', (event) => this.onClosed(event?.code ?? 0, event?.reason ?? ''))
    return provider
  }

  private onClosed(code: number, reason: string) {
    // y-websocket would try again with the old ticket; we fetch a new one first.
    if (this.provider) this.provider.shouldConnect = false
    this.synced = false
    this.stalled = false
    this.unconfirmedSince = null
    if (this.closed) return
    if (FINAL.has(code)) return this.refuse(code, says(code, reason))
    this.again(code === CLOSE.tooMany ? BACKOFF.flood : 0)
  }

  private again(least = 0) {
    this.say()
    if (this.closed || this.retryTimer || this.refusal) return
    const wait = Math.min(BACKOFF.most, BACKOFF.first * 2 ** this.tries++)
    this.retryTimer = setTimeout(() => void this.attempt(), Math.max(least, wait * (0.6 + 0.8 * Math.random())))
  }

  private refuse(code: number, words = says(code)) {
    this.refusal = { code, says: words }
    this.synced = false
    this.provider?.disconnect()
    if (this.ledger.waiting === 0 && (code === CLOSE.noRight || code === CLOSE.gone)) void this.local?.discard()
    this.say()
  }

  // ——— what the server says ———

  private onAcknowledged(dealt: number, refused: number) {
    const before = this.ledger.waiting
    this.ledger.acknowledged(dealt, refused)
    if (this.ledger.waiting < before) this.unconfirmedSince = this.ledger.waiting > 0 ? Date.now() : null
    if (this.ledger.waiting === 0) this.announcer.release()
    this.say()
  }

  private onNotice(notice: Notice) {
    if (notice.say === 'may') {
      if (notice.epoch !== this.epoch) return this.refuse(CLOSE.epoch)
      const changed = this.may !== notice.may
      this.may = notice.may
      if (changed) this.options.onMay?.(notice.may)
      if (notice.may === 'read') this.announcer.present({ gesture: null })
    } else if (notice.say === 'stalled') this.stalled = true
    else if (notice.say === 'storing') this.stalled = false
    this.say()
  }

  private readonly onAwareness = () => {
    if (this.peersDue) return
    this.peersDue = true
    const later = globalThis.requestAnimationFrame ?? ((run: () => void) => setTimeout(run, 16))
    later(() => {
      this.peersDue = false
      if (!this.provider || this.closed) return
      const own = this.provider.awareness.clientID
      this.peers = [...this.provider.awareness.getStates()]
        .filter(([clientId, state]) => clientId !== own && typeof state?.who?.id === 'string')
        .map(([clientId, state]) => ({ ...(state as Presence), clientId }))
      this.options.onPeers?.(this.peers)
      this.tell()
    })
  }

  // ——— the world around ———

  private readonly onOnline = () => {
    this.tries = 0
    if (!this.refusal) void this.attempt()
  }
  private readonly onOffline = () => {
    this.provider?.disconnect()
    this.say()
  }
  private readonly onUnload = (event: Event) => {
    // Offline edits are safe on this machine; on their way to the server, or kept nowhere, they are not yet.
    if (this.ledger.waiting > 0 && !(this.state.kind === 'offline' && this.local?.keeps)) event.preventDefault()
  }

  private look() {
    const now = Date.now()
    const { provider } = this
    if (provider?.wsconnected) this.lastHeard = Math.max(this.lastHeard, provider.wsLastMessageReceived)
    // A line that stays mute, half open included, is hung up; so is one that never opens.
    if (provider?.ws && now - this.lastHeard > SILENCE) provider.disconnect()
    // Neither confirmed nor told why: a fresh connection sends everything again and gets a fresh answer.
    const mute = this.unconfirmedSince !== null && now - this.unconfirmedSince > 2 * UNCONFIRMED
    if (this.synced && mute && !this.stalled && this.may === 'write') provider?.disconnect()
    this.say()
  }

  private isReady(from: 'local' | 'server') {
    if (this.ready) return
    this.ready = true
    this.options.onReady?.(from)
  }

  // ——— telling the page ———

  private read(): LinkState {
    const waiting = this.ledger.waiting
    if (this.refusal) return { kind: 'refused', waiting, ...this.refusal }
    if (!this.synced) {
      const offline = this.everJoined || this.tries > 1 || globalThis.navigator?.onLine === false
      return offline || waiting > 0 ? { kind: 'offline', waiting } : { kind: 'connecting' }
    }
    if (waiting === 0) return { kind: 'stored' }
    if (this.may === 'read') return { kind: 'refused', waiting, code: CLOSE.noRight, says: LOST }
    if (this.stalled)
      return {
        kind: 'stalled',
        waiting,
        says: 'The database does not answer. What you draw is kept here until it does.',
      }
    if (this.unconfirmedSince !== null && Date.now() - this.unconfirmedSince > UNCONFIRMED)
      return {
        kind: 'stalled',
        waiting,
        says: 'The server has not confirmed what you drew. It is kept here until it does.',
      }
    return { kind: 'storing', waiting }
  }

  private say() {
    this.local?.waiting(this.ledger.waiting)
    const next = this.read()
    const last = this.state
    const same =
      next.kind === last.kind &&
      ('waiting' in next ? next.waiting : 0) === ('waiting' in last ? last.waiting : 0) &&
      ('says' in next ? next.says : '') === ('says' in last ? last.says : '')
    if (same) return
    this.state = next
    this.options.onState?.(next)
    this.tell()
  }

  private tell() {
    for (const listener of this.listeners) listener()
  }
}
