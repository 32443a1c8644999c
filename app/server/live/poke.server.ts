import { SignJWT } from 'jose'
import { AUDIENCE } from '~/live/codes'
import { env } from '../env.server'
import { log } from '../log.server'

/**
 * Tells the sidecar that somebody's rights, a link, a session or a version may have changed; call it after the commit. Fire and
 * forget: the sidecar asks again by itself every second, so a lost poke costs a second and never an error for the caller.
 * Sidecars elsewhere hear it from the one on this machine (through Redis).
 */
export function pokeSidecar(): void {
  void send().catch((error: unknown) => log.debug({ why: String(error) }, 'the sidecar was not poked'))
}

async function send() {
  const token = await new SignJWT({})
    .setProtectedHeader({ alg: 'HS256' })
    .setAudience(AUDIENCE.poke)
    .setIssuedAt()
    .setExpirationTime('30s')
    .sign(new TextEncoder().encode(env.LIVE_SECRET))
  await fetch(`http://127.0.0.1:${env.REALTIME_PORT}/poke`, {
    method: 'POST',
    headers: { authorization: `Bearer ${token}` },
    signal: AbortSignal.timeout(2_000),
  })
}
