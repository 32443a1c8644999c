import { type ChildProcess, spawn } from 'node:child_process'
import { randomBytes, randomUUID } from 'node:crypto'
import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { build } from 'esbuild'
import { WebSocket as NodeSocket } from 'ws'
import * as Y from 'yjs'
import { hashToken, issueLinkTicket, issueTicket } from '~/server/live/issue-ticket.server'
import { connect as connectSheet } from '~/sheet/connection/connect'
import { NoTicket } from '~/sheet/connection/ticket'
import type { Connection, ConnectOptions, Ticket } from '~/sheet/connection/types'
import type { PracticeRole } from '../../app/access/acts'
import { startMariadb } from '../../app/run/parts/mariadb.mjs'
import { freePort } from '../../app/run/parts/ports.mjs'
import type { Connection as Db } from '../../drizzle/client'
import { createLog } from '../../drizzle/log'
import { migrate } from '../../drizzle/migrate'
import { link, member, organization, section, session, site, user } from '../../drizzle/schema'
import type { Limits } from '../../realtime/limits'
import { create, type Sidecar } from '../../realtime/server'

export const SECRET = 'the-live-secret-of-the-tests-000000000000'

/** Polls until `test` holds. The message says what never came true. */
export async function until(what: string, test: () => boolean | Promise<boolean>, ms = 10_000) {
  const end = Date.now() + ms
  for (;;) {
    if (await test()) return
    if (Date.now() > end) throw new Error(`not within ${ms} ms: ${what}`)
    await new Promise((r) => setTimeout(r, 4))
  }
}

/** A pseudo-random generator with a seed, so that a failing schedule can be run again. */
export function seeded(seed: number) {
  let s = seed >>> 0
  const next = () => {
    s = (s + 0x6d2b79f5) >>> 0
    let t = Math.imul(s ^ (s >>> 15), s | 1)
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61)
    return ((t ^ (t >>> 14)) >>> 0) / 2 ** 32
  }
  return { next, int: (n: number) => Math.floor(next() * n), bool: (p = 0.5) => next() < p }
}

// ——— a MariaDB of the test's own, that may be killed and must keep what it promised ———

export async function ownMariadb(settings: string[] = []) {
  const folder = mkdtempSync(path.join(tmpdir(), 'doab-live-'))
  const start = () =>
    startMariadb({
      data: path.join(folder, 'db'),
      run: path.join(folder, 'run'),
      password: 'test-only',
      rootPassword: 'test-only-root',
      database: 'doab_test',
      every: true,
      settings,
    })
  let ended = false
  const begin = async () => {
    ended = false
    const started = await start()
    // Not the database's own end but its keeper's: a keeper that is still tidying up would meet the next start.
    started.onEnd(() => {
      ended = true
    })
    return started
  }
  let running = await begin()
  await migrate(running.url)
  return {
    url: running.url,
    kill() {
      process.kill(running.pid, 'SIGKILL')
    },
    pause: () => process.kill(running.pid, 'SIGSTOP'),
    resume: () => process.kill(running.pid, 'SIGCONT'),
    async start() {
      await until('the killed database is gone', () => ended)
      running = await begin()
    },
    async remove() {
      await running.stop()
      rmSync(folder, { recursive: true, force: true })
    },
  }
}

// ——— people and sections ———

export type Person = { userId: string; sessionId: string; name: string }

/** The first state of a section: something small that readers can recognise. */
export function firstState(): Uint8Array {
  const doc = new Y.Doc()
  doc.clientID = 1
  doc.getMap('meta').set('title', 'A strip')
  return Y.encodeStateAsUpdate(doc)
}

export async function makePractice(db: Db['db']) {
  const practiceId = randomUUID()
  await db.insert(organization).values({ id: practiceId, name: 'Test practice', slug: practiceId })
  const person = async (role: PracticeRole | null, name = 'Somebody'): Promise<Person> => {
    const userId = randomUUID()
    const sessionId = randomUUID()
    await db.insert(user).values({ id: userId, name, email: `${userId}@test.example` })
    await db
      .insert(session)
      .values({ id: sessionId, userId, token: sessionId, expiresAt: new Date(Date.now() + 3_600_000) })
    if (role) await db.insert(member).values({ id: randomUUID(), organizationId: practiceId, userId, role })
    return { userId, sessionId, name }
  }
  const principal = await person('principal', 'Principal')
  const siteId = randomUUID()
  await db.insert(site).values({ id: siteId, practiceId, name: 'A site', ownerId: principal.userId })
  return {
    practiceId,
    siteId,
    principal,
    person,
    async section(state = firstState()): Promise<string> {
      const id = randomUUID()
      await db.transaction(async (tx) => {
        await tx.insert(section).values({ id, siteId, practiceId, title: 'A strip', createdBy: principal.userId })
        await createLog(tx, id, state)
      })
      return id
    },
    async link(sectionId: string, expiresAt: Date | null = null) {
      const token = randomBytes(24).toString('base64url')
      const id = randomUUID()
      await db.insert(link).values({
        id,
        sectionId,
        tokenHash: hashToken(token),
        label: 'For the client',
        createdBy: principal.userId,
        expiresAt,
      })
      return { id, token }
    },
  }
}
export type Practice = Awaited<ReturnType<typeof makePractice>>

// ——— sidecars ———

export async function startSidecar(connection: Db, limits: Partial<Limits> = {}, more: { redisUrl?: string } = {}) {
  const sidecar = create({
    log: process.env.LIVE_LOG
      ? { info: console.log, warn: console.log, error: console.log, debug: console.log }
      : undefined,
    connection,
    liveSecret: SECRET,
    appUrl: 'http://localhost:3000',
    limits,
    ...more,
  })
  const port = await sidecar.listen(0, '127.0.0.1')
  return { sidecar, port, url: `ws://127.0.0.1:${port}` } satisfies { sidecar: Sidecar; port: number; url: string }
}

let bundled: Promise<string> | null = null
/** The sidecar as it is shipped: one bundle. Built once a run, inside the clone, where its packages are found. */
function bundle(): Promise<string> {
  const outfile = path.resolve(`node_modules/.cache/doab-live-test/${process.pid}/main.js`)
  if (!bundled) process.once('exit', () => rmSync(path.dirname(outfile), { recursive: true, force: true }))
  bundled ??= build({
    entryPoints: ['realtime/main.ts'],
    outfile,
    bundle: true,
    platform: 'node',
    format: 'esm',
    target: 'node20',
    packages: 'external',
    logLevel: 'warning',
  }).then(() => outfile)
  return bundled
}

export async function sidecarProcess(databaseUrl: string, given: { port?: number; redisUrl?: string } = {}) {
  const file = await bundle()
  const port = given.port ?? (await freePort())
  const child: ChildProcess = spawn(process.execPath, [file], {
    env: {
      ...process.env,
      NODE_ENV: 'production',
      VITEST: '',
      LOG_LEVEL: process.env.LIVE_LOG ?? 'silent',
      DATABASE_URL: databaseUrl,
      REALTIME_PORT: String(port),
      HOST: '127.0.0.1',
      LIVE_SECRET: SECRET,
      APP_URL: 'http://localhost:3000',
      REDIS_URL: given.redisUrl ?? '',
    },
    stdio: ['ignore', 'inherit', 'inherit'],
  })
  const gone = new Promise<void>((resolve) => child.once('exit', () => resolve()))
  await until('the sidecar listens', async () => {
    if (child.exitCode !== null) throw new Error(`the sidecar ended with ${child.exitCode}`)
    return fetch(`http://127.0.0.1:${port}/health`).then(
      () => true,
      () => false,
    )
  })
  return {
    port,
    url: `ws://127.0.0.1:${port}`,
    pid: child.pid as number,
    async end(signal: NodeJS.Signals = 'SIGTERM') {
      if (child.exitCode === null && child.signalCode === null) child.kill(signal)
      await gone
    },
  }
}

// ——— pages ———

export type Ticketed = Ticket
type Entry = { person: Person } | { token: string }

/** A ticket as the app's route makes it. */
export const ticketFor = (db: Db['db'], entry: Entry, sectionId: string, url: string): Promise<Ticket> =>
  'person' in entry
    ? issueTicket(db, entry.person, sectionId, { secret: SECRET, url })
    : issueLinkTicket(db, entry.token, { secret: SECRET, url })

export type Page = Connection & { doc: Y.Doc; codes: number[] }

/** What the sheet uses, in Node: the product's own connection over a real socket. `url` is asked at each attempt. */
export function openPage(
  db: Db['db'],
  entry: Entry,
  sectionId: string,
  url: string | (() => string),
  more: Partial<ConnectOptions> & { doc?: Y.Doc } = {},
): Page {
  const doc = more.doc ?? new Y.Doc()
  const codes: number[] = []
  class Socket extends NodeSocket {
    constructor(address: string) {
      super(address)
      this.on('error', () => {})
      this.on('close', (code) => codes.push(code))
    }
  }
  const connection = connectSheet({
    sectionId,
    doc,
    userKey: null,
    WebSocket: Socket as unknown as typeof WebSocket,
    fetchTicket: async () => {
      const address = typeof url === 'function' ? url() : url
      try {
        return await ticketFor(db, entry, sectionId, address)
      } catch (error) {
        // As the route and ticket.ts between them would say it.
        const status = error instanceof Error && 'status' in error ? error.status : 0
        if (status === 403) throw new NoTicket(4403, 'no')
        if (status === 404) throw new NoTicket(4404, 'no')
        throw error
      }
    },
    ...more,
  })
  return Object.assign(connection, { doc, codes })
}

export const joined = async (page: Page) => {
  try {
    await until('the page has joined', () => page.state.kind === 'stored')
  } catch (error) {
    throw new Error(
      `${String(error)}; it is ${JSON.stringify(page.state)}, closed before with ${page.codes.join(', ')}`,
    )
  }
}
export const map = (page: { doc: Y.Doc }) => page.doc.getMap<unknown>('m')

/** A bare socket, for what no page of ours would send. */
export async function rawSocket(
  url: string,
  sectionId: string,
  ticket: string | null,
  options: { origin?: string } = {},
) {
  const socket = new NodeSocket(
    `${url}/${sectionId}${ticket === null ? '' : `?ticket=${encodeURIComponent(ticket)}`}`,
    options,
  )
  const frames: Uint8Array[] = []
  const closed = new Promise<{ code: number; reason: string }>((resolve) =>
    socket.once('close', (code, reason) => resolve({ code, reason: reason.toString() })),
  )
  socket.on('error', () => {})
  socket.on('message', (data) => frames.push(new Uint8Array(data as Buffer)))
  await new Promise<void>((resolve) => {
    socket.once('open', () => resolve())
    socket.once('close', () => resolve())
  })
  return { socket, frames, closed, state: () => socket.readyState }
}
