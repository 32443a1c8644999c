import { createHash, randomUUID } from 'node:crypto'
import type { Grade } from '~/access/acts'
import type { Actor } from '~/access/facts.server'
import type { Membership, Person } from '~/server/context.server'
import { createSection } from '~/server/sections/create-section.server'
import type { Database } from '../../drizzle/client'
import { link, member, organization, site, siteShare, user } from '../../drizzle/schema'

export const hashOf = (token: string) => createHash('sha256').update(token).digest('hex')

/** One practice with a site and a section, and somebody of every kind around it. */
export async function makeWorld(db: Database) {
  const practice: Membership = { id: randomUUID(), name: 'Test practice', slug: randomUUID(), role: 'principal' }
  const other: Membership = { id: randomUUID(), name: 'Other practice', slug: randomUUID(), role: 'principal' }
  for (const { id, name, slug } of [practice, other]) await db.insert(organization).values({ id, name, slug })
  const person = async (name: string, membership: Membership | null): Promise<Person> => {
    const userId = randomUUID()
    const email = `${name.toLowerCase().replaceAll(' ', '-')}@test.example`
    await db.insert(user).values({ id: userId, name, email })
    if (membership)
      await db.insert(member).values({ id: randomUUID(), organizationId: membership.id, userId, role: membership.role })
    const practices = membership ? [membership] : []
    return { kind: 'person', userId, name, email, sessionId: '', address: '192.0.2.7', practices, practice: membership }
  }
  const people = {
    principal: await person('Principal', practice),
    engineer: await person('Engineer', { ...practice, role: 'engineer' }),
    checker: await person('Checker', { ...practice, role: 'checker' }),
    reader: await person('Reader', { ...practice, role: 'reader' }),
    // Owning adds to a role; with the weakest role it is seen what owning alone gives.
    owner: await person('Owner', { ...practice, role: 'reader' }),
    'guest-editor': await person('Guest editor', null),
    'guest-reader': await person('Guest reader', null),
    stranger: await person('Stranger', other),
  }
  const grades: Record<keyof typeof people, Grade[]> = {
    principal: ['principal'],
    engineer: ['engineer'],
    checker: ['checker'],
    reader: ['reader'],
    owner: ['reader', 'owner'],
    'guest-editor': ['guest-editor'],
    'guest-reader': ['guest-reader'],
    stranger: [],
  }
  const siteId = randomUUID()
  await db.insert(site).values({ id: siteId, practiceId: practice.id, name: 'A site', ownerId: people.owner.userId })
  for (const role of ['editor', 'reader'] as const)
    await db
      .insert(siteShare)
      .values({ siteId, userId: people[`guest-${role}`].userId, role, createdBy: people.owner.userId })
  const newSection = async (title = 'A strip') =>
    (await createSection(db, people.principal, siteId, { title, start: 'river-and-canal' })).id
  const sectionId = await newSection()
  const newLink = async (ends: { revokedAt?: Date; expiresAt?: Date } = {}, of = sectionId) => {
    const [id, token] = [randomUUID(), randomUUID()]
    await db
      .insert(link)
      .values({ id, sectionId: of, tokenHash: hashOf(token), label: 'Client', createdBy: people.owner.userId, ...ends })
    return { id, token, actor: { kind: 'link', linkId: id } satisfies Actor }
  }
  const past = new Date(Date.now() - 60_000)
  const links = {
    live: await newLink({ expiresAt: new Date(Date.now() + 3_600_000) }),
    expired: await newLink({ expiresAt: past }),
    revoked: await newLink({ revokedAt: past }),
  }
  return { practice, other, people, grades, siteId, sectionId, links, newSection, newLink }
}

export type World = Awaited<ReturnType<typeof makeWorld>>
