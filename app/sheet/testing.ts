import * as Y from 'yjs'
import type { Presence } from '~/live'
import { writeSection } from '~/live'
import type { Section } from '~/section'
import type { Connection } from './connection/types'
import type { Frames } from './frames'
import { createSheet, type OpenSheet, type SheetOptions } from './sheet-store'
import type { LinkState, Peer } from './state'

/** A small strip between two waters with one of everything, for the sheet's own tests. */
export const STRIP: Section = {
  format: 'doab.section',
  version: 1,
  title: 'Test strip',
  datum: 'm above site datum',
  ground: [
    [0, 12],
    [50, 13],
    [100, 12],
  ],
  base: [
    [0, 2],
    [50, 2],
    [100, 2],
  ],
  left: { kind: 'water', x: 0, name: 'River', stage: 9, conductance: null, bed: null },
  right: { kind: 'water', x: 100, name: 'Canal', stage: 8, conductance: null, bed: null },
  materials: [
    { id: 'sand', name: 'Sand', k: 8 },
    { id: 'silt', name: 'Silt', k: 0.1 },
  ],
  host: 'sand',
  bodies: [
    {
      id: 'b1',
      material: 'silt',
      outline: [
        [60, 3],
        [80, 3],
        [80, 5],
        [60, 5],
      ],
    },
  ],
  recharge: [{ id: 'r1', from: 0, to: 100, rate: 0.001 }],
  features: [{ id: 'd1', kind: 'drain', x: 40, level: 9.5, conductance: null }],
  observations: [{ id: 'o1', name: 'P-1', x: 30, head: 9.4 }],
  limits: [{ id: 'l1', name: 'Cellar', from: 20, to: 30, level: 11, clearance: 0.5 }],
  cases: [{ id: 'wet', name: 'Wet spring', off: [], set: { 'left.stage': 10 } }],
  sources: {},
  surfaceSeepage: true,
}

/** Frames that happen when the test says so (`settle`), as one person's screen. */
export const handFrames = (run: () => void): Frames => {
  let asked = false
  const go = () => {
    asked = false
    run()
  }
  return {
    ask: () => {
      asked = true
    },
    now: () => {
      if (asked) go()
    },
    stop: () => {
      asked = false
    },
  }
}

export type Desk = {
  sheet: OpenSheet
  doc: Y.Doc
  presence: Presence
  /** Updates of this document so far: one per transaction. */
  sent: Uint8Array[]
  cut(): void
  join(): void
  hear(link: LinkState): void
}

/**
 * Some people at one sheet, wired together in memory: what a document emits goes to the others' documents, presence goes to
 * their peers at once. `cut` takes one off line: edits pile up and meet again on `join`.
 */
export function openTogether(names: string[], options: Partial<SheetOptions> = {}, section: Section = STRIP): Desk[] {
  const first = new Y.Doc()
  writeSection(first, section)
  const start = Y.encodeStateAsUpdate(first)
  const desks: Desk[] = []
  const off = new Set<number>()

  const tellPeers = () => {
    desks.forEach((desk, i) => {
      const peers: Peer[] = desks.flatMap((other, j) =>
        i === j || off.has(i) || off.has(j) ? [] : [{ ...other.presence, clientId: j + 1 }],
      )
      desk.sheet.hear.peers(peers)
    })
  }
  names.forEach((name, i) => {
    const doc = new Y.Doc()
    Y.applyUpdate(doc, start, 'wire')
    const sent: Uint8Array[] = []
    const presence: Presence = { who: { id: name, name, ink: i, kind: 'person' } }
    const state: LinkState = { kind: 'stored' }
    const connection: Connection = {
      get state(): LinkState {
        return off.has(i) ? { kind: 'offline', waiting: 0 } : state
      },
      may: options.may ?? 'write',
      who: presence.who,
      peers: [],
      waiting: 0,
      subscribe: () => () => {},
      loaded: Promise.resolve(),
      present(change) {
        Object.assign(presence, structuredClone(change))
        tellPeers()
      },
      copy: () => Y.encodeStateAsUpdate(doc),
      leftovers: async () => [],
      retry() {},
      close() {},
    }
    const sheet = createSheet({
      sectionId: 'test',
      doc,
      acts: [],
      may: 'write',
      frames: handFrames,
      ...options,
    })
    doc.on('update', (update: Uint8Array, origin: unknown) => {
      if (origin === 'wire') return
      sent.push(update)
      if (off.has(i)) return
      desks.forEach((other, j) => {
        if (j !== i && !off.has(j)) Y.applyUpdate(other.doc, update, 'wire')
      })
    })
    desks.push({
      sheet,
      doc,
      presence,
      sent,
      cut() {
        off.add(i)
        sheet.hear.link({ kind: 'offline', waiting: 0 })
        tellPeers()
      },
      join() {
        off.delete(i)
        for (const [j, other] of desks.entries()) {
          if (j === i || off.has(j)) continue
          Y.applyUpdate(other.doc, Y.encodeStateAsUpdate(doc), 'wire')
          Y.applyUpdate(doc, Y.encodeStateAsUpdate(other.doc), 'wire')
        }
        sheet.hear.link({ kind: 'stored' })
        tellPeers()
      },
      hear: (link) => sheet.hear.link(link),
    })
    sheet.attach(connection)
  })
  return desks
}
