import type * as Y from 'yjs'
import type { Section } from '~/section'
import { perform } from './edit/perform'
import { plant } from './plant'
import { settle } from './read/settle'
import { share } from './read/share'
import { EMPTY, type Mirror, mirrorOf, treeOfMirror } from './shape'
import type { Edit, LiveSection } from './types'

/** What each LiveSection was read from, so that edits meet what is really stored and not what was made of it. */
const mirrors = new WeakMap<LiveSection, Mirror>()
const latest = new WeakMap<Y.Doc, LiveSection>()

/**
 * The section a live document holds. Never throws, whatever is in the document: what cannot be read is left out or mended and told
 * in `problems`, with its place; `section` always passes parseSection. Equal documents give equal answers. Parts that have not
 * changed since the last reading of this document keep their identity; when nothing has, the same object comes back.
 */
export function readLive(doc: Y.Doc): LiveSection {
  const before = latest.get(doc)
  const mirror = mirrorOf(doc, before && mirrors.get(before))
  const live = share(before, settle(mirror))
  latest.set(doc, live)
  mirrors.set(live, mirror)
  return live
}

/**
 * The section as it would be read after these edits. Pure; the section given is not changed, and what the edits do not touch is
 * shared with it. The same edits written with `writeEdits` to the same document give an equal reading. Edits whose target is
 * gone, or whose value cannot stand, are passed over; they may come from anybody.
 */
export function applyEdits(live: LiveSection, edits: readonly Edit[]): LiveSection {
  if (edits.length === 0) return live
  const tree = treeOfMirror(mirrorFor(live))
  perform(tree, edits)
  const mirror = tree.done()
  const next = share(live, settle(mirror))
  if (next !== live) mirrors.set(next, mirror)
  return next
}

/** A section that was not read from a document (built by hand, or copied on its way to a worker) is mirrored from what it shows. */
export function mirrorFor(live: LiveSection): Mirror {
  const known = mirrors.get(live)
  if (known) return known
  const tree = treeOfMirror(EMPTY)
  plant(tree, live)
  const mirror = tree.done()
  mirrors.set(live, mirror)
  return mirror
}

/** A section as if it had just been written to a new document. */
export function liveOf(section: Section): LiveSection {
  const tree = treeOfMirror(EMPTY)
  plant(tree, { section })
  const mirror = tree.done()
  const live = settle(mirror)
  mirrors.set(live, mirror)
  return live
}
