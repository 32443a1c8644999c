import { createHash } from 'node:crypto'
import { eq } from 'drizzle-orm'
import { SignJWT } from 'jose'
import { can } from '~/access/decide'
import { type Actor, standingForSection } from '~/access/facts.server'
import { AUDIENCE, type TicketClaims } from '~/live/codes'
import type { Executor } from '../../../drizzle/client'
import { link } from '../../../drizzle/schema'
import { AppError, must, notFound } from '../errors.server'

/** A ticket is used at once; a page that reconnects gets a new one. */
const SECONDS = 60
/** Inks a person can draw and point in; a person has the same one everywhere. */
export const INKS = 8

export type TicketReply = {
  url: string
  ticket: string
  sectionId: string
  epoch: number
  may: 'write' | 'read'
  who: { id: string; name: string; ink: number; kind: 'person' | 'link' }
  expiresAt: number
}

/** Always the same number below `INKS` for the same person or link. */
export const inkOf = (id: string): number => createHash('sha256').update(id).digest().readUInt32BE(0) % INKS

export const hashToken = (token: string): string => createHash('sha256').update(token).digest('hex')

type Settings = { secret: string; url: string }
type Holder = { actor: Actor; who: TicketClaims['who']; name: string; id: string }

async function sign(db: Executor, holder: Holder, sectionId: string, { secret, url }: Settings): Promise<TicketReply> {
  const facts = await standingForSection(db, holder.actor, sectionId)
  if (!facts) throw notFound()
  must(can(facts.standing, 'section.see'))
  const may = holder.who.kind === 'person' && can(facts.standing, 'section.edit').yes ? 'write' : 'read'
  const { epoch } = facts.section
  const ink = inkOf(holder.id)
  const claims: TicketClaims = { section: sectionId, epoch, who: holder.who, may, name: holder.name, ink }
  const expiresAt = Date.now() + SECONDS * 1000
  const ticket = await new SignJWT({ ...claims })
    .setProtectedHeader({ alg: 'HS256' })
    .setAudience(AUDIENCE.ticket)
    .setIssuedAt()
    .setExpirationTime(Math.floor(expiresAt / 1000))
    .sign(new TextEncoder().encode(secret))
  const who = { id: holder.id, name: holder.name, ink, kind: holder.who.kind }
  return { url, ticket, sectionId, epoch, may, who, expiresAt }
}

/** A ticket to one section for a signed-in person. @throws AppError not-found when it is not theirs to see. */
export const issueTicket = (
  db: Executor,
  person: { userId: string; sessionId: string; name: string },
  sectionId: string,
  settings: Settings,
): Promise<TicketReply> =>
  sign(
    db,
    {
      actor: { kind: 'person', userId: person.userId },
      who: { kind: 'person', userId: person.userId, sessionId: person.sessionId },
      name: person.name,
      id: person.userId,
    },
    sectionId,
    settings,
  )

/** A read-only ticket for whoever holds a link. The label is the owner's own note, so the others see a plain word instead. */
export async function issueLinkTicket(db: Executor, token: string, settings: Settings): Promise<TicketReply> {
  const [found] = await db
    .select({ id: link.id, sectionId: link.sectionId, shows: link.shows })
    .from(link)
    .where(eq(link.tokenHash, hashToken(token)))
  if (!found) throw notFound()
  if (found.shows === 'issued')
    throw new AppError('forbidden', 'This link shows issued revisions, not the sheet being drawn.')
  const { id, sectionId } = found
  return sign(
    db,
    { actor: { kind: 'link', linkId: id }, who: { kind: 'link', linkId: id }, name: 'Viewer', id },
    sectionId,
    settings,
  )
}

/** Where pages reach the sidecar: as set, else this host under the sidecar's own port. */
export function sidecarUrl(
  request: Request,
  env: { REALTIME_URL?: string; REALTIME_PORT: number; APP_URL: string },
): string {
  if (env.REALTIME_URL) return env.REALTIME_URL.replace(/^http/, 'ws')
  const secure = env.APP_URL.startsWith('https:')
  return `${secure ? 'wss' : 'ws'}://${new URL(request.url).hostname}:${env.REALTIME_PORT}`
}
