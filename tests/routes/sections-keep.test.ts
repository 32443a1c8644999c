import { eq } from 'drizzle-orm'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import * as Y from 'yjs'
import { readLive } from '~/live'
import { parseSection } from '~/section'
import type { Person } from '~/server/context.server'
import { listRecent } from '~/server/practices/list-recent.server'
import { archiveSection } from '~/server/sections/archive-section.server'
import { createSection } from '~/server/sections/create-section.server'
import { duplicateSection } from '~/server/sections/duplicate-section.server'
import { listSections } from '~/server/sections/list-sections.server'
import { openSection } from '~/server/sections/open-section.server'
import { refreshView } from '~/server/sections/refresh-view.server'
import { renameSection } from '~/server/sections/rename-section.server'
import { disposition, sendFile } from '~/server/sections/send-file.server'
import { storedSection } from '~/server/sections/stored-section.server'
import { createSite } from '~/server/sites/create-site.server'
import { listSites } from '~/server/sites/list-sites.server'
import { shareSite } from '~/server/sites/share-site.server'
import type { Connection } from '../../drizzle/client'
import { loadState } from '../../drizzle/log'
import { member, organization, outbox, section, sectionView, user } from '../../drizzle/schema'
import { loadDemo } from '../../drizzle/seed/once'
import demo from '../../drizzle/seed/people.json'
import { cleanDatabase, testConnection } from '../setup/clean'
import { makeWorld, type World } from './sections-world'

let connection: Connection
let world: World
beforeAll(() => {
  connection = testConnection()
})
beforeEach(async () => {
  await cleanDatabase()
  world = await makeWorld(connection.db)
})
afterAll(async () => {
  await connection.close()
})

/** The title in the stored live document, which is the truth. */
async function storedTitle(sectionId: string) {
  const found = await loadState(connection.db, sectionId)
  if (!found) return null
  const doc = new Y.Doc()
  Y.applyUpdate(doc, found.state)
  return readLive(doc).section.title
}

describe('sections', () => {
  it('renames in the live document and in the list, keeping everything else of the drawing', async () => {
    const { db } = connection
    const { people, sectionId, siteId } = world
    const before = (await openSection(people.engineer, sectionId, null, db)).live.section
    await renameSection(db, people.engineer, sectionId, '  Other words ')
    expect(await storedTitle(sectionId)).toBe('Other words')
    const { live } = await openSection(people.engineer, sectionId, null, db)
    expect(live.section).toEqual({ ...before, title: 'Other words' })
    const { rows } = await listSections(db, people.reader, siteId, {})
    expect(rows).toMatchObject([{ id: sectionId, title: 'Other words', updatedBy: 'Engineer', archived: false }])
    await expect(renameSection(db, people.engineer, sectionId, '   ')).rejects.toThrow(/title/)
  })
  it('copies a drawing with a log of its own', async () => {
    const { db } = connection
    const { people, sectionId } = world
    const { id } = await duplicateSection(db, people.engineer, sectionId)
    await renameSection(db, people.engineer, id, 'The copy')
    expect(await storedTitle(sectionId)).toBe('A strip')
    expect(await storedTitle(id)).toBe('The copy')
  })
  it('takes a section file back that it gave, and says what is wrong with another', async () => {
    const { db } = connection
    const { people, sectionId, siteId } = world
    const url = `http://doab.example/api/sections/${sectionId}/section.json`
    const json = await (await sendFile(db, new Request(url), people.reader, sectionId, 'section.json')).text()
    const { id } = await createSection(db, people.engineer, siteId, { title: '', json })
    expect((await openSection(people.engineer, id, null, db)).live.section).toEqual(JSON.parse(json))
    const broken = json.replace('"stage": 8.7', '"stage": "high"')
    await expect(createSection(db, people.engineer, siteId, { title: '', json: broken })).rejects.toThrow(/left\.stage/)
    await expect(createSection(db, people.engineer, siteId, { title: '', json: '{' })).rejects.toThrow(/not JSON/)
  })
  it('keeps an archived section from being drawn on until it is restored', async () => {
    const { db } = connection
    const { people, sectionId, siteId } = world
    await archiveSection(db, people.engineer, sectionId, true)
    expect((await listSections(db, people.reader, siteId, {})).total).toBe(0)
    expect((await listSections(db, people.reader, siteId, { archived: true })).total).toBe(1)
    expect((await openSection(people.engineer, sectionId, null, db)).may).toBe('read')
    await expect(renameSection(db, people.engineer, sectionId, 'No')).rejects.toMatchObject({ status: 403 })
    await archiveSection(db, people.engineer, sectionId, false)
    expect((await openSection(people.engineer, sectionId, null, db)).may).toBe('write')
  })
  it('opens on the case asked for, and as drawn when there is none of that name', async () => {
    const { db } = connection
    const { people, sectionId } = world
    const drawn = await openSection(people.reader, sectionId, null, db)
    const wet = await openSection(people.reader, sectionId, 'wet', db)
    expect(wet.caseId).toBe('wet')
    expect(wet.svg).not.toBe(drawn.svg)
    expect((await openSection(people.reader, sectionId, 'no such', db)).caseId).toBeNull()
  })
})

describe('lists', () => {
  it('are not set back by somebody who read the drawing before it changed', async () => {
    const { db } = connection
    const { people, sectionId, siteId } = world
    const early = await storedSection(db, sectionId)
    await renameSection(db, people.engineer, sectionId, 'Newer')
    await listSections(db, people.reader, siteId, {})
    await refreshView(db, sectionId, early)
    const [view] = await db.select().from(sectionView).where(eq(sectionView.sectionId, sectionId))
    expect(view?.seq).toBeGreaterThan(early.seq)
    expect((await listSections(db, people.reader, siteId, {})).rows[0]?.title).toBe('Newer')
  })
  it('shows true thumbnails and readings, made anew when the drawing changed', async () => {
    const { db } = connection
    const { people, sectionId, siteId } = world
    const row = (await listSections(db, people.reader, siteId, {})).rows[0]
    expect(row?.thumbnail).toMatch(/^<svg/)
    expect(row?.highest).toBeGreaterThan(9)
    // Rain on 340 m leaves by the two banks.
    expect((row?.toLeft ?? 0) + (row?.toRight ?? 0)).toBeCloseTo(340 * 0.0009, 6)
    await renameSection(db, people.engineer, sectionId, 'Anew')
    expect(await listRecent(db, people['guest-reader'])).toMatchObject([{ title: 'Anew', site: { id: siteId } }])
    expect(await listRecent(db, people.stranger)).toEqual([])
  })
  it('searches, sorts and pages, taking signs of patterns as they are', async () => {
    const { db } = connection
    const { people, siteId } = world
    for (let i = 0; i < 22; i++) await world.newSection(`Strip ${String(i).padStart(2, '0')}${i === 7 ? ' 100%' : ''}`)
    const titles = async (query: Parameters<typeof listSections>[3]) =>
      (await listSections(db, people.reader, siteId, query)).rows.map(({ title }) => title)
    const first = await listSections(db, people.reader, siteId, { sort: 'title' })
    expect(first).toMatchObject({ total: 23, pages: 2 })
    expect(first.rows).toHaveLength(20)
    expect(await titles({ sort: 'title', page: 2 })).toEqual(['Strip 19', 'Strip 20', 'Strip 21'])
    expect(await titles({ sort: 'title', page: 99 })).toEqual(['Strip 19', 'Strip 20', 'Strip 21'])
    expect((await titles({ sort: 'title', descending: true }))[0]).toBe('Strip 21')
    expect((await titles({ sort: 'updated', descending: true }))[0]).toBe('Strip 21')
    expect(await titles({ search: '%' })).toEqual(['Strip 07 100%'])
    expect(await titles({ search: '_' })).toEqual([])
  })
  it('lists sites of the practice and shared ones, with their number of sections, to nobody else', async () => {
    const { db } = connection
    const { people, siteId } = world
    await createSite(db, people.engineer, { name: 'Zeta', number: 'Z-9', place: 'Upper mill' })
    const sites = async (person: Person, query: Parameters<typeof listSites>[2] = {}) =>
      (await listSites(db, person, query)).rows.map(({ name, sections, shared }) => ({ name, sections, shared }))
    const [a, z] = [
      { name: 'A site', sections: 1, shared: false },
      { name: 'Zeta', sections: 0, shared: false },
    ]
    expect(await sites(people.reader)).toEqual([a, z])
    expect(await sites(people.reader, { sort: 'sections' })).toEqual([z, a])
    expect(await sites(people.reader, { search: 'mill' })).toEqual([z])
    expect(await sites(people['guest-editor'])).toEqual([{ ...a, shared: true }])
    expect(await sites(people.stranger)).toEqual([])
    const rows = (await listSites(db, people.owner, {})).rows
    expect(rows.find(({ id }) => id === siteId)?.acts).toContain('site.share')
    expect(rows.find(({ id }) => id !== siteId)?.acts).not.toContain('site.share')
  })
  it('tells the one a site is shared with, and shares with nobody unknown or of the practice', async () => {
    const { db } = connection
    const { people, siteId } = world
    await shareSite(db, people.owner, siteId, ` ${people.stranger.email.toUpperCase()} `, 'reader')
    expect(await db.select({ to: outbox.to, kind: outbox.kind }).from(outbox)).toEqual([
      { to: people.stranger.email, kind: 'share' },
    ])
    expect((await listSites(db, people.stranger, {})).total).toBe(1)
    await expect(shareSite(db, people.owner, siteId, 'no@test.example', 'reader')).rejects.toMatchObject({
      status: 400,
    })
    await expect(shareSite(db, people.owner, siteId, people.reader.email, 'editor')).rejects.toThrow(/belongs/)
  })
})

describe('files', () => {
  const get = (kind: 'sheet.svg' | 'profile.csv' | 'section.json', query = '', headers: HeadersInit = {}) => {
    const { sectionId, people } = world
    const request = new Request(`http://doab.example/api/sections/${sectionId}/${kind}${query}`, { headers })
    return sendFile(connection.db, request, people.reader, sectionId, kind)
  }
  it('have their type, the title as name, and are sent once', async () => {
    await renameSection(connection.db, world.people.engineer, world.sectionId, 'Brücke / Süd')
    const answer = await get('sheet.svg', '?case=wet&paper=A3&scale=1000')
    expect(answer.headers.get('content-type')).toMatch(/^image\/svg\+xml/)
    expect(answer.headers.get('content-disposition')).toContain(
      "filename*=UTF-8''Br%C3%BCcke%20-%20S%C3%BCd%2C%20Wet%20spring.svg",
    )
    const text = await answer.text()
    expect(text).toContain('Brücke / Süd')
    expect(text).toContain('font/woff2;base64,')
    expect(text).toContain('420mm')
    const etag = answer.headers.get('etag') ?? ''
    const again = await get('sheet.svg', '?case=wet&paper=A3&scale=1000', { 'if-none-match': etag })
    expect(again.status).toBe(304)
    expect((await get('sheet.svg', '?paper=A3&scale=1000', { 'if-none-match': etag })).status).toBe(200)
  })
  it('say which parameter is wrong and what it may be', async () => {
    for (const [query, says] of [
      ['?paper=B5', /paper.*A4/],
      ['?scale=0', /scale/],
      ['?scale=big', /scale/],
      ['?units=cubits', /units.*si/],
      ['?case=none', /case/],
    ] as const) {
      const answer = await get('sheet.svg', query)
      expect(answer.status, query).toBe(400)
      expect(await answer.json()).toMatchObject({ code: 'invalid', message: expect.stringMatching(says) })
    }
    expect((await get('sheet.svg', '?scale=&paper=')).status).toBe(200)
  })
  it('hold the profile in the units asked for and the section as the reader of sections takes it', async () => {
    const si = await (await get('profile.csv')).text()
    const us = await (await get('profile.csv', '?units=us')).text()
    expect(si.split('\r\n')[0]).toContain('[m]')
    expect(us.split('\r\n')[0]).toContain('[ft]')
    expect(parseSection(await (await get('section.json')).json())).toMatchObject({ ok: true })
  })
  it('never let a title into the header as it is', () => {
    expect(disposition('a"b\r\nx: y\\.svg')).toBe(
      `attachment; filename="a-b-x- y-.svg"; filename*=UTF-8''a-b-x-%20y-.svg`,
    )
  })
})

describe('the demo', () => {
  it('is loaded whole: two sites, six sections that open, one of the sites shared with an outsider', async () => {
    await cleanDatabase()
    const { db } = connection
    await loadDemo(db)
    const [first] = demo.people
    const [ines] = await db
      .select({ userId: user.id, name: user.name, email: user.email, practice: organization })
      .from(user)
      .innerJoin(member, eq(member.userId, user.id))
      .innerJoin(organization, eq(organization.id, member.organizationId))
      .where(eq(user.email, first?.email ?? ''))
    if (!ines) throw new Error('the demo has no principal')
    const { practice, ...who } = ines
    const own = { id: practice.id, name: practice.name, slug: practice.slug, role: 'principal' as const }
    const person: Person = { kind: 'person', ...who, sessionId: '', address: '', practices: [own], practice: own }
    expect((await listSites(db, person, {})).rows.map(({ sections }) => sections)).toEqual([4, 2])
    for (const { id } of await db.select({ id: section.id }).from(section))
      expect(await openSection(person, id, null, db)).toMatchObject({
        may: 'write',
        live: { problems: [] },
        svg: expect.stringMatching(/^<svg/),
      })
    const [bel] = await db.select().from(user).where(eq(user.email, 'bel@ardensurvey.example'))
    if (!bel) throw new Error('the demo has no outsider')
    const outsider: Person = { ...person, userId: bel.id, name: bel.name, practices: [], practice: null }
    expect((await listSites(db, outsider, {})).rows).toMatchObject([{ name: 'Amble water meadows', shared: true }])
  })
})
