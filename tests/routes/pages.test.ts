import { RouterContextProvider } from 'react-router'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { Act } from '~/access/acts'
import { can } from '~/access/decide'
import * as editSite from '~/routes/_practice/edit-site'
import * as home from '~/routes/_practice/home'
import * as links from '~/routes/_practice/links'
import * as newSection from '~/routes/_practice/new-section'
import * as newSite from '~/routes/_practice/new-site'
import * as site from '~/routes/_practice/site'
import * as sites from '~/routes/_practice/sites'
import { actorContext, type Person } from '~/server/context.server'
import { closeDatabase } from '~/server/db.server'
import { AppError } from '~/server/errors.server'
import { sendThumbnail } from '~/server/sections/send-thumbnail.server'
import { storedSection } from '~/server/sections/stored-section.server'
import type { Connection } from '../../drizzle/client'
import { cleanDatabase, testConnection } from '../setup/clean'
import { makeWorld, type World } from './sections-world'

let connection: Connection
let world: World
beforeAll(async () => {
  await cleanDatabase()
  connection = testConnection()
  world = await makeWorld(connection.db)
})
afterAll(async () => {
  await connection.close()
  await closeDatabase()
})

type Args = { request: Request; params: Record<string, string>; context: RouterContextProvider }
type Handler = (args: never) => unknown
type Answer = { status: number; data?: unknown; to?: string | null }

/** Asks a loader or an action as the router would, without the router. */
async function ask(
  handler: Handler,
  person: Person | null,
  path: string,
  form?: Record<string, string>,
): Promise<Answer> {
  const context = new RouterContextProvider()
  context.set(actorContext, person)
  const [, group, id = ''] = path.split(/[/?]/)
  const params: Record<string, string> = group === 'sites' ? { siteId: id } : { sectionId: id }
  const request = new Request(`http://doab.example${path}`, form && { method: 'POST', body: new URLSearchParams(form) })
  const args: Args = { request, params, context }
  try {
    const given: unknown = await (handler as (args: Args) => unknown)(args)
    if (given instanceof Response) return { status: given.status, to: given.headers.get('location') }
    if (typeof given === 'object' && given !== null && 'init' in given && 'data' in given) {
      const { init, data } = given as { init: ResponseInit | null; data: unknown }
      return { status: init?.status ?? 200, data }
    }
    return { status: 200, data: given }
  } catch (thrown) {
    if (thrown instanceof Response) return { status: thrown.status, to: thrown.headers.get('location') }
    if (thrown instanceof AppError) return { status: thrown.status }
    throw thrown
  }
}

const WHO = ['principal', 'engineer', 'checker', 'reader', 'owner', 'guest-editor', 'guest-reader', 'stranger'] as const
type Page = { loader: Handler; path: (w: World) => string; acts: Act[] }
const PAGES: Record<string, Page> = {
  site: { loader: site.loader, path: (w) => `/sites/${w.siteId}`, acts: ['site.see'] },
  'new section': {
    loader: newSection.loader,
    path: (w) => `/sites/${w.siteId}/sections/new`,
    acts: ['section.create'],
  },
  'site details': {
    loader: editSite.loader,
    path: (w) => `/sites/${w.siteId}/edit`,
    acts: ['site.edit', 'site.share'],
  },
  links: { loader: links.loader, path: (w) => `/sections/${w.sectionId}/links`, acts: ['link.see'] },
}

describe('every page for everybody', () => {
  for (const [name, { loader, path, acts }] of Object.entries(PAGES)) {
    for (const who of WHO)
      it(`${name} · ${who}`, async () => {
        const said = acts.map((act) => can({ grades: world.grades[who] }, act))
        const refused = said.every(({ yes }) => !yes) ? said[0] : undefined
        const wanted = refused && !refused.yes ? refused.status : 200
        expect((await ask(loader, world.people[who], path(world))).status).toBe(wanted)
      })
    it(`${name} · signed out, and back to it after signing in`, async () => {
      const { status, to } = await ask(loader, null, path(world))
      expect(status).toBe(302)
      expect(to).toBe(`/sign-in?redirectTo=${encodeURIComponent(path(world))}`)
    })
    it(`${name} · made-up id`, async () => {
      const made = path(world).replace(/[0-9a-f-]{36}/, crypto.randomUUID())
      expect((await ask(loader, world.people.principal, made)).status).toBe(404)
    })
  }
  it('home and sites show a stranger nothing of another practice', async () => {
    const seen = await Promise.all([
      ask(home.loader, world.people.stranger, '/home'),
      ask(sites.loader, world.people.stranger, '/sites'),
    ])
    expect(seen[0]?.data).toMatchObject({ recent: [] })
    expect(seen[1]?.data).toMatchObject({ rows: [], total: 0 })
  })
  it('offers a new site to whoever may make one, and to no reader', async () => {
    const makes = async (who: 'engineer' | 'reader' | 'guest-reader') =>
      (await ask(home.loader, world.people[who], '/home')).data
    expect(await makes('engineer')).toMatchObject({ makes: true })
    expect(await makes('reader')).toMatchObject({ makes: false })
    expect(await makes('guest-reader')).toMatchObject({ makes: false })
  })
  it('shows a guest the site shared with them, and offers no site of their own', async () => {
    const { data } = await ask(sites.loader, world.people['guest-reader'], '/sites')
    expect(data).toMatchObject({ rows: [{ id: world.siteId, shared: true }], makes: false })
  })
})

describe('the small drawing of a section', () => {
  const path = (id: string) => `http://doab.example/api/sections/${id}/thumbnail.svg`
  const get = (person: Person | null, headers: HeadersInit = {}) =>
    sendThumbnail(connection.db, new Request(path(world.sectionId), { headers }), person, world.sectionId)
  for (const who of WHO)
    it(`${who}`, async () => {
      const said = can({ grades: world.grades[who] }, 'section.see')
      expect((await get(world.people[who])).status).toBe(said.yes ? 200 : said.status)
    })
  it('signed out, and for a section that is not there', async () => {
    expect((await get(null)).status).toBe(401)
    const made = crypto.randomUUID()
    const { status } = await sendThumbnail(connection.db, new Request(path(made)), world.people.principal, made)
    expect(status).toBe(404)
  })
  it('is not sent again while it is the same', async () => {
    const first = await get(world.people.reader)
    expect(first.headers.get('content-type')).toContain('image/svg+xml')
    expect(await first.text()).toMatch(/^<svg/)
    const again = await get(world.people.reader, { 'if-none-match': first.headers.get('etag') ?? '' })
    expect(again.status).toBe(304)
  })
})

describe('forms, as they are sent without JavaScript', () => {
  it('keeps what was typed about a site and says beside which field it is wrong', async () => {
    const given = { name: ' ', number: 'KM-1', place: 'x'.repeat(201) }
    const { status, data } = await ask(newSite.action, world.people.engineer, '/sites/new', given)
    expect(status).toBe(400)
    expect(data).toMatchObject({ result: { initialValue: { number: 'KM-1' } } })
    expect(data).toHaveProperty('result.error.name')
    expect(data).toHaveProperty('result.error.place')
  })
  it('names the place in a section file that cannot be read, and keeps the file', async () => {
    const json = '{"format":"doab.section","version":1,"title":7}'
    const path = `/sites/${world.siteId}/sections/new`
    const { status, data } = await ask(newSection.action, world.people.engineer, path, { start: 'file', json })
    expect(status).toBe(422)
    expect(data).toMatchObject({ result: { initialValue: { json } } })
    expect(JSON.stringify(data)).toContain('title')
  })
  it('makes a section and leads to its sheet', async () => {
    const path = `/sites/${world.siteId}/sections/new`
    const { status, to } = await ask(newSection.action, world.people.engineer, path, {
      start: 'two-ditches',
      title: 'Field',
    })
    expect(status).toBe(302)
    expect(to).toMatch(/^\/sections\/[0-9a-f-]{36}$/)
  })
  it('renames from the list in the document itself, and comes back to the same search', async () => {
    const path = `/sites/${world.siteId}?search=strip`
    const form = { intent: 'rename', section: world.sectionId, title: 'A strip, renamed' }
    const answer = await ask(site.action, world.people.engineer, path, form)
    expect(answer).toMatchObject({ status: 302, to: path })
    expect((await storedSection(connection.db, world.sectionId)).live.section.title).toBe('A strip, renamed')
    const listed = await ask(
      site.loader,
      world.people.reader,
      `/sites/${world.siteId}?search=renamed&sort=title&order=down`,
    )
    expect(listed.data).toMatchObject({ rows: [{ id: world.sectionId, title: 'A strip, renamed' }], total: 1 })
  })
  it('says on the page what is wrong with a title', async () => {
    const form = { intent: 'rename', section: world.sectionId, title: '  ' }
    const { status, data } = await ask(site.action, world.people.engineer, `/sites/${world.siteId}`, form)
    expect(status).toBe(400)
    expect(data).toMatchObject({ wrong: expect.stringContaining('title'), section: world.sectionId, typed: '  ' })
  })
  it('refuses to rename by a reader and by a stranger', async () => {
    const form = { intent: 'rename', section: world.sectionId, title: 'Mine' }
    const path = `/sites/${world.siteId}`
    expect((await ask(site.action, world.people.reader, path, form)).status).toBe(403)
    expect((await ask(site.action, world.people.stranger, path, form)).status).toBe(404)
  })
  it('shows a new link once, and never stores or lists its token', async () => {
    const path = `/sections/${world.sectionId}/links`
    const { status, data } = await ask(links.action, world.people.owner, path, { intent: 'make', label: 'Board' })
    expect(status).toBe(200)
    const { made } = data as { made: string }
    expect(made).toMatch(/\/s\/[\w-]{20,}$/)
    const listed = JSON.stringify((await ask(links.loader, world.people.owner, path)).data)
    expect(listed).toContain('Board')
    expect(listed).not.toContain(made.split('/s/')[1])
  })
  it('keeps the label when the last day is over already, and refuses what is no day', async () => {
    const path = `/sections/${world.sectionId}/links`
    for (const expires of ['2001-01-01', 'soon']) {
      const { status, data } = await ask(links.action, world.people.owner, path, {
        intent: 'make',
        label: 'Late',
        expires,
      })
      expect(status).toBe(400)
      expect(data).toMatchObject({ made: null, result: { initialValue: { label: 'Late' } } })
      expect(data).toHaveProperty('result.error.expires')
    }
  })
  it('ends every link at once for the owner, none for an engineer', async () => {
    const path = `/sections/${world.sectionId}/links`
    expect((await ask(links.action, world.people.engineer, path, { intent: 'revoke-all' })).status).toBe(403)
    expect((await ask(links.action, world.people.owner, path, { intent: 'revoke-all' })).status).toBe(302)
    const { data } = await ask(links.loader, world.people.owner, path)
    expect((data as { links: { state: string }[] }).links.filter(({ state }) => state === 'live')).toEqual([])
  })
})
