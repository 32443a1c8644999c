import { eq } from 'drizzle-orm'
import { SignJWT } from 'jose'
import * as encoding from 'lib0/encoding'
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest'
import * as Y from 'yjs'
import { AUDIENCE, CLOSE, type TicketClaims } from '~/live/codes'
import { inkOf } from '~/server/live/issue-ticket.server'
import { loadDoc } from '../../drizzle/log'
import { section } from '../../drizzle/schema'
import { presenceFrame, readFrame, stepTwo, updateFrame } from '../../realtime/protocol'
import { testConnection } from '../setup/clean'
import {
  joined,
  makePractice,
  map,
  openPage,
  type Page,
  type Person,
  type Practice,
  rawSocket,
  SECRET,
  startSidecar,
  ticketFor,
  until,
} from './support'

const connection = testConnection(12)
const { db } = connection
let practice: Practice
let live: Awaited<ReturnType<typeof startSidecar>>
let sectionId: string
const open: Page[] = []
const page = (...args: Parameters<typeof openPage>) => {
  const made = openPage(...args)
  open.push(made)
  return made
}
const stateOf = async () => Buffer.from(Y.encodeStateAsUpdate((await loadDoc(db, sectionId))?.doc ?? new Y.Doc()))

beforeAll(async () => {
  practice = await makePractice(db)
  live = await startSidecar(connection)
  sectionId = await practice.section()
})
afterEach(() => {
  for (const one of open.splice(0)) one.close()
})
afterAll(async () => {
  await live.sidecar.close()
  await connection.close()
})

const claims = (person: Person, change: Partial<TicketClaims> = {}): TicketClaims => ({
  section: sectionId,
  epoch: 1,
  who: { kind: 'person', userId: person.userId, sessionId: person.sessionId },
  may: 'write',
  name: 'Somebody',
  ink: 0,
  ...change,
})
const sign = (payload: object, { secret = SECRET, audience = AUDIENCE.ticket as string, seconds = 60 } = {}) =>
  new SignJWT({ ...payload })
    .setProtectedHeader({ alg: 'HS256' })
    .setAudience(audience)
    .setExpirationTime(Math.floor(Date.now() / 1000) + seconds)
    .sign(new TextEncoder().encode(secret))

/** Knocks with a ticket; the code and reason it is turned away with. Whatever it sends meanwhile must not be read. */
async function turnedAway(ticket: string | null, options: { origin?: string; section?: string } = {}) {
  const knock = await rawSocket(live.url, options.section ?? sectionId, ticket, options)
  const doc = new Y.Doc()
  doc.getMap('m').set('intruder', true)
  knock.socket.send(stepTwo(Y.encodeStateAsUpdate(doc)), () => {})
  const said = await knock.closed
  // Not a byte of the section has come.
  expect(knock.frames).toEqual([])
  return said
}

describe('who is let in', () => {
  it('nobody without a true ticket for this section, its epoch and this moment', async () => {
    const { principal } = practice
    const before = await stateOf()
    expect((await turnedAway(null)).code).toBe(CLOSE.ticket)
    expect((await turnedAway('nonsense')).code).toBe(CLOSE.ticket)
    expect((await turnedAway(await sign(claims(principal), { secret: `${SECRET}x` }))).code).toBe(CLOSE.ticket)
    expect((await turnedAway(await sign(claims(principal), { seconds: -5 }))).code).toBe(CLOSE.ticket)
    expect((await turnedAway(await sign(claims(principal), { audience: AUDIENCE.poke }))).code).toBe(CLOSE.ticket)
    expect((await turnedAway(await sign({ section: sectionId }))).code).toBe(CLOSE.ticket)
    const other = await practice.section()
    expect((await turnedAway(await sign(claims(principal)), { section: other })).code).toBe(CLOSE.ticket)
    expect((await turnedAway(await sign(claims(principal, { epoch: 7 })))).code).toBe(CLOSE.epoch)
    // An unsigned ticket is no ticket.
    const head = Buffer.from('{"alg":"none"}').toString('base64url')
    const body = Buffer.from(JSON.stringify({ ...claims(principal), aud: 'live', exp: 9e9 })).toString('base64url')
    expect((await turnedAway(`${head}.${body}.`)).code).toBe(CLOSE.ticket)
    expect(await stateOf()).toEqual(before)
  })

  it('nobody whom the facts of the moment keep out, however good the ticket', async () => {
    const stranger = await practice.person(null)
    expect((await turnedAway(await sign(claims(stranger)))).code).toBe(CLOSE.noRight)
    const gone = { ...practice.principal, sessionId: 'signed-out' }
    expect((await turnedAway(await sign(claims(gone)))).code).toBe(CLOSE.ticket)
    const nowhere = '00000000-0000-0000-0000-000000000000'
    const ticket = await sign(claims(practice.principal, { section: nowhere }))
    expect((await turnedAway(ticket, { section: nowhere })).code).toBe(CLOSE.gone)
    const link = await practice.link(await practice.section())
    const foreign = await sign(claims(practice.principal, { who: { kind: 'link', linkId: link.id } }))
    expect([CLOSE.noRight, CLOSE.gone]).toContain((await turnedAway(foreign)).code)
  })

  it('no page of another host', async () => {
    const ticket = await sign(claims(practice.principal))
    expect((await turnedAway(ticket, { origin: 'https://elsewhere.example' })).code).toBe(CLOSE.noRight)
    expect((await turnedAway(ticket, { origin: 'null' })).code).toBe(CLOSE.noRight)
    for (const origin of ['http://localhost:3000', 'http://127.0.0.1:3000']) {
      const welcome = await rawSocket(live.url, sectionId, ticket, { origin })
      await until('it is served', () => welcome.frames.length > 0)
      welcome.socket.close()
    }
  })
})

describe('who may write', () => {
  const doors = [
    ['an update', (update: Uint8Array) => [updateFrame(update)]],
    ['a sync step 2', (update: Uint8Array) => [stepTwo(update)]],
    [
      'a message in parts',
      (update: Uint8Array) => {
        const frame = updateFrame(update)
        const half = Math.ceil(frame.length / 2)
        return [0, 1].map((index) =>
          encoding.encode((e) => {
            for (const n of [12, 2, index]) encoding.writeVarUint(e, n)
            encoding.writeVarUint8Array(e, frame.subarray(index * half, (index + 1) * half))
          }),
        )
      },
    ],
  ] as const

  for (const [door, frames] of doors)
    it(`neither a reader nor the holder of a link, by ${door}`, async () => {
      const reader = await practice.person('reader')
      const link = await practice.link(sectionId)
      const witness = page(db, { person: practice.principal }, sectionId, live.url)
      await joined(witness)
      const before = await stateOf()
      for (const entry of [{ person: reader }, { token: link.token }]) {
        const { ticket, may } = await ticketFor(db, entry, sectionId, live.url)
        expect(may).toBe('read')
        const socket = await rawSocket(live.url, sectionId, ticket)
        await until('it is served', () => socket.frames.length > 0)
        const doc = new Y.Doc()
        doc.getMap('m').set('intruder', true)
        for (const frame of frames(Y.encodeStateAsUpdate(doc))) socket.socket.send(frame)
        await until('it is refused', () => socket.state() > 1 || socket.frames.some((f) => f[0] === 10 && f[2] === 1))
        socket.socket.terminate()
      }
      expect(map(witness).has('intruder')).toBe(false)
      expect(await stateOf()).toEqual(before)
    })

  it('a reader sees everything, is told that updates are refused, and keeps them as unstored', async () => {
    const reader = page(db, { person: await practice.person('reader') }, sectionId, live.url)
    const writer = page(db, { person: practice.principal }, sectionId, live.url)
    await Promise.all([joined(reader), joined(writer)])
    expect(reader.may).toBe('read')
    map(writer).set('shown', 1)
    await until('the reader sees it', () => map(reader).get('shown') === 1)
    map(reader).set('mine', 1)
    await until('the reader is told', () => reader.state.kind === 'refused')
    expect(reader.waiting).toBe(1)
    map(writer).set('after', 1)
    await until('the reader still sees', () => map(reader).get('after') === 1)
    expect(reader.waiting).toBe(1)
    expect(map(writer).has('mine')).toBe(false)
  })
})

describe('what others see of somebody', () => {
  it('name, ink and kind are the ticket’s whatever the page says', async () => {
    const a = await practice.person('engineer', 'Ada')
    const seen = page(db, { person: practice.principal }, sectionId, live.url)
    await joined(seen)
    const { ticket } = await ticketFor(db, { person: a }, sectionId, live.url)
    const socket = await rawSocket(live.url, sectionId, ticket)
    const state = JSON.stringify({ who: { id: 'x', name: 'Principal', ink: 99, kind: 'person' }, picked: ['ground'] })
    socket.socket.send(presenceFrame([{ clientId: 77, clock: 1, state }]))
    await until('the other sees it', () => seen.peers.length > 0)
    expect(seen.peers[0]).toMatchObject({
      clientId: 77,
      who: { id: a.userId, name: 'Ada', kind: 'person', ink: inkOf(a.userId) },
      picked: ['ground'],
    })
    socket.socket.terminate()
    await until('gone at once when the line is cut', () => seen.peers.length === 0)
  })

  it('the holder of a link shows a pointer and nothing else; a reader shows no gesture', async () => {
    const seen = page(db, { person: practice.principal }, sectionId, live.url)
    const link = await practice.link(sectionId)
    const viewer = page(db, { token: link.token }, sectionId, live.url)
    const reader = page(db, { person: await practice.person('reader', 'Rita') }, sectionId, live.url)
    await Promise.all([joined(seen), joined(viewer), joined(reader)])
    const gesture = { id: 'g', edits: [{ do: 'set' as const, path: 'title', value: 'Mine' }] }
    const pointer = { x: 3, z: 4, panel: 'section' }
    for (const one of [viewer, reader]) one.present({ pointer, gesture, picked: ['ground'], presenting: true })
    const of = (kind: string) => seen.peers.find((peer) => peer.who.kind === kind)
    await until('both are seen', () => of('link')?.pointer?.x === 3 && of('person')?.pointer?.x === 3)
    expect(Object.keys(of('link') ?? {}).sort()).toEqual(['clientId', 'pointer', 'who'])
    expect(of('link')?.who.name).toBe('Viewer')
    expect(of('person')).toMatchObject({ gesture: null, picked: ['ground'], who: { name: 'Rita' } })
  })

  it('nobody speaks for another', async () => {
    const a = page(db, { person: practice.principal }, sectionId, live.url)
    const b = page(db, { person: await practice.person('engineer') }, sectionId, live.url)
    await Promise.all([joined(a), joined(b)])
    a.present({ picked: ['base'] })
    await until('b sees a', () => b.peers.some((peer) => peer.picked?.[0] === 'base'))
    const clientId = b.peers[0]?.clientId ?? 0
    const { ticket } = await ticketFor(db, { person: await practice.person('engineer') }, sectionId, live.url)
    const socket = await rawSocket(live.url, sectionId, ticket)
    socket.socket.send(presenceFrame([{ clientId, clock: 1e6, state: 'null' }]))
    socket.socket.send(presenceFrame([{ clientId, clock: 1e6, state: '{"picked":["fake"]}' }]))
    socket.socket.send(presenceFrame([{ clientId: 5, clock: 1, state: '{"picked":["own"]}' }]))
    await until('its own word arrives', () => b.peers.some((peer) => peer.picked?.[0] === 'own'))
    expect(b.peers.find((peer) => peer.clientId === clientId)?.picked).toEqual(['base'])
    socket.socket.terminate()
  })
})

describe('the other doors', () => {
  it('health tells whether the database answers; nothing else is served', async () => {
    const base = `http://127.0.0.1:${live.port}`
    const health = await fetch(`${base}/health`)
    expect(health.status).toBe(200)
    expect(await health.json()).toMatchObject({ ok: true, database: true })
    expect((await fetch(`${base}/${sectionId}`)).status).toBe(404)
  })

  it('a poke needs the secret', async () => {
    const poke = (headers: Record<string, string>) =>
      fetch(`http://127.0.0.1:${live.port}/poke`, { method: 'POST', headers }).then((r) => r.status)
    expect(await poke({})).toBe(403)
    expect(await poke({ authorization: `Bearer ${await sign({}, { audience: AUDIENCE.ticket })}` })).toBe(403)
    expect(await poke({ authorization: `Bearer ${await sign({}, { audience: AUDIENCE.poke })}` })).toBe(200)
  })

  it('a section that cannot be read is refused, not shown empty', async () => {
    const broken = await practice.section()
    const { sectionSnapshot, sectionUpdate } = await import('../../drizzle/schema')
    await db.delete(sectionUpdate).where(eq(sectionUpdate.sectionId, broken))
    await db
      .update(sectionSnapshot)
      .set({ state: new Uint8Array([7]) })
      .where(eq(sectionSnapshot.sectionId, broken))
    const { ticket } = await ticketFor(db, { person: practice.principal }, broken, live.url)
    const socket = await rawSocket(live.url, broken, ticket)
    expect((await socket.closed).code).toBe(CLOSE.unreadable)
    expect(socket.frames).toEqual([])
    await db.delete(section).where(eq(section.id, broken))
  })

  it('frames of ours can be read back', () => {
    expect(readFrame(updateFrame(new Uint8Array([1, 2])))).toMatchObject({ is: 'update' })
  })
})
