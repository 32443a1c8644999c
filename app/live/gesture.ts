import type { Edit, Presence } from './types'

/**
 * The edits of everybody's gestures in progress, in an order that is the same on every sheet: by connection, each person's in their
 * own order. Link holders may not edit, so theirs are not looked at.
 */
export function gestureEdits(peers: readonly (Pick<Presence, 'who' | 'gesture'> & { clientId: number })[]): Edit[] {
  return [...peers]
    .sort((a, b) => a.clientId - b.clientId)
    .flatMap(({ who, gesture }) => (gesture && who.kind === 'person' ? gesture.edits : []))
}
