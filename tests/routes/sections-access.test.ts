import { eq } from 'drizzle-orm'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { Act } from '~/access/acts'
import { can } from '~/access/decide'
import type { Person } from '~/server/context.server'
import { AppError } from '~/server/errors.server'
import { listLinks } from '~/server/links/list-links.server'
import { makeLink } from '~/server/links/make-link.server'
import { revokeLink } from '~/server/links/revoke-link.server'
import { archiveSection } from '~/server/sections/archive-section.server'
import { createSection } from '~/server/sections/create-section.server'
import { duplicateSection } from '~/server/sections/duplicate-section.server'
import { listSections } from '~/server/sections/list-sections.server'
import { openSection, openShared } from '~/server/sections/open-section.server'
import { renameSection } from '~/server/sections/rename-section.server'
import { sendFile } from '~/server/sections/send-file.server'
import { archiveSite } from '~/server/sites/archive-site.server'
import { createSite } from '~/server/sites/create-site.server'
import { editSite } from '~/server/sites/edit-site.server'
import { findSite } from '~/server/sites/find-site.server'
import { listShares, shareSite, unshareSite } from '~/server/sites/share-site.server'
import type { Connection } from '../../drizzle/client'
import { audit, siteShare, user } from '../../drizzle/schema'
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
})

/** 200, or the status of the refusal. Anything else that goes wrong is no refusal and fails the test. */
async function statusOf(deed: () => Promise<unknown>): Promise<number> {
  try {
    const answer = await deed()
    return answer instanceof Response ? answer.status : 200
  } catch (error) {
    if (error instanceof AppError) return error.status
    throw error
  }
}

type Db = Connection['db']
type Deed = { act: Act; audited?: boolean; run: (db: Db, person: Person, w: World) => Promise<unknown> }

const words = { name: 'A site', number: '1', place: '', client: '', note: '' }
/** Whom to share with: somebody new each time, so that every deed has something to do. */
async function newcomer(db: Db) {
  const id = crypto.randomUUID()
  const email = `${id}@test.example`
  await db.insert(user).values({ id, name: 'Newcomer', email })
  return { id, email }
}
const file = (
  w: World,
  db: Db,
  person: Person | null,
  kind: 'sheet.svg' | 'profile.csv' | 'section.json',
  query = '',
) =>
  sendFile(
    db,
    new Request(`http://doab.example/api/sections/${w.sectionId}/${kind}${query}`),
    person,
    w.sectionId,
    kind,
  )

const DEEDS: Record<string, Deed> = {
  createSite: { act: 'site.create', run: (db, person) => createSite(db, person, words) },
  findSite: { act: 'site.see', run: (db, person, w) => findSite(db, person, w.siteId) },
  editSite: { act: 'site.edit', audited: true, run: (db, person, w) => editSite(db, person, w.siteId, words) },
  archiveSite: {
    act: 'site.archive',
    audited: true,
    run: async (db, person, w) => {
      await archiveSite(db, person, w.siteId, true)
      await archiveSite(db, person, w.siteId, false)
    },
  },
  listShares: { act: 'site.share', run: (db, person, w) => listShares(db, person, w.siteId) },
  shareSite: {
    act: 'site.share',
    audited: true,
    run: async (db, person, w) => shareSite(db, person, w.siteId, (await newcomer(db)).email, 'reader'),
  },
  unshareSite: {
    act: 'site.share',
    audited: true,
    run: async (db, person, w) => {
      const { id } = await newcomer(db)
      await db.insert(siteShare).values({ siteId: w.siteId, userId: id, role: 'reader', createdBy: id })
      await unshareSite(db, person, w.siteId, id)
    },
  },
  listSections: { act: 'site.see', run: (db, person, w) => listSections(db, person, w.siteId, {}) },
  createSection: {
    act: 'section.create',
    audited: true,
    run: (db, person, w) => createSection(db, person, w.siteId, { title: 'New', start: 'empty' }),
  },
  openSection: { act: 'section.see', run: (db, person, w) => openSection(person, w.sectionId, null, db) },
  renameSection: {
    act: 'section.rename',
    audited: true,
    run: (db, person, w) => renameSection(db, person, w.sectionId, `Strip of ${person.name}`),
  },
  duplicateSection: {
    act: 'section.duplicate',
    audited: true,
    run: (db, person, w) => duplicateSection(db, person, w.sectionId),
  },
  archiveSection: {
    act: 'section.archive',
    audited: true,
    run: async (db, person, w) => {
      await archiveSection(db, person, w.sectionId, true)
      await archiveSection(db, person, w.sectionId, false)
    },
  },
  listLinks: { act: 'link.see', run: (db, person, w) => listLinks(db, person, w.sectionId) },
  makeLink: {
    act: 'link.make',
    audited: true,
    run: (db, person, w) => makeLink(db, person, w.sectionId, { label: 'Client' }),
  },
  revokeLink: {
    act: 'link.revoke',
    audited: true,
    run: async (db, person, w) => revokeLink(db, person, w.sectionId, (await w.newLink()).id),
  },
  'sheet.svg': { act: 'section.export', run: (db, person, w) => file(w, db, person, 'sheet.svg') },
  'profile.csv': { act: 'section.export', run: (db, person, w) => file(w, db, person, 'profile.csv') },
  'section.json': { act: 'section.export', run: (db, person, w) => file(w, db, person, 'section.json') },
}
const WHO = ['principal', 'engineer', 'checker', 'reader', 'owner', 'guest-editor', 'guest-reader', 'stranger'] as const

describe('every deed by everybody, as the permission table says', () => {
  for (const [name, { act, audited, run }] of Object.entries(DEEDS))
    for (const who of WHO)
      it(`${name} · ${who}`, async () => {
        // Making a site asks about the practice one works in, so a stranger makes it in their own, and guests have none.
        const grades = act === 'site.create' && who === 'stranger' ? (['principal'] as const) : world.grades[who]
        const said = can({ grades: [...grades] }, act)
        const person = world.people[who]
        const { db } = connection
        const noted = () => db.$count(audit, eq(audit.actorId, person.userId))
        const before = await noted()
        expect(await statusOf(() => run(db, person, world))).toBe(said.yes ? 200 : said.status)
        const notes = (await noted()) - before
        if (!said.yes) expect(notes).toBe(0)
        else if (audited) expect(notes).toBeGreaterThan(0)
      })
})

describe('links and people without an account', () => {
  const kinds = ['sheet.svg', 'profile.csv', 'section.json'] as const
  it('lets a live link open the sheet read-only, without the site’s name, and counts it', async () => {
    const { db } = connection
    const opened = await openShared(world.links.live.token, null, db)
    expect(opened).toMatchObject({ may: 'read', site: null, sectionId: world.sectionId })
    expect(opened.acts).not.toContain('section.edit')
    expect(opened.svg).toMatch(/^<svg/)
    const row = (await listLinks(db, world.people.owner, world.sectionId)).find(({ id }) => id === world.links.live.id)
    expect(row).toMatchObject({ state: 'live', uses: 1 })
  })
  for (const kind of kinds) {
    it(`${kind} · live link, on its own section only`, async () => {
      const { db } = connection
      const query = `?link=${world.links.live.token}`
      expect((await file(world, db, null, kind, query)).status).toBe(200)
      const elsewhere = await world.newSection()
      const request = new Request(`http://doab.example/api/sections/${elsewhere}/${kind}${query}`)
      expect((await sendFile(db, request, null, elsewhere, kind)).status).toBe(404)
    })
    for (const state of ['expired', 'revoked'] as const)
      it(`${kind} · ${state} link, even for who might without it`, async () => {
        const query = `?link=${world.links[state].token}`
        expect((await file(world, connection.db, world.people.principal, kind, query)).status).toBe(410)
      })
    it(`${kind} · signed out, made-up link`, async () => {
      expect((await file(world, connection.db, null, kind)).status).toBe(401)
      expect((await file(world, connection.db, null, kind, '?link=made-up-token')).status).toBe(404)
    })
  }
  it('refuses links that are over alike, and unknown ones as nothing there', async () => {
    const { db } = connection
    expect(await statusOf(() => openShared(world.links.expired.token, null, db))).toBe(410)
    expect(await statusOf(() => openShared(world.links.revoked.token, null, db))).toBe(410)
    expect(await statusOf(() => openShared('made-up-token', null, db))).toBe(404)
  })
  it('ends a link at once', async () => {
    const { db, people, sectionId } = { ...connection, ...world }
    const { id, token } = await makeLink(db, people.owner, sectionId, { label: 'For a day' })
    expect(await statusOf(() => openShared(token, null, db))).toBe(200)
    await revokeLink(db, people.owner, sectionId, id)
    expect(await statusOf(() => openShared(token, null, db))).toBe(410)
  })
})
