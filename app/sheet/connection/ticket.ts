import { CLOSE } from '../../live/codes'
import type { Ticket, What } from './types'

/** The app will not give a ticket: the reason is final until the person does something. */
export class NoTicket extends Error {
  constructor(
    readonly code: typeof CLOSE.ticket | typeof CLOSE.noRight | typeof CLOSE.gone,
    message: string,
  ) {
    super(message)
    this.name = 'NoTicket'
  }
}

const messageIn = (body: unknown): string =>
  typeof body === 'object' && body !== null && 'message' in body ? String(body.message) : ''

/** Asks the app for a ticket. @throws NoTicket when it says no; anything else means "try again later". */
export async function fetchTicket(what: What): Promise<Ticket> {
  const response = await fetch('/api/live-ticket', {
    method: 'POST',
    headers: { 'content-type': 'application/json' },
    body: JSON.stringify(what),
    signal: AbortSignal.timeout(10_000),
  })
  const body: unknown = await response.json().catch(() => null)
  if (response.ok) return body as Ticket
  const code = { 401: CLOSE.ticket, 403: CLOSE.noRight, 404: CLOSE.gone, 410: CLOSE.gone }[response.status]
  if (code) throw new NoTicket(code, messageIn(body))
  throw new Error(messageIn(body) || `the app answered ${response.status}`)
}
