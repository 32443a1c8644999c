import * as Y from 'yjs'

/**
 * The live document: one Y.Map per name below, at the root of the Y.Doc, so that none of them can be deleted or replaced.
 *
 * - doc       version of this shape
 * - section   title, datum, host, surfaceSeepage, name, note
 * - left, right   the bank's fields, kind among them
 * - ground, base  vertex key → { x, z }; read in order of x
 * - materials … cases   id → Y.Map of the object's fields and its `order`;
 *     bodies: `outline`, a Y.Map of vertex key → { x, z, o }, o being the vertex' order;
 *     cases: `off`, a Y.Map of id → order, and `set`, a Y.Map of path → value
 * - sources   path → text
 * - layers, marks   id → Y.Map of fields; a mark's `points` is one plain list, written once
 *
 * A vertex is one value, so that x and z of two people's drags never mix; everything else is one value per field.
 */
export const ROOTS = [
  'doc',
  'section',
  'left',
  'right',
  'ground',
  'base',
  'materials',
  'bodies',
  'recharge',
  'features',
  'observations',
  'limits',
  'cases',
  'sources',
  'layers',
  'marks',
] as const
export type Root = (typeof ROOTS)[number]

export const DOC_VERSION = 1

/** What Y.Map and Map have in common; edits are written against this, so that preview and document cannot drift apart. */
export type Branch = {
  get(key: string): unknown
  set(key: string, value: unknown): unknown
  delete(key: string): unknown
  has(key: string): boolean
  keys(): IterableIterator<string>
  readonly size: number
}

/** A document as edits see it. `open`, `into` and `grow` give branches to write to; `look` one to read. */
export type Tree = {
  open(root: Root): Branch | null
  look(parent: Branch, key: string): Branch | null
  into(parent: Branch, key: string): Branch | null
  /** A new, empty branch at this key, in place of whatever was there. */
  grow(parent: Branch, key: string): Branch
}

/** Stands in the mirror for a value of a kind the shape has no use for (a Y.Text, say). */
export const OPAQUE = Symbol('unreadable')

/** A plain mirror of the document. Branches are Maps; everything else is a value. Never changed once made. */
export type Mirror = ReadonlyMap<Root, ReadonlyMap<string, unknown>>

/** The root map of a name; null where somebody has put another type there. */
function rootOf(doc: Y.Doc, root: Root): Y.Map<unknown> | null {
  try {
    return doc.getMap(root)
  } catch {
    return null
  }
}

type Mirrored = ReadonlyMap<string, unknown>

function mirrorMap(map: Y.Map<unknown>, depth: number, before: Mirrored | undefined): Mirrored {
  let same = before !== undefined && before.size === map.size
  if (same)
    map.forEach((value, key) => {
      same &&= before?.has(key) === true && Object.is(mirrorValue(value, depth, before.get(key)), before.get(key))
    })
  if (same && before) return before
  const out = new Map<string, unknown>()
  map.forEach((value, key) => {
    out.set(key, mirrorValue(value, depth, before?.get(key)))
  })
  return out
}
function mirrorValue(value: unknown, depth: number, before: unknown): unknown {
  if (value instanceof Y.Map)
    return depth > 0 ? mirrorMap(value, depth - 1, before instanceof Map ? before : undefined) : OPAQUE
  return value instanceof Y.AbstractType || value instanceof Y.Doc ? OPAQUE : value
}

/** The document's mirror; branches that equal those of an earlier mirror are those, so that what was made of them still holds. */
export function mirrorOf(doc: Y.Doc, before?: Mirror): Mirror {
  const mirror = new Map<Root, Mirrored>()
  for (const root of ROOTS) {
    const map = rootOf(doc, root)
    mirror.set(root, map ? mirrorMap(map, 3, before?.get(root)) : new Map())
  }
  return mirror
}

/** The document itself as a tree. Use inside a transaction. */
export function treeOfDoc(doc: Y.Doc): Tree {
  const look = (parent: Branch, key: string): Branch | null => {
    const value = parent.get(key)
    return value instanceof Y.Map ? value : null
  }
  return {
    open: (root) => rootOf(doc, root),
    look,
    into: look,
    grow(parent, key) {
      const map = new Y.Map<unknown>()
      parent.set(key, map)
      return map
    },
  }
}

/** A mirror as a tree: what is written to is copied first, once; the rest is shared with the mirror it came from. */
export function treeOfMirror(mirror: Mirror): Tree & { done(): Mirror } {
  const roots = new Map<Root, ReadonlyMap<string, unknown>>(mirror)
  const own = new Set<unknown>()
  const ours = (map: Map<string, unknown>) => {
    own.add(map)
    return map
  }
  const isMap = (value: unknown): value is Map<string, unknown> => value instanceof Map
  return {
    open(root) {
      const held = roots.get(root)
      if (isMap(held) && own.has(held)) return held
      const copy = ours(new Map(held))
      roots.set(root, copy)
      return copy
    },
    look(parent, key) {
      const value = parent.get(key)
      return isMap(value) ? value : null
    },
    into(parent, key) {
      const value = parent.get(key)
      if (!isMap(value) || own.has(value)) return isMap(value) ? value : null
      const copy = ours(new Map(value))
      parent.set(key, copy)
      return copy
    },
    grow(parent, key) {
      const map = ours(new Map())
      parent.set(key, map)
      return map
    },
    done: () => roots,
  }
}

export const EMPTY: Mirror = new Map(ROOTS.map((root) => [root, new Map()]))

const isPlain = (value: unknown): value is Record<string, unknown> => typeof value === 'object' && value !== null

/** Equal as values; only what this shape stores (numbers, texts, small objects, lists of points). */
export function same(a: unknown, b: unknown): boolean {
  if (Object.is(a, b)) return true
  if (!isPlain(a) || !isPlain(b) || Array.isArray(a) !== Array.isArray(b)) return false
  const [ka, kb] = [Object.keys(a), Object.keys(b)]
  return ka.length === kb.length && ka.every((key) => Object.hasOwn(b, key) && same(a[key], b[key]))
}

/** Writes unless the value stands there already, so that an edit that changes nothing sends nothing. */
export function put(branch: Branch, key: string, value: unknown): void {
  if (!branch.has(key) || !same(branch.get(key), value)) branch.set(key, value)
}
export function drop(branch: Branch, key: string): void {
  if (branch.has(key)) branch.delete(key)
}

/** Keys of vertices stand in picked paths ("ground.v:KEY"): no dots, no blanks. */
export const isKey = (value: unknown): value is string => typeof value === 'string' && /^[^.\s]{1,64}$/.test(value)
/** Keys of line ends that the document does not hold yet; moving such an end makes it real. */
export const MADE_UP = { left: '~left', right: '~right' } as const
export const isMadeUp = (key: string) => key === MADE_UP.left || key === MADE_UP.right
