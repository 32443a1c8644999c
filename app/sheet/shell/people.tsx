import { Button, Dialog, DialogTrigger, Popover } from 'react-aria-components'
import { peerInk } from '../canvas/overlay-inks'
import type { Peer } from '../state'
import { usePopClass } from './pop'
import { ShellSymbol } from './symbols'
import { sameMembers, useSheet, useSheetState } from './use-sheet'

/** First letters of the first and last name. */
export function initials(name: string): string {
  const words = name.trim().split(/\s+/).filter(Boolean)
  const first = words[0]?.[0] ?? '?'
  const last = words.length > 1 ? (words[words.length - 1]?.[0] ?? '') : ''
  return (first + last).toUpperCase()
}

type Face = Pick<Peer, 'clientId' | 'presenting' | 'caseId'> & { id: string; name: string; ink: number; kind: string }

/** A person with two open pages is one face; the page that moves the view is the one to follow. */
function faces(peers: Peer[]): Face[] {
  const byPerson = new Map<string, Face>()
  for (const { clientId, presenting, caseId, who } of peers) {
    const known = byPerson.get(who.id)
    if (known && !presenting) continue
    byPerson.set(who.id, { clientId, presenting, caseId, id: who.id, name: who.name, ink: who.ink, kind: who.kind })
  }
  return [...byPerson.values()]
}
const sameFaces = (a: Face[], b: Face[]) => a.length === b.length && a.every((face, at) => sameMembers(face, b[at]))

/** Everybody else on the sheet; choosing somebody lets this view follow theirs. */
export function People() {
  const sheet = useSheet()
  const others = useSheetState((state) => faces(state.peers), sameFaces)
  const following = useSheetState((state) => state.following)
  const presenting = useSheetState((state) => state.presenting)
  const may = useSheetState((state) => state.may)
  const theme = useSheetState((state) => state.theme)
  const popClass = usePopClass()
  const shown = others.slice(0, 4)
  const followed = others.find(({ clientId }) => clientId === following)
  if (others.length === 0 && may === 'read') return null
  return (
    <DialogTrigger>
      <Button className="people" aria-label={others.length === 0 ? 'Only you are on this sheet' : peopleLabel(others)}>
        {others.length === 0 ? <span className="alone">only you</span> : null}
        {shown.map((face) => (
          <span
            key={face.id}
            className="face"
            style={{ background: peerInk(theme, face.ink) }}
            data-followed={face.clientId === following || undefined}
          >
            {initials(face.name)}
          </span>
        ))}
        {others.length > shown.length ? <span className="face more-faces">+{others.length - shown.length}</span> : null}
      </Button>
      <Popover className={popClass('people-pop')} placement="bottom end">
        <Dialog aria-label="People on this sheet">
          <section aria-label="Who is here">
            <h2 className="pop-title">On this sheet</h2>
            {others.length === 0 ? <p className="quiet">Nobody else has this section open.</p> : null}
            <ul className="people-list">
              {others.map((face) => (
                <li key={face.id}>
                  <span className="face" style={{ background: peerInk(theme, face.ink) }} aria-hidden="true">
                    {initials(face.name)}
                  </span>
                  <span className="person-name">
                    {face.name}
                    <small>{face.presenting ? 'presenting' : face.kind === 'link' ? 'by a read-only link' : ''}</small>
                  </span>
                  <button
                    type="button"
                    className="button small"
                    aria-pressed={face.clientId === following}
                    onClick={() => sheet.set({ following: face.clientId === following ? null : face.clientId })}
                  >
                    {face.clientId === following ? 'stop following' : 'follow'}
                  </button>
                </li>
              ))}
            </ul>
            {may === 'write' ? (
              <button
                type="button"
                className="button wide"
                aria-pressed={presenting}
                onClick={() => sheet.set({ presenting: !presenting })}
              >
                <ShellSymbol name="present" />
                {presenting ? 'Stop presenting' : 'Present: let the others follow you'}
              </button>
            ) : null}
            <span className="sr-only" role="status">
              {followed ? `Your view follows ${followed.name}.` : ''}
            </span>
          </section>
        </Dialog>
      </Popover>
    </DialogTrigger>
  )
}

const peopleLabel = (others: Face[]) =>
  `${others.length === 1 ? '1 other person' : `${others.length} others`} on this sheet: ${others.map(({ name }) => name).join(', ')}`
