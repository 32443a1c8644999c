import { LISTS, NAMED, objectFields, type Point, type Section } from '~/section'
import { applyEdits, mirrorFor } from './read'
import { type Root, same } from './shape'
import type { Edit, LineId, ListName, ListObject, LiveSection, VertexKey } from './types'

type Fields = Record<string, unknown>
const fieldsOf = (object: object): Fields => ({ ...object })

/**
 * The edits that turn a live section into `target`, for restoring a version as a new edit and for bringing in a section file: what
 * is equal stays untouched, so that others' work on it goes on, and one undo takes all of it back. Mark-up is no part of a section
 * and stays.
 */
export function editsBetween(live: LiveSection, target: Section): Edit[] {
  const edits = nearest(live, target)
  // Something the document holds out of sight (a vertex beyond a bank, a case's value for a thing that was gone) has come back.
  return same(applyEdits(live, edits).section, target) ? edits : afresh(live, target)
}

const sides = (section: Section, target: Section): Edit[] =>
  (['left', 'right'] as const).flatMap((side): Edit[] =>
    same(section[side], target[side]) ? [] : [{ do: 'set-bank', side, bank: target[side] }],
  )
const words = (section: Section, target: Section): Edit[] =>
  (['title', 'datum', 'surfaceSeepage', 'host', 'name', 'note'] as const).flatMap((field): Edit[] =>
    section[field] === target[field] ? [] : [{ do: 'set', path: field, value: target[field] }],
  )

function nearest(live: LiveSection, target: Section): Edit[] {
  const { section } = live
  // Banks before cases, whose values hang on a bank's kind; what goes, goes last.
  const edits: Edit[] = [...words(section, target), ...sides(section, target)]
  for (const line of ['ground', 'base'] as const)
    edits.push(...lineChanges(line, section[line], live.keys[line], target[line]))
  const changes = new Map(LISTS.map((list) => [list, listChanges(live, list, section[list], target[list])]))
  for (const list of LISTS) edits.push(...(changes.get(list)?.edits ?? []))
  for (const list of LISTS) for (const id of changes.get(list)?.gone ?? []) edits.push({ do: 'remove', list, id })
  for (const path of new Set([...Object.keys(section.sources), ...Object.keys(target.sources)])) {
    const text = Object.hasOwn(target.sources, path) ? (target.sources[path] ?? null) : null
    if ((section.sources[path] ?? null) !== text) edits.push({ do: 'source', path, text })
  }
  return withOrder(live, edits, target)
}

/** Everything taken away and put back anew. */
function afresh(live: LiveSection, target: Section): Edit[] {
  const held = mirrorFor(live)
  const keysOf = (root: Root) => [...(held.get(root)?.keys() ?? [])]
  const edits: Edit[] = [...words(live.section, target)]
  for (const side of ['left', 'right'] as const) edits.push({ do: 'set-bank', side, bank: target[side] })
  for (const line of ['ground', 'base'] as const) {
    const taken = new Set(keysOf(line))
    for (const key of taken) edits.push({ do: 'remove-vertex', line, key })
    target[line].forEach((at, i) => {
      edits.push({ do: 'insert-vertex', line, key: freeKey(taken, i), at, after: null })
    })
  }
  for (const list of LISTS) {
    for (const id of keysOf(list)) edits.push({ do: 'remove', list, id })
    for (const object of target[list]) edits.push({ do: 'add', list, object })
  }
  for (const path of keysOf('sources')) edits.push({ do: 'source', path, text: null })
  for (const [path, text] of Object.entries(target.sources)) edits.push({ do: 'source', path, text })
  return edits
}

/** Objects added stand at the end of their list; then each list is brought into the target's order. */
function withOrder(live: LiveSection, edits: Edit[], target: Section): Edit[] {
  const now = applyEdits(live, edits).section
  for (const list of LISTS) {
    const wanted = target[list].map(({ id }) => id)
    const there = now[list].map(({ id }) => id).filter((id) => wanted.includes(id))
    wanted.forEach((id, i) => {
      if (there[i] === id) return
      const after = wanted[i - 1] ?? null
      edits.push({ do: 'reorder', list, id, after })
      there.splice(there.indexOf(id), 1)
      there.splice(i, 0, id)
    })
  }
  return edits
}

function listChanges(
  live: LiveSection,
  list: ListName,
  before: readonly ListObject[],
  after: readonly ListObject[],
): { edits: Edit[]; gone: string[] } {
  const old = new Map(before.map((one) => [one.id, one]))
  const edits: Edit[] = []
  for (const object of after) {
    const was = old.get(object.id)
    old.delete(object.id)
    if (!was || !alike(was, object)) {
      // A thing of that id may be held out of sight (a body without an area); it makes room.
      edits.push({ do: 'remove', list, id: object.id }, { do: 'add', list, object })
      continue
    }
    const path = `${list}.${object.id}`
    const [from, to] = [fieldsOf(was), fieldsOf(object)]
    for (const field of Object.keys({ ...objectFields(list, to.kind), ...NAMED }))
      if (!same(from[field], to[field])) edits.push({ do: 'set', path: `${path}.${field}`, value: to[field] })
    if ('outline' in was && 'outline' in object)
      edits.push(...lineChanges(`bodies.${object.id}`, was.outline, live.keys.bodies[object.id] ?? [], object.outline))
    if ('set' in was && 'set' in object) {
      for (const at of new Set([...Object.keys(was.set), ...Object.keys(object.set)])) {
        const value = Object.hasOwn(object.set, at) ? object.set[at] : undefined
        if (!same(was.set[at], value)) edits.push({ do: 'case-set', case: object.id, path: at, value })
      }
      if (!same(was.off, object.off)) {
        for (const id of was.off) edits.push({ do: 'case-off', case: object.id, id, off: false })
        for (const id of object.off) edits.push({ do: 'case-off', case: object.id, id, off: true })
      }
    }
  }
  return { edits, gone: [...old.keys()] }
}
const alike = (a: ListObject, b: ListObject) => ('kind' in a ? a.kind : null) === ('kind' in b ? b.kind : null)

/**
 * Vertices that stand in both lines stay; those in between are moved as far as they go, then added or taken away.
 */
function lineChanges(line: LineId, from: readonly Point[], keys: readonly VertexKey[], to: readonly Point[]): Edit[] {
  let start = 0
  while (start < from.length && start < to.length && same(from[start], to[start])) start++
  let end = 0
  while (
    end < from.length - start &&
    end < to.length - start &&
    same(from[from.length - 1 - end], to[to.length - 1 - end])
  )
    end++
  const [old, fresh] = [keys.slice(start, keys.length - end), to.slice(start, to.length - end)]
  const edits: Edit[] = []
  let before = keys[start - 1] ?? null
  const taken = new Set<string>(keys)
  fresh.forEach((point, i) => {
    const key = old[i]
    if (key !== undefined) {
      if (!same(from[start + i], point)) edits.push({ do: 'move-vertex', line, key, to: point })
      before = key
      return
    }
    const made = freeKey(taken, i)
    edits.push({ do: 'insert-vertex', line, key: made, at: point, after: before })
    before = made
  })
  for (const key of old.slice(fresh.length)) edits.push({ do: 'remove-vertex', line, key })
  return edits
}

/** A key the line does not have. Two people restoring the same version make the same keys, and so the same line. */
function freeKey(taken: Set<string>, i: number): string {
  let n = taken.size + i
  while (taken.has(`r${n}`)) n++
  taken.add(`r${n}`)
  return `r${n}`
}
