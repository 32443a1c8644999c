import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import * as Y from 'yjs'
import { loadDoc } from '../../drizzle/log'
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
})
