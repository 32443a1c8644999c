import { randomUUID } from 'node:crypto'
import { createServer, type IncomingMessage, type ServerResponse } from 'node:http'
import type { AddressInfo } from 'node:net'
import { jwtVerify } from 'jose'
import { WebSocket, WebSocketServer } from 'ws'
import { standingsForConnections } from '~/access/facts.server'
import { AUDIENCE, CLOSE, SAYS } from '~/live/codes'
import type { Connection as Db } from '../drizzle/client'
import { askFor, originFits, Refusal, readTicket, standing } from './admit'
import { Connection, closeSocket } from './connection'
import { FirstWords } from './first-words'
import { LIMITS, type Limits } from './limits'
import { type Log, log as standardLog } from './log'
import { meetPeers, NO_PEERS, type Peers } from './peers'
import { noticeFrame, presenceFrame } from './protocol'
import { Rooms } from './rooms'
import { Recheck, together } from './standings'

export type Deps = {
  /** Pool and Drizzle database; the caller closes it. */
  connection: Pick<Db, 'db' | 'pool'>
  /** Signs tickets and pokes, shared with the web app. */
  liveSecret: string
  /** Address of the web app; pages from elsewhere are turned away. */
  appUrl?: string
  redisUrl?: string
  /** Behind a reverse proxy: its last X-Forwarded-For entry is the page's address. */
  trustProxy?: boolean
  limits?: Partial<Limits>
  log?: Log
}

export type Sidecar = {
  /** @returns the port listened on (0 asks for a free one). */
  listen(port: number, host?: string): Promise<number>
  /** Stores what waits, says goodbye with 4503, closes. */
  close(within?: number): Promise<void>
  stats(): { rooms: number; connections: number; sockets: number }
  /** Asks all standings anew; resolves when they have been acted on. */
  recheck(): Promise<void>
}

/** ws closes protocol errors with codes of its own and no word; the page is told ours. */
class Socket extends WebSocket {
  override close(code?: number, reason?: string | Buffer) {
    if (code === 1009) super.close(CLOSE.tooBig, 'A message may have 1 MiB at most.')
    else if (code === 1002 || code === 1007) super.close(CLOSE.hostile, 'That is not a WebSocket message.')
    else super.close(code, reason)
  }
}

const LOOPBACK = /^(::1|(::ffff:)?127\.)/

/** The realtime sidecar, not yet listening. DEVELOPERS.md "Live document" has the protocol on one page. */
export function create(deps: Deps): Sidecar {
  const limits: Limits = { ...LIMITS, ...deps.limits }
  const log = deps.log ?? standardLog
  const { db, pool } = deps.connection
  const secret = new TextEncoder().encode(deps.liveSecret)
  const connections = new Map<string, Connection>()
  const perAddress = new Map<string, number>()
  /** Sockets of a holder that have shown a ticket and are not in their room yet. */
  const admitting = new Map<string, number>()
  const banned = new Map<string, number>()
  let sockets = 0
  let draining = false

  const askAll = (asks: Parameters<typeof standingsForConnections>[1]) => standingsForConnections(db, asks)
  const ask = together(askAll)

  let peers: Peers = NO_PEERS
  const rooms = new Rooms({
    db,
    limits,
    log,
    onHostile: (holder) => banned.set(holder, Date.now() + limits.banned),
    onStored: (sectionId, seq) => peers.stored(sectionId, seq),
    onPresence: (sectionId, entries) => peers.presence(sectionId, entries),
    onOpen: (sectionId) => peers.open(sectionId),
    onClose: (sectionId) => peers.close(sectionId),
  })

  const recheck = new Recheck({
    askAll,
    every: limits.recheck,
    unknownFor: limits.unknownFor,
    log,
    open: () =>
      [...connections.values()].map((connection) => ({
        ask: askFor(connection.key, connection.claims),
        hear: (answer) => {
          try {
            connection.setMay(standing(connection.claims, answer, connection.room?.epoch ?? connection.claims.epoch))
          } catch (error) {
            if (!(error instanceof Refusal)) throw error
            connection.close(error.code, error.why)
          }
        },
      })),
    also: () => rooms.compare(),
    onUnknown: () => {
      for (const connection of connections.values()) connection.close(CLOSE.drain)
    },
  })

  if (deps.redisUrl)
    peers = meetPeers(
      deps.redisUrl,
      {
        stored: (sectionId, seq) => {
          const room = rooms.find(sectionId)
          if (room && seq > room.known) void rooms.catchUp(room)
        },
        presence: (sectionId, entries) => rooms.find(sectionId)?.tellPresence(entries, null, false),
        askPresence: (sectionId) => {
          const here = rooms.find(sectionId)?.presence.all() ?? []
          if (here.length) peers.presence(sectionId, here)
        },
        poke: () => void recheck.now(),
      },
      log,
    )

  const addressOf = (request: IncomingMessage): string => {
    const forwarded = deps.trustProxy
      ? String(request.headers['x-forwarded-for'] ?? '')
          .split(',')
          .at(-1)
          ?.trim()
      : ''
    return forwarded || request.socket.remoteAddress || ''
  }

  const http = createServer((request, response) => void answer(request, response))
  const sockets_ = new WebSocketServer({
    server: http,
    WebSocket: Socket,
    maxPayload: limits.frame,
    perMessageDeflate: false,
    clientTracking: false,
  })
  sockets_.on('connection', (socket: WebSocket, request: IncomingMessage) => void welcome(socket, request))

  /** Nothing is read from the socket before it is admitted; everything it sent meanwhile waits in the kernel. */
  async function welcome(socket: WebSocket, request: IncomingMessage) {
    const address = addressOf(request)
    const count = (perAddress.get(address) ?? 0) + 1
    sockets++
    perAddress.set(address, count)
    let gone = false
    socket.on('error', () => {})
    socket.once('close', () => {
      gone = true
      sockets--
      const left = (perAddress.get(address) ?? 1) - 1
      if (left > 0) perAddress.set(address, left)
      else perAddress.delete(address)
    })
    socket.pause()
    const deadline = setTimeout(() => refuse(new Refusal(CLOSE.notAdmitted)), limits.admitWithin)
    const refuse = ({ code, why }: Refusal) => {
      gone = true
      socket.resume()
      closeSocket(socket, code, why)
    }
    try {
      if (draining) throw new Refusal(CLOSE.drain)
      if (sockets > limits.sockets || (count > limits.socketsPerAddress && !LOOPBACK.test(address)))
        throw new Refusal(CLOSE.tooMany, 'Too many connections are open. The page tries again.')
      if (!originFits(request, deps.appUrl)) throw new Refusal(CLOSE.noRight, 'This page may not connect here.')
      const connection = await admit(socket, request, () => gone)
      clearTimeout(deadline)
      if (!connection) return
    } catch (error) {
      clearTimeout(deadline)
      if (gone) return
      if (!(error instanceof Refusal))
        log.warn({ why: error instanceof Error ? error.message : String(error) }, 'somebody could not be let in')
      refuse(error instanceof Refusal ? error : new Refusal(CLOSE.drain))
    }
  }

  async function admit(socket: WebSocket, request: IncomingMessage, gone: () => boolean): Promise<Connection | null> {
    const claims = await readTicket(new URL(request.url ?? '/', 'http://sidecar'), secret)
    const holder = claims.who.kind === 'person' ? claims.who.userId : claims.who.linkId
    const most = claims.who.kind === 'person' ? limits.socketsPerPerson : limits.socketsPerLink
    const open = [...connections.values()].filter((c) => c.holder === holder).length
    // Those still on their way in count, too: several at once would else all find the last place free.
    const coming = admitting.get(holder) ?? 0
    if (open + coming >= most) throw new Refusal(CLOSE.tooMany, 'Too many sheets are open. Close some and try again.')
    admitting.set(holder, coming + 1)
    try {
      return await letIn(socket, claims, holder, gone)
    } finally {
      const left = (admitting.get(holder) ?? 1) - 1
      if (left > 0) admitting.set(holder, left)
      else admitting.delete(holder)
    }
  }

  async function letIn(
    socket: WebSocket,
    claims: Awaited<ReturnType<typeof readTicket>>,
    holder: string,
    gone: () => boolean,
  ): Promise<Connection | null> {
    const until = banned.get(holder)
    if (until !== undefined && until > Date.now()) throw new Refusal(CLOSE.hostile)
    banned.delete(holder)
    const key = randomUUID()
    const answer = await ask(askFor(key, claims))
    const may = standing(claims, answer, claims.epoch)
    const words = new FirstWords(socket)
    const room = await rooms.enter(claims.section, claims.epoch, (parts) => words.answer(parts))
    if (room.epoch !== claims.epoch) throw new Refusal(CLOSE.epoch)
    if (draining) throw new Refusal(CLOSE.drain)
    if (gone()) return null
    const who = { id: holder, name: claims.name, ink: claims.ink, kind: claims.who.kind }
    const connection = new Connection(key, socket, claims, who, limits)
    connections.set(key, connection)
    socket.once('close', () => {
      connections.delete(key)
      room.leave(connection)
    })
    connection.enter(room, may, words.rest())
    const others = peers.others(claims.section)
    if (others.length) connection.sendPresence(presenceFrame(others))
    return connection
  }

  async function answer(request: IncomingMessage, response: ServerResponse) {
    const path = new URL(request.url ?? '/', 'http://sidecar').pathname
    const reply = (status: number, body: unknown) => {
      response.writeHead(status, { 'content-type': 'application/json', 'cache-control': 'no-store' })
      response.end(JSON.stringify(body))
    }
    if (request.method === 'GET' && path === '/health') {
      const ok = await Promise.race([
        pool.query('select 1').then(
          () => true,
          () => false,
        ),
        new Promise<boolean>((resolve) => setTimeout(resolve, 2_000, false).unref()),
      ])
      return reply(ok && !draining ? 200 : 503, { ok: ok && !draining, database: ok, ...stats() })
    }
    if (request.method === 'POST' && path === '/poke') {
      const token = /^Bearer (.+)$/.exec(request.headers.authorization ?? '')?.[1]
      try {
        if (!token || !LOOPBACK.test(request.socket.remoteAddress ?? '')) throw new Error('no')
        await jwtVerify(token, secret, { algorithms: ['HS256'], audience: AUDIENCE.poke, requiredClaims: ['exp'] })
      } catch {
        return reply(403, { ok: false })
      }
      peers.poke()
      await recheck.now()
      return reply(200, { ok: true })
    }
    return reply(404, { ok: false })
  }

  const stats = () => ({ rooms: rooms.size, connections: connections.size, sockets })
  const pulse = setInterval(() => {
    const now = Date.now()
    for (const connection of connections.values()) connection.pulse(now)
  }, limits.ping)
  const beat = setInterval(() => {
    const frame = noticeFrame({ say: 'beat' })
    for (const connection of connections.values()) connection.send(frame)
  }, limits.beat)

  return {
    async listen(port, host) {
      await new Promise<void>((resolve, reject) => {
        http.once('error', reject)
        http.listen(port, host, () => {
          http.off('error', reject)
          resolve()
        })
      })
      rooms.start()
      recheck.start()
      return (http.address() as AddressInfo).port
    },
    async close(within = 5_000) {
      draining = true
      clearInterval(pulse)
      clearInterval(beat)
      await recheck.stop()
      await rooms.close(within)
      for (const connection of connections.values()) connection.close(CLOSE.drain, SAYS[CLOSE.drain])
      await peers.stop()
      await new Promise<void>((resolve) => {
        http.close(() => resolve())
        http.closeAllConnections()
        setTimeout(resolve, 1_500).unref()
      })
    },
    stats,
    recheck: () => recheck.now(),
  }
}
