import type { LinkState } from '../state'
import { useSheetState } from './use-sheet'

export type Light = { tone: 'good' | 'busy' | 'away' | 'bad'; short: string; says: string }

const edits = (count: number) => (count === 1 ? '1 edit' : `${count} edits`)

/** What the light says, in words a person in a meeting understands. Never "stored" before the server has said so. */
export function lightOf(link: LinkState, may: 'write' | 'read'): Light {
  switch (link.kind) {
    case 'connecting':
      return { tone: 'busy', short: 'connecting', says: 'Connecting to the others on this sheet.' }
    case 'stored':
      return may === 'read'
        ? { tone: 'good', short: 'live', says: 'You see every change as it is made.' }
        : { tone: 'good', short: 'stored', says: 'The server has stored everything you drew.' }
    case 'storing':
      return {
        tone: 'busy',
        short: `storing ${link.waiting}`,
        says: `${edits(link.waiting)} on the way to the server.`,
      }
    case 'stalled':
      return {
        tone: 'bad',
        short: `not stored, ${edits(link.waiting)} waiting`,
        says: `${link.says} ${edits(link.waiting)} kept here until the server can store again. Keep this page open.`,
      }
    case 'offline':
      return may === 'read'
        ? {
            tone: 'away',
            short: 'offline',
            says: 'Not connected. The sheet is as it was last seen; it goes on by itself.',
          }
        : {
            tone: 'away',
            short: link.waiting === 0 ? 'offline' : `offline, ${edits(link.waiting)} kept here`,
            says:
              link.waiting === 0
                ? 'Not connected. Go on drawing: edits are kept on this machine and join when the connection is back.'
                : `Not connected. ${edits(link.waiting)} kept on this machine; they join when the connection is back.`,
          }
    case 'refused':
      return { tone: 'bad', short: 'not connected', says: link.says }
  }
}

/** The light in the top bar. Its words are announced when they change; counts alone are not, or typing would chatter. */
export function StoredLight({ onRetry }: { onRetry?: () => void }) {
  const link = useSheetState((state) => state.link)
  const may = useSheetState((state) => state.may)
  const light = lightOf(link, may)
  return (
    <div className="stored-light" data-tone={light.tone} title={light.says}>
      <span className="lamp" aria-hidden="true" />
      <span className="words">{light.short}</span>
      <span className="sr-only" role="status" aria-live="polite">
        {link.kind === 'storing' ? '' : light.says}
      </span>
      {onRetry && (link.kind === 'offline' || link.kind === 'stalled') ? (
        <button type="button" className="link-button" onClick={onRetry}>
          try now
        </button>
      ) : null}
    </div>
  )
}
