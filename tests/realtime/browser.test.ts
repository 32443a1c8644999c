import { createServer, type Server } from 'node:http'
import type { AddressInfo } from 'node:net'
import { type Browser, type BrowserContext, chromium, type Page } from '@playwright/test'
import { build } from 'esbuild'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type * as YjsModule from 'yjs'
import type * as ConnectionModule from '~/sheet/connection'
import { loadDoc } from '../../drizzle/log'
import { testConnection } from '../setup/clean'
import { makePractice, type Practice, startSidecar, ticketFor, until } from './support'

declare global {
  // What the page of this test offers to it.
  var kit: { Y: typeof YjsModule; live: typeof ConnectionModule }
  var page: { doc: YjsModule.Doc; connection: ConnectionModule.Connection }
}

/** The sheet's connection in a real browser, with its own IndexedDB; everything around it is as small as can be. */
describe('a tab that is closed while offline', () => {
  const connection = testConnection(6)
  const { db } = connection
  let practice: Practice
  let live: Awaited<ReturnType<typeof startSidecar>>
  let browser: Browser
  let context: BrowserContext
  let server: Server
  let address: string
  let sectionId: string

  beforeAll(async () => {
    practice = await makePractice(db)
    sectionId = await practice.section()
    live = await startSidecar(connection)
    const bundle = await build({
      stdin: {
        contents: `import * as Y from 'yjs'; import * as live from './app/sheet/connection'; globalThis.kit = { Y, live }`,
        resolveDir: process.cwd(),
      },
      bundle: true,
      write: false,
      format: 'iife',
      platform: 'browser',
    })
    const script = bundle.outputFiles[0]?.text ?? ''
    server = createServer((request, response) => {
      if (request.url === '/api/live-ticket')
        return void ticketFor(db, { person: practice.principal }, sectionId, live.url).then((ticket) => {
          response.setHeader('content-type', 'application/json')
          response.end(JSON.stringify(ticket))
        })
      if (request.url === '/kit.js') return void response.setHeader('content-type', 'text/javascript').end(script)
      response
        .setHeader('content-type', 'text/html')
        .end('<!doctype html><title>t</title><script src="/kit.js"></script>')
    })
    await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve))
    address = `http://127.0.0.1:${(server.address() as AddressInfo).port}`
    browser = await chromium.launch({
      executablePath: '/usr/bin/chromium',
      args: '--no-sandbox --disable-gpu --disable-quic --no-first-run --disable-background-networking --disable-component-update --disable-sync'.split(
        ' ',
      ),
    })
    context = await browser.newContext()
  })
  afterAll(async () => {
    await browser?.close()
    await new Promise((resolve) => server.close(resolve))
    await live.sidecar.close()
    await connection.close()
  })

  const tab = async (): Promise<Page> => {
    const page = await context.newPage()
    await page.goto(address)
    return page
  }
  const join = (page: Page, userKey = 'me') =>
    page.evaluate(
      ([id, key]) => {
        const doc = new kit.Y.Doc()
        globalThis.page = {
          doc,
          connection: kit.live.connect({ sectionId: id as string, doc, userKey: key as string, epoch: 1 }),
        }
      },
      [sectionId, userKey],
    )
  const state = (page: Page) => page.evaluate(() => globalThis.page.connection.state)
  const waitFor = (page: Page, kind: string, waiting?: number) =>
    until(
      `the light says ${kind}`,
      async () => {
        const now = await state(page)
        return now.kind === kind && (waiting === undefined || ('waiting' in now && now.waiting === waiting))
      },
      20_000,
    )
  const draw = (page: Page, keys: string[]) =>
    page.evaluate((all) => {
      for (const key of all) globalThis.page.doc.getMap('m').set(key, 1)
    }, keys)
  const stored = async () => Object.keys((await loadDoc(db, sectionId))?.doc.getMap('m').toJSON() ?? {}).sort()

  it('keeps its edits and how many there are; opened again and back on the line, they are stored', async () => {
    const first = await tab()
    await join(first)
    await waitFor(first, 'stored')
    await draw(first, ['online'])
    await waitFor(first, 'stored')

    await context.setOffline(true)
    await waitFor(first, 'offline', 0)
    await draw(first, ['a', 'b', 'c'])
    await waitFor(first, 'offline', 3)
    expect(await first.evaluate(() => kit.live.waitingLocally('me'))).toBe(3)
    // The browser writes IndexedDB on its own time; a tab closed in the very next instant is not this test.
    await until('the edits are on the disk', () =>
      first.evaluate(async () => {
        const name = (await indexedDB.databases()).find((d) => d.name?.startsWith('doab:doc:me:'))?.name ?? ''
        const open = indexedDB.open(name)
        await new Promise((resolve) => {
          open.onsuccess = resolve
        })
        const rows = open.result.transaction('updates').objectStore('updates').count()
        await new Promise((resolve) => {
          rows.onsuccess = resolve
        })
        open.result.close()
        return rows.result >= 4
      }),
    )
    await first.close()
    expect(await stored()).toEqual(['online'])

    await context.setOffline(false)
    // The page comes from the server again; the sidecar is still out of reach for it.
    const again = await tab()
    await context.setOffline(true)
    await join(again)
    await waitFor(again, 'offline', 3)
    expect(await again.evaluate(() => [...globalThis.page.doc.getMap('m').keys()].sort())).toEqual([
      'a',
      'b',
      'c',
      'online',
    ])
    await context.setOffline(false)
    await waitFor(again, 'stored')
    expect(await stored()).toEqual(['a', 'b', 'c', 'online'])
    expect(await again.evaluate(() => kit.live.waitingLocally('me'))).toBe(0)
    await again.close()
  })

  it('another person on the same machine sees nothing of it, and signing out removes it', async () => {
    const other = await tab()
    await context.setOffline(true)
    await join(other, 'somebody else')
    await waitFor(other, 'offline', 0)
    expect(await other.evaluate(() => globalThis.page.doc.getMap('m').size)).toBe(0)
    await other.evaluate(() => globalThis.page.connection.close())
    await other.evaluate(() => kit.live.clearLocal())
    const left = () =>
      other.evaluate(async () => (await indexedDB.databases()).filter((d) => d.name?.startsWith('doab:')).length)
    await until('nothing is left', async () => (await left()) === 0)
    await context.setOffline(false)
  })

  it('unstored edits of an earlier epoch are found and can be read', async () => {
    const page = await tab()
    await context.setOffline(true)
    await join(page)
    // As on the sheet, which shows itself only when the local copy is open.
    await page.evaluate(() => globalThis.page.connection.loaded)
    await draw(page, ['left'])
    await waitFor(page, 'offline', 1)
    await page.evaluate(() => globalThis.page.connection.close())
    const found = await page.evaluate(async (id) => {
      const doc = new kit.Y.Doc()
      const next = kit.live.connect({ sectionId: id, doc, userKey: 'me', epoch: 2 })
      const [leftover] = await next.leftovers()
      const copy = new kit.Y.Doc()
      if (leftover) kit.Y.applyUpdate(copy, await leftover.open())
      const result = { epoch: leftover?.epoch, waiting: leftover?.waiting, keys: [...copy.getMap('m').keys()] }
      await leftover?.forget()
      const after = (await next.leftovers()).length
      next.close()
      return { ...result, after }
    }, sectionId)
    expect(found).toEqual({ epoch: 1, waiting: 1, keys: ['left'], after: 0 })
    await context.setOffline(false)
  })
})
