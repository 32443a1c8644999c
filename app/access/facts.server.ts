import { and, eq, inArray } from 'drizzle-orm'
import type { Executor } from '../../drizzle/client'
import { link, member, organization, section, session, site, siteShare, user } from '../../drizzle/schema'
import { type Grade, PRACTICE_ROLES, type PracticeRole, type ShareRole } from './acts'
import type { Standing } from './decide'

/** Who asks: a signed-in person or whoever holds a read-only link. */
export type Actor = { kind: 'person'; userId: string } | { kind: 'link'; linkId: string }

export type SectionFacts = {
  standing: Standing
  section: { id: string; siteId: string; practiceId: string; title: string; epoch: number; archived: boolean }
}
export type SiteFacts = {
  standing: Standing
  site: { id: string; practiceId: string; name: string; ownerId: string; archived: boolean }
}
export type PracticeFacts = { standing: Standing; practice: { id: string; name: string; slug: string } }

const isPracticeRole = (role: string | null): role is PracticeRole => PRACTICE_ROLES.some((known) => known === role)

/** Grades of a person towards a site and what stands on it. Owning counts only while one belongs to the practice. */
export function gradesOf(role: string | null, share: ShareRole | null, owns: boolean): Grade[] {
  const grades: Grade[] = []
  if (isPracticeRole(role)) {
    grades.push(role)
    if (owns) grades.push('owner')
  }
  if (share === 'editor') grades.push('guest-editor')
  if (share === 'reader') grades.push('guest-reader')
  return grades
}

type LinkRow = { revokedAt: Date | null; expiresAt: Date | null }
const linkGrades = (row: LinkRow, now: Date): Grade[] =>
  row.revokedAt || (row.expiresAt && row.expiresAt <= now) ? [] : ['link']

const sectionColumns = {
  id: section.id,
  siteId: section.siteId,
  practiceId: section.practiceId,
  title: section.title,
  epoch: section.epoch,
  archivedAt: section.archivedAt,
  siteArchivedAt: site.archivedAt,
  ownerId: site.ownerId,
}

type SectionRow = {
  id: string
  siteId: string
  practiceId: string
  title: string
  epoch: number
  archivedAt: Date | null
  siteArchivedAt: Date | null
}

function sectionFacts(row: SectionRow, grades: Grade[]): SectionFacts {
  const archived = row.archivedAt !== null || row.siteArchivedAt !== null
  const { id, siteId, practiceId, title, epoch } = row
  return { standing: { grades, archived }, section: { id, siteId, practiceId, title, epoch, archived } }
}

/**
 * What the actor is towards a section, in one query. null when there is no such section; a section that exists but is not
 * the actor's comes with no grades, so `can` answers 404 to both.
 */
export async function standingForSection(db: Executor, actor: Actor, sectionId: string): Promise<SectionFacts | null> {
  if (actor.kind === 'link') {
    const [row] = await db
      .select({ ...sectionColumns, linkId: link.id, revokedAt: link.revokedAt, expiresAt: link.expiresAt })
      .from(section)
      .innerJoin(site, eq(site.id, section.siteId))
      .leftJoin(link, and(eq(link.sectionId, section.id), eq(link.id, actor.linkId)))
      .where(eq(section.id, sectionId))
    return row ? sectionFacts(row, row.linkId ? linkGrades(row, new Date()) : []) : null
  }
  const [row] = await db
    .select({ ...sectionColumns, role: member.role, share: siteShare.role })
    .from(section)
    .innerJoin(site, eq(site.id, section.siteId))
    .leftJoin(member, and(eq(member.organizationId, section.practiceId), eq(member.userId, actor.userId)))
    .leftJoin(siteShare, and(eq(siteShare.siteId, section.siteId), eq(siteShare.userId, actor.userId)))
    .where(eq(section.id, sectionId))
  return row ? sectionFacts(row, gradesOf(row.role, row.share, row.ownerId === actor.userId)) : null
}

/** What a person is towards a site; null when there is none. */
export async function standingForSite(db: Executor, actor: Actor, siteId: string): Promise<SiteFacts | null> {
  const userId = actor.kind === 'person' ? actor.userId : ''
  const [row] = await db
    .select({
      id: site.id,
      practiceId: site.practiceId,
      name: site.name,
      ownerId: site.ownerId,
      archivedAt: site.archivedAt,
      role: member.role,
      share: siteShare.role,
    })
    .from(site)
    .leftJoin(member, and(eq(member.organizationId, site.practiceId), eq(member.userId, userId)))
    .leftJoin(siteShare, and(eq(siteShare.siteId, site.id), eq(siteShare.userId, userId)))
    .where(eq(site.id, siteId))
  if (!row) return null
  const archived = row.archivedAt !== null
  const { id, practiceId, name, ownerId } = row
  const grades = gradesOf(row.role, row.share, ownerId === userId)
  return { standing: { grades, archived }, site: { id, practiceId, name, ownerId, archived } }
}

/** What a person is towards a practice; null when there is none. */
export async function standingForPractice(
  db: Executor,
  actor: Actor,
  practiceId: string,
): Promise<PracticeFacts | null> {
  const userId = actor.kind === 'person' ? actor.userId : ''
  const [row] = await db
    .select({ id: organization.id, name: organization.name, slug: organization.slug, role: member.role })
    .from(organization)
    .leftJoin(member, and(eq(member.organizationId, organization.id), eq(member.userId, userId)))
    .where(eq(organization.id, practiceId))
  if (!row) return null
  const { id, name, slug } = row
  return { standing: { grades: gradesOf(row.role, null, false) }, practice: { id, name, slug } }
}

/** One open connection to ask about again. */
export type Ask = { key: string; sectionId: string; actor: Actor; sessionId?: string }
/** `signedIn` is false when the session the ticket was given to is gone or over. */
export type Answer = { facts: SectionFacts | null; signedIn: boolean }

/** Standings of many open connections at once (three queries however many there are), for the sidecar's re-check. */
export async function standingsForConnections(db: Executor, asks: Ask[]): Promise<Map<string, Answer>> {
  const answers = new Map<string, Answer>()
  if (asks.length === 0) return answers
  const now = new Date()
  const unique = (values: (string | undefined)[]) => [...new Set(values.filter((v): v is string => Boolean(v)))]
  const sectionIds = unique(asks.map((a) => a.sectionId))
  const userIds = unique(asks.map((a) => (a.actor.kind === 'person' ? a.actor.userId : undefined)))
  const linkIds = unique(asks.map((a) => (a.actor.kind === 'link' ? a.actor.linkId : undefined)))
  const sessionIds = unique(asks.map((a) => a.sessionId))

  const people = userIds.length
    ? await db
        .select({ ...sectionColumns, userId: user.id, role: member.role, share: siteShare.role })
        .from(section)
        .innerJoin(site, eq(site.id, section.siteId))
        .innerJoin(user, inArray(user.id, userIds))
        .leftJoin(member, and(eq(member.organizationId, section.practiceId), eq(member.userId, user.id)))
        .leftJoin(siteShare, and(eq(siteShare.siteId, section.siteId), eq(siteShare.userId, user.id)))
        .where(inArray(section.id, sectionIds))
    : []
  const links = linkIds.length
    ? await db
        .select({ ...sectionColumns, linkId: link.id, revokedAt: link.revokedAt, expiresAt: link.expiresAt })
        .from(link)
        .innerJoin(section, eq(section.id, link.sectionId))
        .innerJoin(site, eq(site.id, section.siteId))
        .where(inArray(link.id, linkIds))
    : []
  const sessions = sessionIds.length
    ? await db
        .select({ id: session.id, expiresAt: session.expiresAt })
        .from(session)
        .where(inArray(session.id, sessionIds))
    : []

  const byPerson = new Map(people.map((row) => [`${row.id} ${row.userId}`, row]))
  const byLink = new Map(links.map((row) => [`${row.id} ${row.linkId}`, row]))
  const alive = new Set(sessions.filter((s) => s.expiresAt > now).map((s) => s.id))

  for (const { key, sectionId, actor, sessionId } of asks) {
    const signedIn = sessionId === undefined || alive.has(sessionId)
    if (actor.kind === 'person') {
      const row = byPerson.get(`${sectionId} ${actor.userId}`)
      const facts = row ? sectionFacts(row, gradesOf(row.role, row.share, row.ownerId === actor.userId)) : null
      answers.set(key, { facts, signedIn })
    } else {
      const row = byLink.get(`${sectionId} ${actor.linkId}`)
      answers.set(key, { facts: row ? sectionFacts(row, linkGrades(row, now)) : null, signedIn })
    }
  }
  return answers
}
