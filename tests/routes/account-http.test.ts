import { once } from 'node:events'
import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { createServer, request as httpRequest, type Server } from 'node:http'
import { tmpdir } from 'node:os'
import path from 'node:path'
import type { ServerBuild } from 'react-router'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { CLIENT_ADDRESS } from '~/server/http/address.server'
import { createApp, loggedPath, MAX_BODY } from '~/server/http/app.server'
import { documentHeaders } from '~/server/http/headers.server'

// The web server itself, around a build with one route that says what reached it.
const echo = async ({ request }: { request: Request }) =>
  Response.json({
    address: request.headers.get(CLIENT_ADDRESS),
    forwarded: request.headers.get('x-forwarded-for'),
    host: new URL(request.url).host,
    body: request.method === 'POST' ? (await request.text()).length : null,
  })
const build = {
  entry: { module: { default: () => new Response('page') } },
  routes: { echo: { id: 'echo', path: '*', module: { loader: echo, action: echo } } },
  assets: { entry: { imports: [], module: '' }, routes: {}, url: '', version: '1' },
  future: { v8_middleware: true, v8_passThroughRequests: true },
  publicPath: '/',
  assetsBuildDirectory: '',
  basename: '/',
  ssr: true,
  isSpaMode: false,
  prerender: [],
  routeDiscovery: { mode: 'initial', manifestPath: '/__manifest' },
} as unknown as ServerBuild

let server: Server
let address: string
const folder = mkdtempSync(path.join(tmpdir(), 'doab-http-'))
beforeAll(async () => {
  mkdirSync(path.join(folder, 'assets'))
  writeFileSync(path.join(folder, 'assets/root-abc.js'), 'export {}')
  writeFileSync(path.join(folder, 'favicon.svg'), '<svg xmlns="http://www.w3.org/2000/svg"/>')
  server = createServer(createApp(build, folder)).listen(0, '127.0.0.1')
  await once(server, 'listening')
  const at = server.address()
  address = `http://127.0.0.1:${typeof at === 'object' && at ? at.port : 0}`
})
afterAll(() => {
  server.close()
  server.closeAllConnections()
  rmSync(folder, { recursive: true, force: true })
})

describe('the web server', () => {
  it('tells the app the address of the socket, whatever the client claims', async () => {
    const answer = await fetch(`${address}/where`, {
      headers: {
        [CLIENT_ADDRESS]: '203.0.113.9',
        'x-forwarded-for': '203.0.113.9',
        'x-forwarded-host': 'evil.example',
      },
    })
    expect(await answer.json()).toEqual({
      address: '127.0.0.1',
      forwarded: null,
      host: new URL(address).host,
      body: null,
    })
  })

  it('refuses a body that is too large before reading it, and one whose length is not told', async () => {
    const post = (headers: Record<string, string | number>, body?: string) =>
      new Promise<number>((resolve, reject) => {
        const sent = httpRequest(`${address}/form`, { method: 'POST', headers }, (answer) => {
          answer.resume()
          resolve(answer.statusCode ?? 0)
        })
        sent.once('error', reject)
        if (body === undefined) sent.flushHeaders()
        else sent.end(body)
      })
    expect(await post({ 'content-length': MAX_BODY + 1 })).toBe(413)
    expect(await post({ 'transfer-encoding': 'chunked' }, 'some text')).toBe(411)
    expect(await post({ 'content-length': 9, 'content-type': 'text/plain' }, 'some text')).toBe(200)
  })

  it('gives every answer its number and the headers that keep browsers strict', async () => {
    const { headers } = await fetch(`${address}/anything`)
    expect(headers.get('x-request-id')).toMatch(/^[0-9a-f-]{36}$/)
    expect(headers.get('x-content-type-options')).toBe('nosniff')
    expect(headers.get('x-frame-options')).toBe('DENY')
    expect(headers.get('x-powered-by')).toBeNull()
    expect(headers.get('referrer-policy')).toBe('strict-origin-when-cross-origin')
  })

  it('lets no other site and no search engine learn an address that holds a token', async () => {
    for (const path of ['/s/abcdef', '/reset?token=abcdef']) {
      const { headers } = await fetch(address + path)
      expect(headers.get('referrer-policy')).toBe('same-origin')
      expect(headers.get('x-robots-tag')).toBe('noindex, nofollow')
    }
    expect(loggedPath('/s/secret-token')).toBe('/s/…')
    expect(loggedPath('/s/secret-token.data?_routes=x')).toBe('/s/….data')
    expect(loggedPath('/reset?token=secret')).toBe('/reset')
    expect(loggedPath('/sites/7?q=a')).toBe('/sites/7')
  })

  it('lets browsers keep hashed files for good, others for an hour', async () => {
    const cache = async (path: string) => (await fetch(address + path)).headers.get('cache-control')
    expect(await cache('/assets/root-abc.js')).toBe('public, max-age=31536000, immutable')
    expect(await cache('/favicon.svg')).toBe('public, max-age=3600')
    expect((await fetch(`${address}/assets/gone.js`)).status).toBe(404)
  })

  it('answers an address that cannot be read with 400', async () => {
    expect((await fetch(`${address}/assets/%E0%A4%A`)).status).toBe(400)
  })
})

describe('the policy of a page', () => {
  it('is off in development and under test, where tools add scripts of their own', () => {
    const names = documentHeaders(new Request('http://localhost/'), 'n').map(([name]) => name)
    expect(names).toEqual(['cache-control'])
  })
})
