/**
 * The words of the live wire, shared by the sidecar and the page. Types 0–3 are y-websocket's own (sync, awareness, auth,
 * query awareness); the rest is ours. Nothing here may import anything: both bundles carry it.
 */
export const MESSAGE = {
  sync: 0,
  awareness: 1,
  queryAwareness: 3,
  /** Server → client: varUint n, varUint refused. The first n document messages of this connection are dealt with; of all of
   * them `refused` were not taken. A document message is a sync step 2 or an update. Sent after the commit in MariaDB. */
  acknowledge: 10,
  /** Server → client: varString of JSON, see `Notice`. */
  notice: 11,
  /** Client → server: varUint parts, varUint index, varUint8Array piece. A message too big for one frame, cut up. */
  part: 12,
} as const

/** Sub-types of a sync message (y-protocols). */
export const SYNC = { step1: 0, step2: 1, update: 2 } as const

export type Notice =
  /** What this connection may do from now on; sent on joining and whenever it changes. */
  | { say: 'may'; may: 'write' | 'read'; epoch: number }
  /** The database does not answer: edits are held and not relayed. */
  | { say: 'stalled' }
  /** Storing works again. */
  | { say: 'storing' }
  /** An update was not taken, and why. */
  | { say: 'refused'; why: string }
  /** Nothing but a sign of life. */
  | { say: 'beat' }

/**
 * Close codes. 44xx means "do not simply try again": the page asks for a new ticket first and believes its answer.
 * 45xx means "try again by and by".
 */
export const CLOSE = {
  hostile: 4400,
  ticket: 4401,
  noRight: 4403,
  gone: 4404,
  notAdmitted: 4408,
  epoch: 4409,
  tooBig: 4413,
  tooMany: 4429,
  unreadable: 4500,
  drain: 4503,
  slow: 4508,
} as const
export type CloseCode = (typeof CLOSE)[keyof typeof CLOSE]

/** What the page tells its reader for each code: what happened and what to do. */
export const SAYS: Record<CloseCode, string> = {
  [CLOSE.hostile]: 'The server could not read what this page sent. Reload the page.',
  [CLOSE.ticket]: 'You are signed out. Sign in again to go on; what you drew is kept here.',
  [CLOSE.noRight]: 'You no longer have access to this section.',
  [CLOSE.gone]: 'This section is gone, or it is not shared with you any more.',
  [CLOSE.notAdmitted]: 'The server took too long to let this page in. It tries again.',
  [CLOSE.epoch]: 'An earlier version of this section was restored. Reload to see it.',
  [CLOSE.tooBig]:
    'That is more than one section can hold (8 MiB or 20,000 objects). Undo the last step or split the section.',
  [CLOSE.tooMany]: 'Too much was sent in a short time. The page waits a moment and tries again.',
  [CLOSE.unreadable]: 'The stored section cannot be read. Nothing was changed; ask whoever runs the server.',
  [CLOSE.drain]: 'The server is restarting. The page joins again by itself.',
  [CLOSE.slow]: 'This page could not keep up with the others. It joins again by itself.',
}

/** Limits both sides keep to. */
export const LIMIT = {
  /** Largest frame, bytes. */
  frame: 1 << 20,
  /** Largest document, bytes of its encoded state. */
  document: 8 << 20,
  /** Most objects (vertices included) in a document. */
  objects: 20_000,
  /** Largest presence of one connection, bytes of JSON. */
  presence: 64 << 10,
  /** A message longer than this goes in parts of this size. */
  part: 512 << 10,
} as const

/** What the ticket says (JWT, HS256 with LIVE_SECRET, audience "live"). The sidecar still asks for fresh facts. */
export type TicketClaims = {
  section: string
  epoch: number
  who: { kind: 'person'; userId: string; sessionId: string } | { kind: 'link'; linkId: string }
  may: 'write' | 'read'
  /** Shown to the others; from the account, never from the page. */
  name: string
  /** Number of the ink the person draws and points in, stable for a person. */
  ink: number
}
export const AUDIENCE = { ticket: 'live', poke: 'poke' } as const
