import { type ChildProcess, spawn } from 'node:child_process'
import { readFileSync } from 'node:fs'
import net from 'node:net'
import { HocuspocusProvider, HocuspocusProviderWebsocket } from '@hocuspocus/provider'
import { WebSocket } from 'ws'
import { WebsocketProvider } from 'y-websocket'
import * as Y from 'yjs'
import { MESSAGE } from '~/live/codes'
import { freePort } from '../../app/run/parts/ports.mjs'
import { connect } from '../../drizzle/client'
import {
  makePractice,
  ownMariadb,
  type Person,
  type Practice,
  sidecarProcess,
  ticketFor,
  until,
} from '../realtime/support'

/**
 * npm run bench:realtime [-- quick]
 * Edit → seen by everybody else, joining a large document with a long history, memory, and what is left of a seen edit after
 * kill -9; Doab's sidecar (access checked, stored in a durable MariaDB first) beside a general-purpose Yjs server in memory, same
 * clients, same load, same run. Clients and servers share the machine, so compare columns, not machines.
 */
const quick = process.argv.includes('quick')
process.setMaxListeners(0)
/** Only these parts: latency, rooms, join, kill. */
const only = process.argv.slice(2).filter((word) => word !== 'quick')
const wanted = (part: string) => only.length === 0 || only.includes(part)
const SECONDS = quick ? 4 : 10

type Client = { doc: Y.Doc; synced: Promise<void>; close(): void }
type Server = {
  name: string
  start(): Promise<void>
  stop(signal?: NodeJS.Signals): Promise<void>
  pid(): number
  /** Names of this many rooms, made ready. */
  rooms(count: number): Promise<string[]>
  join(room: string): Promise<Client>
}

const sleep = (ms: number) => new Promise((r) => setTimeout(r, ms))
const percentile = (sorted: number[], p: number) =>
  sorted[Math.min(sorted.length - 1, Math.floor(p * sorted.length))] ?? Number.NaN
const usage = (pid: number) => {
  const fields = readFileSync(`/proc/${pid}/stat`, 'utf8').split(') ')[1]?.split(' ') ?? []
  return { cpu: (Number(fields[11]) + Number(fields[12])) / 100, rss: (Number(fields[21]) * 4096) / 2 ** 20 }
}

// ——— the two servers ———

async function doab(): Promise<Server & { remove(): Promise<void> }> {
  const mariadb = await ownMariadb()
  const connection = connect(mariadb.url, { connectionLimit: 4 })
  const practice: Practice = await makePractice(connection.db)
  const people: Person[] = await Promise.all(Array.from({ length: 12 }, () => practice.person('engineer')))
  let live: Awaited<ReturnType<typeof sidecarProcess>> | null = null
  let next = 0
  return {
    name: 'doab',
    start: async () => {
      live = await sidecarProcess(mariadb.url)
    },
    stop: async (signal) => live?.end(signal),
    pid: () => live?.pid ?? 0,
    rooms: (count) => Promise.all(Array.from({ length: count }, () => practice.section())),
    join: async (room) => {
      const doc = new Y.Doc()
      const person = people[next++ % people.length] as Person
      const ticket = await ticketFor(connection.db, { person }, room, live?.url ?? '')
      const provider = new WebsocketProvider(ticket.url, room, doc, {
        WebSocketPolyfill: WebSocket as unknown as typeof globalThis.WebSocket,
        disableBc: true,
        params: { ticket: ticket.ticket },
      })
      // Acknowledgements and notices; the sheet's own connection reads them.
      for (const type of [MESSAGE.acknowledge, MESSAGE.notice]) provider.messageHandlers[type] = () => {}
      const synced = new Promise<void>((resolve) => provider.on('sync', (yes) => yes && resolve()))
      return { doc, synced, close: () => provider.destroy() }
    },
    remove: async () => {
      await connection.close()
      await mariadb.remove()
    },
  }
}

function yardstick(): Server {
  let child: ChildProcess | null = null
  let port = 0
  let made = 0
  return {
    name: 'hocuspocus 4.7, memory',
    start: async () => {
      port = await freePort()
      child = spawn(process.execPath, ['tests/bench/hocuspocus-server.mjs'], {
        env: { ...process.env, PORT: String(port) },
        stdio: ['ignore', 'ignore', 'inherit'],
      })
      await until(
        'the yardstick listens',
        () =>
          new Promise<boolean>((resolve) => {
            const probe = net.connect(port, '127.0.0.1', () => {
              probe.end()
              resolve(true)
            })
            probe.on('error', () => resolve(false))
          }),
      )
    },
    stop: async (signal = 'SIGTERM') => {
      const gone = new Promise((resolve) => child?.once('exit', resolve))
      child?.kill(signal)
      await Promise.race([gone, sleep(3_000).then(() => child?.kill('SIGKILL'))])
    },
    pid: () => child?.pid ?? 0,
    rooms: async (count) => Array.from({ length: count }, () => `room-${made++}`),
    join: async (room) => {
      const doc = new Y.Doc()
      const socket = new HocuspocusProviderWebsocket({ url: `ws://127.0.0.1:${port}`, WebSocketPolyfill: WebSocket })
      let done = () => {}
      const synced = new Promise<void>((resolve) => {
        done = resolve
      })
      const provider = new HocuspocusProvider({
        websocketProvider: socket,
        name: room,
        document: doc,
        token: 'x',
        onSynced: () => done(),
      })
      provider.attach()
      return {
        doc,
        synced,
        close: () => {
          provider.destroy()
          socket.destroy()
        },
      }
    },
  }
}

// ——— the loads ———

const group = async (server: Server, room: string, size: number) => {
  const clients: Client[] = []
  for (let i = 0; i < size; i++) clients.push(await server.join(room))
  const late = sleep(8_000).then(() => Promise.reject(new Error('a client does not sync')))
  late.catch(() => {})
  await Promise.race([Promise.all(clients.map((c) => c.synced)), late])
  return clients
}

type Storm = {
  p50: number
  p95: number
  p99: number
  sent: number
  seen: number
  expected: number
  perSecond: number
  rss: number
  cpu: number
}

/** Everybody edits; from the edit to each other client's seeing it. */
async function storm(server: Server, groups: Client[][], rate: number): Promise<Storm> {
  const latencies: number[] = []
  let sent = 0
  let expected = 0
  for (const clients of groups)
    for (const [i, client] of clients.entries()) {
      const edits = client.doc.getMap<{ t: number }>('edits')
      edits.observe((event) => {
        if (event.transaction.local) return
        for (const key of event.keysChanged) {
          const t = edits.get(key)?.t
          if (t && key !== `c${i}`) latencies.push(performance.now() - t)
        }
      })
    }
  const before = usage(server.pid())
  const end = performance.now() + SECONDS * 1000
  for (const clients of groups)
    for (const [i, client] of clients.entries()) {
      const edits = client.doc.getMap('edits')
      const shape = client.doc.getMap(`shape${i}`)
      const step = () => {
        if (performance.now() >= end) return
        client.doc.transact(() => {
          shape.set('x', Math.random())
          shape.set('z', Math.random())
          edits.set(`c${i}`, { t: performance.now() })
        })
        sent++
        expected += clients.length - 1
        setTimeout(step, (1000 / rate) * (0.7 + 0.6 * Math.random()))
      }
      setTimeout(step, (Math.random() * 1000) / rate)
    }
  let rss = 0
  while (performance.now() < end) {
    await sleep(250)
    rss = Math.max(rss, usage(server.pid()).rss)
  }
  await sleep(1_000)
  latencies.sort((a, b) => a - b)
  return {
    p50: percentile(latencies, 0.5),
    p95: percentile(latencies, 0.95),
    p99: percentile(latencies, 0.99),
    sent,
    seen: latencies.length,
    expected,
    perSecond: latencies.length / SECONDS,
    rss,
    cpu: usage(server.pid()).cpu - before.cpu,
  }
}

const OBJECTS = 5_000
const EDITS = 50_000

/** A large document with a long history, made through the front door. */
async function large(server: Server, room: string) {
  const [client] = await group(server, room, 1)
  const { doc } = client as Client
  const shapes = doc.getMap<Y.Map<unknown>>('shapes')
  for (let from = 0; from < OBJECTS; from += 100) {
    doc.transact(() => {
      for (let i = from; i < from + 100; i++) {
        const shape = new Y.Map<unknown>()
        for (const key of ['kind', 'x', 'z', 'k', 'rate', 'name', 'n']) shape.set(key, Math.random())
        shape.set('note', `source note ${i}`)
        shapes.set(`s${i}`, shape)
      }
    })
    await sleep(9)
  }
  for (let from = 0; from < EDITS; from += 50) {
    doc.transact(() => {
      for (let i = 0; i < 50; i++) shapes.get(`s${(from * 7 + i * 131) % OBJECTS}`)?.set('x', Math.random())
    })
    await sleep(9)
  }
  await sleep(1_500)
  return client as Client
}

async function timeToJoin(server: Server, room: string): Promise<number> {
  const from = performance.now()
  const client = await server.join(room)
  await until('the document is there', () => client.doc.getMap('shapes').size === OBJECTS, 15_000)
  const ms = performance.now() - from
  client.close()
  return ms
}

async function joining(server: Server) {
  const [room] = (await server.rooms(1)) as [string]
  const author = await large(server, room)
  const warm: number[] = []
  for (let i = 0; i < 7; i++) warm.push(await timeToJoin(server, room))
  warm.sort((a, b) => a - b)
  const rss = usage(server.pid()).rss
  author.close()
  const again = async (signal: NodeJS.Signals) => {
    await server.stop(signal)
    await server.start()
    return timeToJoin(server, room).catch(() => Number.NaN)
  }
  const restarted = await again('SIGTERM')
  const killed = Number.isNaN(restarted) ? Number.NaN : await again('SIGKILL')
  return { warm: percentile(warm, 0.5), restarted, killed, rss }
}

async function survives(server: Server, i: number): Promise<boolean> {
  const [room] = (await server.rooms(1)) as [string]
  const clients = await group(server, room, 2)
  const [a, b] = clients as [Client, Client]
  a.doc.getMap('m').set('last', i)
  await until('it is seen', () => b.doc.getMap('m').get('last') === i)
  process.kill(server.pid(), 'SIGKILL')
  for (const client of clients) client.close()
  await server.stop('SIGKILL')
  await server.start()
  const [fresh] = (await group(server, room, 1)) as [Client]
  const kept = fresh.doc.getMap('m').get('last') === i
  fresh.close()
  return kept
}

/** Edits another client has seen, then SIGKILL at once: how many are gone? A server that does not come back counts as lost. */
async function durability(server: Server, rounds: number) {
  let lost = 0
  for (let i = 0; i < rounds; i++) {
    const kept = await survives(server, i).catch(() => false)
    if (!kept) lost++
  }
  return { lost, rounds }
}

const row = (...cells: (string | number)[]) =>
  console.log(cells.map((c, i) => (i === 0 ? String(c).padEnd(24) : String(c).padStart(10))).join(''))
const ms = (value: number) => (Number.isNaN(value) ? 'lost' : value.toFixed(1))

async function measure(server: Server) {
  console.log(`\n${server.name}`)
  row('edit → seen, ms', 'p50', 'p95', 'p99', 'edits', 'seen', 'missing', 'seen/s', 'RSS MiB', 'CPU s')
  const show = (label: string, s: Storm) =>
    row(
      label,
      ms(s.p50),
      ms(s.p95),
      ms(s.p99),
      s.sent,
      s.seen,
      s.expected - s.seen,
      Math.round(s.perSecond),
      s.rss.toFixed(0),
      s.cpu.toFixed(1),
    )
  await server.start()
  for (const size of wanted('latency') ? [2, 10, 50] : []) {
    const [room] = (await server.rooms(1)) as [string]
    const clients = await group(server, room, size)
    show(`1 room × ${size}, 5/s each`, await storm(server, [clients], 5))
    for (const client of clients) client.close()
  }
  if (wanted('rooms')) {
    const groups: Client[][] = []
    for (const room of await server.rooms(100)) groups.push(await group(server, room, 2))
    show('100 rooms × 2, 2/s each', await storm(server, groups, 2))
    for (const client of groups.flat()) client.close()
  }
  if (wanted('join')) {
    const joined = await joining(server)
    row(`join ${OBJECTS} obj/${EDITS} ed`, 'warm', 'restarted', 'killed', 'RSS MiB')
    row('ms', ms(joined.warm), ms(joined.restarted), ms(joined.killed), joined.rss.toFixed(0))
  }
  if (wanted('kill')) {
    const { lost, rounds } = await durability(server, quick ? 3 : 10)
    row('seen, then SIGKILL', `${lost} of ${rounds} lost`)
  }
  await server.stop('SIGTERM')
}

const ours = await doab()
await measure(ours)
await measure(yardstick())
await ours.remove()
process.exit(0)
