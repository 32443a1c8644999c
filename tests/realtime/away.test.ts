import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest'
import { connect, type Connection as Db } from '../../drizzle/client'
import { loadDoc } from '../../drizzle/log'
import {
  joined,
  makePractice,
  map,
  openPage,
  ownMariadb,
  type Page,
  type Practice,
  startSidecar,
  type Ticketed,
  ticketFor,
  until,
} from './support'

describe('MariaDB goes away and comes back', () => {
  let mariadb: Awaited<ReturnType<typeof ownMariadb>>
  let connection: Db
  let practice: Practice
  let live: Awaited<ReturnType<typeof startSidecar>>
  const open: Page[] = []

  beforeAll(async () => {
    mariadb = await ownMariadb()
    connection = connect(mariadb.url, { connectionLimit: 12 })
    practice = await makePractice(connection.db)
    live = await startSidecar(connection)
  })
  afterEach(() => {
    for (const one of open.splice(0)) one.close()
  })
  afterAll(async () => {
    await live.sidecar.close()
    await connection.close()
    await mariadb.remove()
  })

  for (const [how, leave, back] of [
    ['killed', () => mariadb.kill(), () => mariadb.start()],
    ['hanging', () => mariadb.pause(), async () => mariadb.resume()],
  ] as const)
    it(`${how}: edits are held and shown to nobody, the sheet says so, and all of them go through in order afterwards`, async () => {
      const { db } = connection
      const sectionId = await practice.section()
      // A ticket beforehand: while the database is away the app gives none.
      const made: Ticketed = await ticketFor(db, { person: practice.principal }, sectionId, live.url)
      const pages = [0, 1].map(() =>
        openPage(db, { person: practice.principal }, sectionId, live.url, { fetchTicket: async () => made }),
      )
      open.push(...pages)
      const [a, b] = pages as [Page, Page]
      await Promise.all([joined(a), joined(b)])
      const seen: unknown[] = []
      map(b).observe(() => seen.push(map(b).get('n')))
      leave()
      for (let i = 0; i < 10; i++) {
        map(a).set('n', i)
        map(a).set(`e${i}`, i)
      }
      await until('the sheet says so', () => a.state.kind === 'stalled')
      expect(a.state).toMatchObject({ waiting: 20 })
      // Presence goes on; it was sent after the edits, so these have long been read.
      a.present({ picked: ['still here'] })
      await until('presence goes on', () => b.peers.some((peer) => peer.picked?.[0] === 'still here'))
      expect(seen).toEqual([])
      expect((await fetch(`http://127.0.0.1:${live.port}/health`)).status).toBe(503)
      await back()
      await until('everything is stored', () => a.state.kind === 'stored', 20_000)
      await until('and seen', () => map(b).get('e9') === 9 && map(b).get('n') === 9)
      expect((await loadDoc(db, sectionId))?.doc.getMap('m').toJSON()).toEqual(map(a).toJSON())
      expect([...a.codes, ...b.codes]).toEqual([])
      await until('health', async () => (await fetch(`http://127.0.0.1:${live.port}/health`)).status === 200)
    })
})
