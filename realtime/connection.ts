import type { RawData, WebSocket } from 'ws'
import { CLOSE, type CloseCode, SAYS, type TicketClaims } from '~/live/codes'
import { Bucket, type Limits } from './limits'
import type { Who } from './presence'
import { noticeFrame, readFrame } from './protocol'
import type { Member, Room } from './room'

/** A close reason may have 123 bytes. */
const short = (why: string) =>
  Buffer.byteLength(why) <= 120
    ? why
    : `${Buffer.from(why)
        .subarray(0, 110)
        .toString('utf8')
        .replace(/\uFFFD+$/, '')}…`

export const bytesOf = (data: RawData): Uint8Array => {
  if (Array.isArray(data)) return Buffer.concat(data)
  return data instanceof ArrayBuffer ? new Uint8Array(data) : data
}

/** One admitted page. Frames in, frames out, limits; what they mean is the room's business. */
export class Connection implements Member {
  received = 0
  refused = 0
  asked = false
  may: 'write' | 'read' = 'read'
  room: Room | null = null
  closing = false
  private heard = Date.now()
  private readonly buckets: Record<'edits' | 'others' | 'bytes' | 'states', Bucket>
  private parts: { parts: number; pieces: Uint8Array[]; bytes: number } | null = null

  constructor(
    readonly key: string,
    readonly socket: WebSocket,
    readonly claims: TicketClaims,
    readonly who: Who,
    private readonly limits: Limits,
  ) {
    this.buckets = {
      edits: new Bucket(limits.edits),
      others: new Bucket(limits.others),
      bytes: new Bucket(limits.bytes),
      states: new Bucket(limits.states),
    }
    socket.on('pong', () => {
      this.heard = Date.now()
    })
  }

  get userId() {
    return this.claims.who.kind === 'person' ? this.claims.who.userId : null
  }

  get holder() {
    return this.claims.who.kind === 'person' ? this.claims.who.userId : this.claims.who.linkId
  }

  /** From now on frames are read. */
  enter(room: Room, may: 'write' | 'read', earlier: { data: RawData; isBinary: boolean }[] = []) {
    this.room = room
    this.may = may
    this.socket.on('message', (data, isBinary) => this.hear(data, isBinary))
    room.join(this)
    for (const { data, isBinary } of earlier) this.hear(data, isBinary)
    this.socket.resume()
  }

  private hear(data: RawData, isBinary: boolean) {
    if (this.closing || !this.room) return
    this.heard = Date.now()
    if (!isBinary) return this.close(CLOSE.hostile, 'Only binary messages are understood here.')
    const frame = bytesOf(data)
    if (!this.buckets.bytes.take(frame.length)) return this.close(CLOSE.tooMany)
    try {
      this.understand(frame)
    } catch {
      this.close(CLOSE.hostile)
    }
  }

  private understand(frame: Uint8Array) {
    const room = this.room as Room
    const message = readFrame(frame)
    const edit = message.is === 'step2' || message.is === 'update'
    if (!this.buckets[edit ? 'edits' : 'others'].take()) return this.close(CLOSE.tooMany)
    switch (message.is) {
      case 'step1':
        if (!this.buckets.states.take()) return this.close(CLOSE.tooMany)
        return room.answer(this, message.stateVector)
      case 'step2':
      case 'update':
        return room.edit(this, message.update, message.is)
      case 'presence':
        return room.announce(this, message.entries)
      case 'ask-presence':
        return room.tellAll(this)
      case 'part':
        return this.gather(message.parts, message.index, message.piece)
    }
  }

  /** Joins a message that was too big for one frame; in order, and never more than a document can hold. */
  private gather(parts: number, index: number, piece: Uint8Array) {
    if (this.may !== 'write') return this.close(CLOSE.tooBig)
    this.parts ??= { parts, pieces: [], bytes: 0 }
    const { pieces } = this.parts
    if (parts !== this.parts.parts || index !== pieces.length || parts > 64 || parts < 2)
      throw new Error('parts out of order')
    pieces.push(piece)
    this.parts.bytes += piece.length
    if (this.parts.bytes > this.limits.document + 1024) return this.close(CLOSE.tooBig)
    if (pieces.length < parts) return
    this.parts = null
    this.understand(Buffer.concat(pieces))
  }

  send(frame: Uint8Array) {
    if (this.closing || this.socket.readyState !== this.socket.OPEN) return
    if (this.socket.bufferedAmount > this.limits.backlog) return this.close(CLOSE.slow)
    this.socket.send(frame, { binary: true })
  }

  sendPresence(frame: Uint8Array) {
    if (this.socket.bufferedAmount < this.limits.presenceBacklog) this.send(frame)
  }

  /** Told what it may do from now on; a new right to write means asking what it drew meanwhile. */
  setMay(may: 'write' | 'read') {
    if (may === this.may || !this.room) return
    this.may = may
    this.send(noticeFrame({ say: 'may', may, epoch: this.room.epoch }))
    if (may === 'write') this.room.ask(this)
    else this.room.tellPresence(this.room.presence.leave(this), this)
  }

  /** Regular sign of life both ways. */
  pulse(now: number) {
    if (now - this.heard > this.limits.silence) return this.close(CLOSE.slow, undefined, true)
    if (this.socket.readyState === this.socket.OPEN) this.socket.ping()
  }

  close(code: CloseCode, why: string = SAYS[code], atOnce = false) {
    if (this.closing) return
    this.closing = true
    this.parts = null
    this.room?.leave(this)
    closeSocket(this.socket, code, why, atOnce)
  }
}

/** Says goodbye, and hangs up for good when the other side does not answer within a second. */
export function closeSocket(socket: WebSocket, code: number, why: string, atOnce = false) {
  if (atOnce) return socket.terminate()
  socket.close(code, short(why))
  const timer = setTimeout(() => socket.terminate(), 1_000)
  socket.once('close', () => clearTimeout(timer))
}
