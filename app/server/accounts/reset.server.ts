import { APIError } from 'better-auth/api'
import { auth } from '../auth.server'
import { clientAddress } from '../http/address.server'
import { count, refuseWhenOver } from './limit.server'

/** Puts a reset letter into the outbox when there is such an account. The answer is the same either way. */
export async function askForReset(request: Request, email: string): Promise<void> {
  const address = clientAddress(request)
  const account = email.toLowerCase()
  for (const limit of [
    { key: `form:forgot:${account}`.slice(0, 255), max: 5, minutes: 15 },
    { key: `form:forgot:${address}`, max: 30, minutes: 15 },
  ]) {
    await refuseWhenOver(limit)
    await count(limit)
  }
  await auth.api.requestPasswordReset({ body: { email: account }, headers: request.headers })
}

export type Reset = { ok: true } | { ok: false; message: string }

/** Sets a new password by the token from the letter. The token works once; every session of the person ends. */
export async function resetPassword(request: Request, given: { token: string; password: string }): Promise<Reset> {
  const limit = { key: `form:reset:${clientAddress(request)}`, max: 30, minutes: 15 }
  await refuseWhenOver(limit)
  await count(limit)
  try {
    await auth.api.resetPassword({ body: { token: given.token, newPassword: given.password } })
    return { ok: true }
  } catch (error) {
    if (!(error instanceof APIError) || error.statusCode >= 500) throw error
    return { ok: false, message: 'This link has been used, or its time is over. Ask for a new one.' }
  }
}
