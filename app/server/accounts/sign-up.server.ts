import { APIError } from 'better-auth/api'
import { eq } from 'drizzle-orm'
import type { Transaction } from '../../../drizzle/client'
import { audit, member, organization, session, user } from '../../../drizzle/schema'
import { auth } from '../auth.server'
import { db } from '../db.server'
import { clientAddress } from '../http/address.server'
import { count, type Limit, refuseWhenOver } from './limit.server'

export type Newcomer = { name: string; email: string; password: string; practice: string }
export type SignedUp = { ok: true; headers: Headers } | { ok: false; field: 'email' | 'password'; message: string }

/** "Kell & Marsh" → "kell-marsh-4f2a": readable in an address, and two practices may share a name. */
function slugOf(name: string): string {
  const readable = name
    .normalize('NFKD')
    .replace(/[^\w\s-]/g, '')
    .trim()
    .toLowerCase()
    .replace(/[\s_-]+/g, '-')
    .slice(0, 60)
  return `${readable || 'practice'}-${crypto.randomUUID().slice(0, 6)}`
}

/** Makes a practice with one person as its principal, in the caller's transaction; gives its id. */
export async function foundPractice(
  tx: Transaction,
  given: { name: string; userId: string; userName: string; address?: string },
): Promise<string> {
  const id = crypto.randomUUID()
  const { name, userId, userName, address } = given
  await tx.insert(organization).values({ id, name, slug: slugOf(name) })
  await tx.insert(member).values({ id: crypto.randomUUID(), organizationId: id, userId, role: 'principal' })
  await tx.insert(audit).values({
    practiceId: id,
    actorId: userId,
    actorName: userName,
    act: 'practice.found',
    on: `practice:${id}`,
    label: name,
    address,
  })
  return id
}

/** Signs somebody up, founds their practice and signs them in; gives the cookies to set. */
export async function signUp(request: Request, given: Newcomer): Promise<SignedUp> {
  const address = clientAddress(request)
  const limit: Limit = { key: `form:sign-up:${address}`, max: 40, minutes: 15 }
  await refuseWhenOver(limit)
  await count(limit)
  const email = given.email.toLowerCase()
  let made: { headers: Headers; response: { user: { id: string }; token: string | null } }
  try {
    made = await auth.api.signUpEmail({
      body: { name: given.name, email, password: given.password },
      headers: request.headers,
      returnHeaders: true,
    })
  } catch (error) {
    if (!(error instanceof APIError) || error.statusCode >= 500) throw error
    const code = error.body?.code ?? ''
    if (code.startsWith('USER_ALREADY_EXISTS'))
      return { ok: false, field: 'email', message: 'There is an account with this e-mail already. Sign in instead.' }
    return { ok: false, field: 'password', message: error.message }
  }
  const { user: person, token } = made.response
  try {
    await db.transaction(async (tx) => {
      const practice = await foundPractice(tx, {
        name: given.practice,
        userId: person.id,
        userName: given.name,
        address,
      })
      if (token) await tx.update(session).set({ activeOrganizationId: practice }).where(eq(session.token, token))
    })
  } catch (error) {
    // Nobody may be left with an account and no practice: the next try must find the e-mail free.
    await db.delete(user).where(eq(user.id, person.id))
    throw error
  }
  return { ok: true, headers: made.headers }
}
