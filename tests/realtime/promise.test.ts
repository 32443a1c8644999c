import { eq } from 'drizzle-orm'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import * as Y from 'yjs'
import { compact, loadDoc } from '../../drizzle/log'
import { section } from '../../drizzle/schema'
import { testConnection } from '../setup/clean'
import { joined, makePractice, map, openPage, type Page, type Practice, startSidecar, until } from './support'

describe('what others see is stored', () => {
  const connection = testConnection(12)
  const { db } = connection
  let practice: Practice
  let live: Awaited<ReturnType<typeof startSidecar>>
  const pages: Page[] = []
  const open = (...args: Parameters<typeof openPage>) => {
    const page = openPage(...args)
    pages.push(page)
    return page
  }

  beforeAll(async () => {
    practice = await makePractice(db)
    live = await startSidecar(connection)
  })
  afterAll(async () => {
    for (const page of pages) page.close()
    await live.sidecar.close()
    await connection.close()
  })

  it('passes an edit on only after MariaDB has it, and acknowledges it to the writer', async () => {
    const sectionId = await practice.section()
    const a = open(db, { person: practice.principal }, sectionId, live.url)
    const b = open(db, { person: await practice.person('engineer') }, sectionId, live.url)
    await Promise.all([joined(a), joined(b)])
    expect(a.doc.getMap('meta').get('title')).toBe('A strip')

    for (let i = 0; i < 20; i++) {
      map(a).set('k', i)
      expect(a.state.kind).toBe('storing')
      await until('the other page sees it', () => map(b).get('k') === i)
      const stored = await loadDoc(db, sectionId)
      expect(stored?.doc.getMap('m').get('k')).toBe(i)
      await until('it is acknowledged', () => a.state.kind === 'stored')
    }
    // A deletion does not advance the state vector; it is acknowledged all the same.
    map(a).delete('k')
    expect(a.waiting).toBe(1)
    await until('the deletion is acknowledged', () => a.waiting === 0)
    expect((await loadDoc(db, sectionId))?.doc.getMap('m').has('k')).toBe(false)
  })

  it('shows an edit to nobody, joining pages included, while its commit is held up; presence goes on at once', async () => {
    const sectionId = await practice.section()
    const a = open(db, { person: practice.principal }, sectionId, live.url)
    const b = open(db, { person: await practice.person('engineer') }, sectionId, live.url)
    await Promise.all([joined(a), joined(b)])

    let letGo = () => {}
    const holding = new Promise<void>((held) => {
      void db.transaction(async (tx) => {
        await tx.select().from(section).where(eq(section.id, sectionId)).for('update')
        held()
        await new Promise<void>((resolve) => {
          letGo = resolve
        })
      })
    })
    await holding
    map(a).set('held', 1)
    // Sent after the edit on the same socket: when it arrives, the edit has long been read by the sidecar.
    a.present({ pointer: { x: 5, z: 1, panel: 'section' } })
    await until('the pointer arrives', () => b.peers.some((peer) => peer.pointer?.x === 5))
    expect(map(b).has('held')).toBe(false)
    expect(a.state.kind).not.toBe('stored')

    const c = open(db, { person: await practice.person('reader') }, sectionId, live.url)
    await until('the third page is connected', () => c.may === 'read')
    b.present({ pointer: { x: 6, z: 1, panel: 'section' } })
    await until('the third page hears presence', () => c.peers.some((peer) => peer.pointer?.x === 6))
    expect(map(c).has('held')).toBe(false)
    await until('the writer is told', () => a.state.kind === 'stalled')

    letGo()
    await until('everybody sees it once it is stored', () => map(b).has('held') && map(c).has('held'))
    await until('the writer is told', () => a.state.kind === 'stored')
  })

  it('keeps edits made while disconnected and merges them on return, deletions included', async () => {
    const sectionId = await practice.section()
    let url = live.url
    const a = open(db, { person: practice.principal }, sectionId, () => url)
    const b = open(db, { person: await practice.person('engineer') }, sectionId, live.url)
    await Promise.all([joined(a), joined(b)])
    map(a).set('gone', 1)
    await until('stored', () => a.state.kind === 'stored')

    url = 'ws://127.0.0.1:9'
    const other = await startSidecar(connection)
    globalThis.dispatchEvent?.(new Event('offline'))
    a.close()
    // The same document, opened again as a reloaded tab would.
    for (let i = 0; i < 5; i++) map(a).set(`offline${i}`, i)
    map(a).delete('gone')
    const again = open(db, { person: practice.principal }, sectionId, () => url, { doc: a.doc })
    map(again).set('while away', true)
    await until('it says so', () => again.state.kind === 'offline')
    expect(again.waiting).toBe(1)
    url = live.url
    again.retry()
    await until('stored', () => again.state.kind === 'stored', 20_000)
    await until(
      'merged',
      () => map(b).get('offline4') === 4 && !map(b).has('gone') && map(b).get('while away') === true,
    )
    await other.sidecar.close()
  })

  for (const size of [10, 400_000])
    it(`a page that says it is there has everything, ${size < 100 ? 'small' : 'large'}, cold and warm`, async () => {
      const sectionId = await practice.section()
      const a = open(db, { person: practice.principal }, sectionId, live.url)
      await joined(a)
      map(a).set('body', 'x'.repeat(size))
      await until('stored', () => a.state.kind === 'stored')
      await compact(db, sectionId)
      for (let i = 0; i < 5; i++) map(a).set(`k${i}`, i)
      map(a).delete('k0')
      await until('stored', () => a.state.kind === 'stored')
      const cold = await startSidecar(connection)
      for (const url of [cold.url, cold.url, live.url]) {
        const doc = new Y.Doc()
        let had: unknown = null
        open(db, { person: practice.principal }, sectionId, url, {
          doc,
          onReady: () => {
            had = doc.getMap('m').toJSON()
          },
        })
        await until('it is there', () => had !== null)
        expect(had).toEqual(map(a).toJSON())
      }
      await cold.sidecar.close()
    })

  it('takes a message too big for one frame in parts', async () => {
    const sectionId = await practice.section()
    const a = open(db, { person: practice.principal }, sectionId, live.url)
    const b = open(db, { person: await practice.person('engineer') }, sectionId, live.url)
    await Promise.all([joined(a), joined(b)])
    map(a).set('big', 'x'.repeat(3 << 20))
    await until('the other page has it', () => String(map(b).get('big') ?? '').length === 3 << 20)
    await until('stored', () => a.state.kind === 'stored')
    expect(a.codes).toEqual([])
  })
})
