import { z } from 'zod'
import { personOf } from '~/server/context.server'
import { db } from '~/server/db.server'
import { env } from '~/server/env.server'
import { AppError, STATUS } from '~/server/errors.server'
import { issueLinkTicket, issueTicket, sidecarUrl } from '~/server/live/issue-ticket.server'
import type { Route } from './+types/live-ticket'

const wanted = z.union([
  z.strictObject({ sectionId: z.string().min(1).max(36) }),
  z.strictObject({ token: z.string().min(8).max(200) }),
])

/** POST { sectionId } (signed in) or { token } (a read-only link) → a ticket for the live connection. */
export async function action({ request, context }: Route.ActionArgs) {
  try {
    const body = wanted.safeParse(await request.json().catch(() => null))
    if (!body.success) throw new AppError('invalid', 'Send { "sectionId": … } or { "token": … }.')
    const settings = { secret: env.LIVE_SECRET, url: sidecarUrl(request, env) }
    if ('token' in body.data) return reply(200, await issueLinkTicket(db, body.data.token, settings))
    const person = personOf(context)
    if (!person) throw new AppError('signed-out', 'Sign in again to go on.')
    return reply(200, await issueTicket(db, person, body.data.sectionId, settings))
  } catch (error) {
    if (error instanceof AppError) return reply(error.status, error.data)
    throw error
  }
}

export const loader = () =>
  reply(STATUS['wrong-method'], { code: 'wrong-method', message: 'Tickets are asked for with POST.' })

const reply = (status: number, body: unknown) =>
  Response.json(body, { status, headers: { 'cache-control': 'no-store' } })
