import type * as Y from 'yjs'
import { DOC_VERSION } from './shape'

/** From each older shape of the document to the next, in one transaction. Shape 1 is the first, so there is none yet. */
const STEPS: Record<number, (doc: Y.Doc) => void> = {}

/** Shape of a document: 0 while it is empty. */
export function docVersion(doc: Y.Doc): number {
  const version = doc.getMap('doc').get('version')
  return typeof version === 'number' && Number.isInteger(version) && version >= 0 ? version : 0
}

/**
 * Brings an older document up to this version's shape; true when something was done. The server does this when it loads a section,
 * never a client: two of them would do it twice. @throws RangeError for a document of a newer shape.
 */
export function upgradeDoc(doc: Y.Doc): boolean {
  const from = docVersion(doc)
  if (from > DOC_VERSION)
    throw new RangeError(
      `This document has shape ${from}; this Doab reads shapes up to ${DOC_VERSION}. Update the server.`,
    )
  if (from === 0 || from === DOC_VERSION) return false
  doc.transact(() => {
    for (let at = from; at < DOC_VERSION; at++) {
      const step = STEPS[at]
      if (!step) throw new RangeError(`A document of shape ${at} cannot be brought up to shape ${DOC_VERSION}.`)
      step(doc)
    }
    doc.getMap('doc').set('version', DOC_VERSION)
  }, 'upgrade')
  return true
}
