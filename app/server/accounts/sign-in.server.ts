import { APIError } from 'better-auth/api'
import { auth } from '../auth.server'
import { clientAddress } from '../http/address.server'
import { count, forget, type Limit, refuseWhenOver } from './limit.server'

export type SignedIn = { ok: true; headers: Headers } | { ok: false; message: string }

/** One answer for an unknown address and a wrong password: it must not tell which accounts exist. */
const NEUTRAL = 'E-mail and password do not match an account.'

/**
 * Signs somebody in and gives the cookies to set. Counts wrong tries per account and address, and per address, and refuses
 * further ones (429) until fifteen minutes are over.
 */
export async function signIn(request: Request, given: { email: string; password: string }): Promise<SignedIn> {
  const email = given.email.toLowerCase()
  const from = clientAddress(request)
  const perAccount: Limit = { key: `form:sign-in:${from}:${email}`.slice(0, 255), max: 8, minutes: 15 }
  const perAddress: Limit = { key: `form:sign-in:${from}`, max: 60, minutes: 15 }
  await refuseWhenOver(perAccount)
  await refuseWhenOver(perAddress)
  try {
    const { headers } = await auth.api.signInEmail({
      body: { email, password: given.password },
      headers: request.headers,
      returnHeaders: true,
    })
    await forget(perAccount.key)
    return { ok: true, headers }
  } catch (error) {
    if (!(error instanceof APIError) || error.statusCode >= 500) throw error
    await count(perAccount)
    await count(perAddress)
    return { ok: false, message: NEUTRAL }
  }
}
