import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import * as Y from 'yjs'
import { compact, loadDoc } from '../../drizzle/log'
import { testConnection } from '../setup/clean'
import { joined, makePractice, map, openPage, type Page, type Practice, seeded, startSidecar, until } from './support'

/**
 * Random schedules: several people draw, lose the line, come back, are closed and reopened with what they kept, the log is folded
 * under them, the sidecar is replaced. Whatever the order, in the end every side and the log hold the same, and every edit of a
 * key that only its author touches is there. A failing seed can be run again by itself.
 */
describe('random schedules converge', () => {
  const connection = testConnection(12)
  const { db } = connection
  let practice: Practice
  beforeAll(async () => {
    practice = await makePractice(db)
  })
  afterAll(() => connection.close())

  for (const seed of [1, 2, 3, 4, 5, 6])
    it(`seed ${seed}`, async () => {
      const random = seeded(seed)
      const sectionId = await practice.section()
      let live = await startSidecar(connection, { idleRoom: 50 })
      const url = () => live.url
      const people = await Promise.all([0, 1, 2].map(() => practice.person('engineer')))
      const make = (n: number, doc?: Y.Doc) =>
        openPage(db, { person: people[n] ?? practice.principal }, sectionId, url, doc ? { doc } : {})
      const pages: Page[] = [0, 1, 2].map((n) => make(n))
      await Promise.all(pages.map(joined))
      const own: Record<string, unknown>[] = [{}, {}, {}]
      let closed: { n: number; doc: Y.Doc } | null = null

      for (let step = 0; step < 80; step++) {
        const n = random.int(3)
        const page = pages[n] as Page
        const m = page.doc.getMap<unknown>('m')
        const chance = random.next()
        if (chance < 0.55) {
          const key = `own${n}.${random.int(6)}`
          m.set(key, step)
          ;(own[n] as Record<string, unknown>)[key] = step
        } else if (chance < 0.7) m.set(`shared${random.int(4)}`, random.bool() ? step : new Y.Map([['x', step]]))
        else if (chance < 0.8) m.delete(`shared${random.int(4)}`)
        else if (chance < 0.86 && !closed) {
          page.close()
          closed = { n, doc: page.doc }
        } else if (chance < 0.92 && closed) {
          pages[closed.n] = make(closed.n, closed.doc)
          closed = null
        } else if (chance < 0.95) await compact(db, sectionId, { keepDays: random.bool() ? -1 : 30 })
        else if (chance < 0.97) {
          const before = live
          live = await startSidecar(connection, { idleRoom: 50 })
          await before.sidecar.close()
        }
        if (random.bool(0.3)) await new Promise((r) => setTimeout(r, random.int(8)))
      }
      if (closed) pages[closed.n] = make(closed.n, closed.doc)
      await until('everything is stored', () => pages.every((p) => p.state.kind === 'stored'), 6_000).catch(
        (error: unknown) => {
          const states = pages.map((p) => JSON.stringify({ ...p.state, may: p.may, codes: p.codes }))
          throw new Error(`${String(error)}: ${states.join(' ')}`)
        },
      )
      const side = (doc: Y.Doc) => JSON.stringify(Object.entries(doc.getMap('m').toJSON()).sort())
      await until('every side is the same', () => new Set(pages.map((p) => side(p.doc))).size === 1)
      const [first] = pages as [Page]
      expect(side((await loadDoc(db, sectionId))?.doc ?? new Y.Doc())).toBe(side(first.doc))
      for (const edits of own) expect(map(first).toJSON()).toMatchObject(edits)
      for (const page of pages) page.close()
      await live.sidecar.close()
    })
})
