import type * as Y from 'yjs'
import type { Presence } from '~/live'
import type { LinkState, Peer } from '../state'

/** What is being looked at: a section by a signed-in person, or whatever a read-only link leads to. */
export type What = { sectionId: string } | { token: string }

/** What POST /api/live-ticket answers. */
export type Ticket = {
  /** Address of the sidecar, without the section: ws(s)://host[:port][/path]. */
  url: string
  ticket: string
  sectionId: string
  epoch: number
  may: 'write' | 'read'
  who: Presence['who']
  /** Milliseconds since 1970. */
  expiresAt: number
}

export type ConnectOptions = What & {
  doc: Y.Doc
  /**
   * Whose edits are kept on this machine while not stored: the person's id. null (link holders) keeps nothing.
   */
  userKey: string | null
  /** Epoch the page was rendered from. Left out: that of the first ticket (the local store then opens after it). */
  epoch?: number
  /** Every change of the sync light. Also called once at the start. */
  onState?: (state: LinkState) => void
  /** Called when the server says what this connection may do, on joining and on each change of role. */
  onMay?: (may: 'write' | 'read') => void
  /** The others on the sheet, oneself left out. At most once per animation frame. */
  onPeers?: (peers: Peer[]) => void
  /** The document holds something to show: from the local store or from the server, whichever comes first. */
  onReady?: (from: 'local' | 'server') => void
  /** For tests and unusual hosts. */
  fetchTicket?: (what: What) => Promise<Ticket>
  WebSocket?: typeof WebSocket
  keepLocally?: boolean
}

/** Edits that were made under an earlier epoch and never stored; they cannot merge any more but can be saved as a copy. */
export type Leftover = { epoch: number; waiting: number; open(): Promise<Uint8Array>; forget(): Promise<void> }

export type Connection = {
  readonly state: LinkState
  /** null until the server has said. */
  readonly may: 'write' | 'read' | null
  readonly who: Presence['who'] | null
  readonly peers: Peer[]
  /** Edits not yet acknowledged from disk, those of earlier sessions on this machine included. */
  readonly waiting: number
  subscribe(listener: () => void): () => void
  /** Resolves when local edits of earlier sessions are in the document (at once when nothing is kept locally). */
  readonly loaded: Promise<void>
  /** Change what the others see of oneself; undefined fields stay. Pointer, gesture, view, laser and reading go out at most ~30 times a second. */
  present(change: Partial<Omit<Presence, 'who'>>): void
  /** The whole document with its unstored edits, for "save as a copy" after write access was lost or the epoch changed. */
  copy(): Uint8Array
  /** Unstored edits left behind under earlier epochs. */
  leftovers(): Promise<Leftover[]>
  /** Try at once (button "try again", after signing in). */
  retry(): void
  /** Leave: presence goes away at once, the local store stays. */
  close(): void
}
