import { afterAll, beforeAll, describe, expect, it } from 'vitest'
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
  seeded,
  sidecarProcess,
  type Ticketed,
  ticketFor,
  until,
} from './support'

/**
 * kill -9 at random moments under load, real processes. Two claims are checked in each round: whatever a writer was told is
 * stored, and whatever another page has seen, is in MariaDB afterwards. The pages are closed at the moment of the kill, so that
 * nothing can be mended by sending it again.
 */
describe('kill -9 under load', () => {
  let mariadb: Awaited<ReturnType<typeof ownMariadb>>
  let connection: Db
  let practice: Practice
  const random = seeded(30)

  beforeAll(async () => {
    mariadb = await ownMariadb()
    connection = connect(mariadb.url, { connectionLimit: 4 })
    practice = await makePractice(connection.db)
  })
  afterAll(async () => {
    await sidecar?.end('SIGKILL')
    await connection.close()
    await mariadb.remove()
  })

  type Sidecar = Awaited<ReturnType<typeof sidecarProcess>>
  let sidecar: Sidecar | null = null
  let port = 0
  const startLive = async () => {
    sidecar = await sidecarProcess(mariadb.url, port ? { port } : {})
    port = sidecar.port
    return sidecar
  }

  async function round(what: 'sidecar' | 'database' | 'both') {
    const live = sidecar ?? (await startLive())
    const sectionId = await practice.section()
    const ticket: Ticketed = await ticketFor(connection.db, { person: practice.principal }, sectionId, live.url)
    const pages = Array.from({ length: 3 }, () =>
      openPage(connection.db, { person: practice.principal }, sectionId, live.url, { fetchTicket: async () => ticket }),
    )
    await Promise.all(pages.map(joined))
    const [a, b, witness] = pages as [Page, Page, Page]
    /** What was promised: key → value, by acknowledgement or by having been seen. */
    const promised = new Map<string, number>()
    map(witness).observe((event) => {
      for (const key of event.keysChanged) promised.set(key, map(witness).get(key) as number)
    })
    let drawing = true
    const draw = async (page: Page, name: string) => {
      for (let i = 0; drawing; i++) {
        const key = `${name}${i}`
        map(page).set(key, i)
        if (i % 3 === 0) {
          const upTo = i
          void until('acknowledged', () => page.waiting === 0 || !drawing, 20_000).then(() => {
            if (drawing) for (let k = 0; k <= upTo; k++) promised.set(`${name}${k}`, k)
          })
        }
        await new Promise((r) => setTimeout(r, random.int(4)))
      }
    }
    const drawers = [draw(a, 'a'), draw(b, 'b')]
    const target = 15 + random.int(60)
    await until('some is promised', () => promised.size > target)
    if (what !== 'database') process.kill(live.pid, 'SIGKILL')
    if (what !== 'sidecar') mariadb.kill()
    if (what === 'database') {
      // The sidecar lives on and must promise nothing that is not stored; let it meet the loss before it is judged.
      const waiting = () => a.waiting + b.waiting
      await until('it meets the loss', () => waiting() > 4)
    }
    drawing = false
    const judged = new Map(promised)
    for (const page of pages) page.close()
    await Promise.all(drawers)
    if (what !== 'database') {
      await live.end('SIGKILL')
      sidecar = null
    }
    if (what !== 'sidecar') await mariadb.start()
    const stored = (await loadDoc(connection.db, sectionId))?.doc.getMap<number>('m')
    const lost = [...judged].filter(([key, value]) => stored?.get(key) !== value).map(([key]) => key)
    return { promised: judged.size, lost }
  }

  for (const [what, rounds] of [
    ['sidecar', 16],
    ['database', 7],
    ['both', 7],
  ] as const)
    it(`${what}: ${rounds} rounds, nothing promised is lost`, async () => {
      let promised = 0
      for (let i = 0; i < rounds; i++) {
        const result = await round(what)
        promised += result.promised
        expect(result.lost, `round ${i + 1}`).toEqual([])
      }
      expect(promised).toBeGreaterThan(rounds * 15)
      if (what === 'both') await sidecar?.end()
    }, 120_000)

  it('a terminated sidecar says goodbye and stores what waits', async () => {
    const live = sidecar ?? (await startLive())
    const sectionId = await practice.section()
    const ticket = await ticketFor(connection.db, { person: practice.principal }, sectionId, live.url)
    const page = openPage(connection.db, { person: practice.principal }, sectionId, live.url, {
      fetchTicket: async () => ticket,
    })
    await joined(page)
    for (let i = 0; i < 50; i++) map(page).set(`k${i}`, i)
    const after = page.doc.getMap('m').size
    await until('it is on its way', () => page.waiting > 0)
    await live.end('SIGTERM')
    sidecar = null
    expect(page.codes).toEqual([4503])
    await startLive()
    await until('it joins again by itself, and all is stored', () => page.state.kind === 'stored', 15_000)
    expect((await loadDoc(connection.db, sectionId))?.doc.getMap('m').size).toBe(after)
    page.close()
    await (sidecar as Sidecar | null)?.end()
    sidecar = null
  })
})
