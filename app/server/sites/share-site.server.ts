import { and, asc, eq } from 'drizzle-orm'
import { SHARE_ROLES, type ShareRole } from '~/access/acts'
import type { Database, Executor } from '../../../drizzle/client'
import { member, siteShare, user } from '../../../drizzle/schema'
import { writeAudit } from '../audit/write-audit.server'
import type { Person } from '../context.server'
import { env } from '../env.server'
import { AppError, notFound } from '../errors.server'
import { pokeSidecar } from '../live/poke.server'
import { queueMail } from '../mail/queue.server'
import { askSite } from './ask-site.server'

export type ShareRow = { userId: string; name: string; email: string; role: ShareRole; createdAt: Date }

/** The people outside the practice with whom the site is shared. */
export async function listShares(db: Executor, person: Person, siteId: string): Promise<ShareRow[]> {
  await askSite(db, person, siteId, 'site.share')
  return db
    .select({
      userId: user.id,
      name: user.name,
      email: user.email,
      role: siteShare.role,
      createdAt: siteShare.createdAt,
    })
    .from(siteShare)
    .innerJoin(user, eq(user.id, siteShare.userId))
    .where(eq(siteShare.siteId, siteId))
    .orderBy(asc(user.name), asc(user.id))
}

/** Shares a site with somebody who has an account, or changes what they may do there. They are told by mail. */
export async function shareSite(
  db: Database,
  person: Person,
  siteId: string,
  email: string,
  role: ShareRole,
): Promise<void> {
  await db.transaction(async (tx) => {
    const { site } = await askSite(tx, person, siteId, 'site.share')
    if (!SHARE_ROLES.includes(role)) throw new AppError('invalid', 'Share as “editor” or “reader”.')
    const to = email.trim().toLowerCase()
    const [guest] = await tx
      .select({ id: user.id, name: user.name, email: user.email, member: member.id })
      .from(user)
      .leftJoin(member, and(eq(member.userId, user.id), eq(member.organizationId, site.practiceId)))
      .where(eq(user.email, to))
    if (!guest)
      throw new AppError(
        'invalid',
        'Nobody with this address has an account. Ask them to sign up first, or make a link.',
      )
    if (guest.member) throw new AppError('invalid', `${guest.name} belongs to the practice and sees the site already.`)
    await tx
      .insert(siteShare)
      .values({ siteId, userId: guest.id, role, createdBy: person.userId })
      .onDuplicateKeyUpdate({ set: { role } })
    await queueMail(tx, {
      kind: 'share',
      to: guest.email,
      name: guest.name,
      sharer: person.name,
      site: site.name,
      may: role === 'editor' ? 'edit' : 'read',
      link: new URL(`/sites/${siteId}`, env.APP_URL).href,
    })
    await writeAudit(tx, person, {
      practiceId: site.practiceId,
      act: 'site.share',
      on: `site:${siteId}`,
      label: site.name,
      details: { with: guest.email, role },
    })
  })
  pokeSidecar()
}

/** Takes a share back; sheets they have open close within a second. */
export async function unshareSite(db: Database, person: Person, siteId: string, userId: string): Promise<void> {
  await db.transaction(async (tx) => {
    const { site } = await askSite(tx, person, siteId, 'site.share')
    const [{ affectedRows }] = await tx
      .delete(siteShare)
      .where(and(eq(siteShare.siteId, siteId), eq(siteShare.userId, userId)))
    if (affectedRows === 0) throw notFound()
    await writeAudit(tx, person, {
      practiceId: site.practiceId,
      act: 'site.unshare',
      on: `site:${siteId}`,
      label: site.name,
      details: { with: userId },
    })
  })
  pokeSidecar()
}
