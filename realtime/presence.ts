import type { Presence } from '~/live'
import type { Limits } from './limits'
import type { PresenceEntry } from './protocol'

export type Who = Presence['who']
/** Whoever announces themselves: one connection. */
export type Announcer = { readonly who: Who; readonly may: 'write' | 'read' }

const isRecord = (value: unknown): value is Record<string, unknown> =>
  typeof value === 'object' && value !== null && !Array.isArray(value)

/**
 * What the others may see of this connection. Name, ink and kind come from the ticket whatever the page claims; holders of a
 * link show a pointer and nothing else; whoever may not write shows no gesture, because sheets draw gestures as if they were edits.
 */
export function tidy(state: unknown, from: Announcer): Record<string, unknown> | null {
  if (!isRecord(state)) return null
  if (from.who.kind === 'link') return { who: from.who, pointer: pointer(state.pointer) }
  const { gesture, ...rest } = state
  return from.may === 'write'
    ? { ...rest, gesture: gesture ?? null, who: from.who }
    : { ...rest, gesture: null, who: from.who }
}

function pointer(value: unknown) {
  if (!isRecord(value)) return null
  const { x, z, panel } = value
  if (!Number.isFinite(x) || !Number.isFinite(z) || typeof panel !== 'string') return null
  return { x, z, panel: panel.slice(0, 40) }
}

type Held = { entry: PresenceEntry; by: Announcer }

/** Who is in one room. One connection has one client id; nobody can speak for another. */
export class PresenceBook {
  private readonly held = new Map<number, Held>()
  private readonly idOf = new Map<Announcer, number>()
  constructor(private readonly limits: Pick<Limits, 'presence'>) {}

  /** Takes what a connection says of itself; returns what to pass on. @throws when it is too large or no JSON. */
  take(entries: PresenceEntry[], from: Announcer): PresenceEntry[] {
    const passed: PresenceEntry[] = []
    for (const { clientId, clock, state } of entries) {
      if (state.length > this.limits.presence) throw new Error(`presence of ${state.length} characters`)
      const own = this.idOf.get(from)
      if (own !== undefined && own !== clientId) continue
      const before = this.held.get(clientId)
      // A page that reconnects finds its former connection not yet missed; only the same person may take it over.
      if (before && before.by !== from && before.by.who.id !== from.who.id) continue
      if (before && before.by === from && before.entry.clock >= clock && state !== 'null') continue
      const parsed: unknown = JSON.parse(state)
      if (parsed === null) {
        if (own === clientId) passed.push(...this.leave(from))
        continue
      }
      const tidied = tidy(parsed, from)
      if (!tidied) continue
      if (before && before.by !== from) this.idOf.delete(before.by)
      const entry = { clientId, clock, state: JSON.stringify(tidied) }
      this.held.set(clientId, { entry, by: from })
      this.idOf.set(from, clientId)
      passed.push(entry)
    }
    return passed
  }

  /** Gone, or no longer what it was (a gesture must not outlive the right to draw): the entries that say so. */
  leave(from: Announcer): PresenceEntry[] {
    const id = this.idOf.get(from)
    if (id === undefined) return []
    this.idOf.delete(from)
    const held = this.held.get(id)
    this.held.delete(id)
    // Same clock and null is how y-protocols spells "left"; a higher one would shut the same page out when it comes back.
    return held ? [{ clientId: id, clock: held.entry.clock, state: 'null' }] : []
  }

  all(): PresenceEntry[] {
    return [...this.held.values()].map((h) => h.entry)
  }
}
