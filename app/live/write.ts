import * as Y from 'yjs'
import type { Section } from '~/section'
import { perform } from './edit/perform'
import { SEED, SEED_CLIENT } from './origins'
import { plant } from './plant'
import { ROOTS, treeOfDoc } from './shape'
import type { Edit, LiveSection } from './types'

/**
 * Writes a section's first state into an empty document, under a client id of its own that is the same for every section: the
 * server does this once, when it creates the section. @throws Error when the document holds something already (a second first
 * state would double everything).
 */
export function writeSection(doc: Y.Doc, section: Section, markup?: LiveSection['markup']): void {
  if (ROOTS.some((root) => doc.getMap(root).size > 0))
    throw new Error('This document holds a section already; a first state is written once, into an empty document.')
  const own = doc.clientID
  doc.clientID = SEED_CLIENT
  try {
    doc.transact(() => plant(treeOfDoc(doc), { section, ...(markup ? { markup } : {}) }), SEED)
  } finally {
    doc.clientID = own
  }
}

/** A new document with a section in it. */
export function createLive(section: Section): Y.Doc {
  const doc = new Y.Doc()
  writeSection(doc, section)
  return doc
}

/**
 * Writes edits as one transaction with this origin (`LOCAL` for a person's own, which undo listens to). Edits whose target is gone,
 * or whose value cannot stand, are passed over; an edit that changes nothing writes nothing.
 */
export function writeEdits(doc: Y.Doc, edits: readonly Edit[], origin: unknown): void {
  if (edits.length > 0) doc.transact(() => perform(treeOfDoc(doc), edits), origin)
}
