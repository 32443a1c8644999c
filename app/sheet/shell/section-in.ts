import * as Y from 'yjs'
import { readLive } from '~/live'
import type { Section } from '~/section'

/** The section held by a live document's state. */
export function sectionIn(state: Uint8Array): Section {
  const doc = new Y.Doc()
  Y.applyUpdate(doc, state)
  const { section } = readLive(doc)
  doc.destroy()
  return section
}
