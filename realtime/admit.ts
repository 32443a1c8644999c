import type { IncomingMessage } from 'node:http'
import { jwtVerify } from 'jose'
import { can } from '~/access/decide'
import type { Answer, Ask } from '~/access/facts.server'
import { AUDIENCE, CLOSE, type CloseCode, SAYS, type TicketClaims } from '~/live/codes'

export class Refusal extends Error {
  constructor(
    readonly code: CloseCode,
    readonly why: string = SAYS[code],
  ) {
    super(why)
    this.name = 'Refusal'
  }
}

const text = (value: unknown): value is string => typeof value === 'string' && value.length > 0 && value.length <= 255
const isRecord = (value: unknown): value is Record<string, unknown> => typeof value === 'object' && value !== null

function claimsOf(payload: Record<string, unknown>): TicketClaims | null {
  const { section, epoch, who, may, name, ink } = payload
  if (!text(section) || !Number.isInteger(epoch) || !isRecord(who) || typeof name !== 'string') return null
  const ok = (may === 'write' || may === 'read') && Number.isInteger(ink)
  if (!ok) return null
  const rest = { section, epoch: Number(epoch), may, name: name.slice(0, 255), ink: Number(ink) } as const
  if (who.kind === 'person' && text(who.userId) && text(who.sessionId))
    return { ...rest, who: { kind: 'person', userId: who.userId, sessionId: who.sessionId } }
  if (who.kind === 'link' && text(who.linkId)) return { ...rest, who: { kind: 'link', linkId: who.linkId } }
  return null
}

/** The ticket in the address, checked for signature, audience and expiry and for being this section's. @throws Refusal */
export async function readTicket(url: URL, secret: Uint8Array): Promise<TicketClaims> {
  const sectionId = decodeURIComponent(url.pathname.split('/').filter(Boolean).at(-1) ?? '')
  const ticket = url.searchParams.get('ticket')
  if (!ticket) throw new Refusal(CLOSE.ticket, 'There is no ticket in the address.')
  let claims: TicketClaims | null
  try {
    const { payload } = await jwtVerify(ticket, secret, {
      algorithms: ['HS256'],
      audience: AUDIENCE.ticket,
      requiredClaims: ['exp'],
    })
    claims = claimsOf(payload)
  } catch {
    throw new Refusal(CLOSE.ticket, 'The ticket is forged or over.')
  }
  if (!claims) throw new Refusal(CLOSE.ticket, 'The ticket is not complete.')
  if (claims.section !== sectionId) throw new Refusal(CLOSE.ticket, 'The ticket is for another section.')
  return claims
}

/**
 * Browsers always say which page opened the socket; a page of another host is turned away. The same host under another port
 * passes (app and sidecar have two). Programs without a browser send no origin and gain nothing by that: the ticket decides.
 */
export function originFits(request: IncomingMessage, appUrl: string | undefined): boolean {
  const { origin, host } = request.headers
  if (!origin) return true
  try {
    const from = new URL(origin)
    if (appUrl && from.origin === new URL(appUrl).origin) return true
    return host !== undefined && from.hostname === new URL(`http://${host}`).hostname
  } catch {
    return false
  }
}

/** What to ask about a ticket's holder. */
export const askFor = (key: string, claims: TicketClaims): Ask =>
  claims.who.kind === 'person'
    ? {
        key,
        sectionId: claims.section,
        actor: { kind: 'person', userId: claims.who.userId },
        sessionId: claims.who.sessionId,
      }
    : { key, sectionId: claims.section, actor: { kind: 'link', linkId: claims.who.linkId } }

/** What the holder may do by the facts of this moment. The ticket cannot give more than they do. @throws Refusal */
export function standing(claims: TicketClaims, answer: Answer | undefined, epoch: number): 'write' | 'read' {
  if (!answer?.facts) throw new Refusal(CLOSE.gone)
  if (!answer.signedIn) throw new Refusal(CLOSE.ticket)
  if (!can(answer.facts.standing, 'section.see').yes) throw new Refusal(CLOSE.noRight)
  if (answer.facts.section.epoch !== epoch) throw new Refusal(CLOSE.epoch)
  return claims.who.kind === 'person' && can(answer.facts.standing, 'section.edit').yes ? 'write' : 'read'
}
