import { isFeatureKind, isId, isList, LIMITS, type ListWord, objectFields, type Point } from '~/section'
import { inOrder, isOrder, orderFor, spread } from '../order'
import type { Branch, Tree } from '../shape'
import { isKey, put } from '../shape'
import { type Fields, fieldOf, isCaseValue, isFields, storableFields, storablePoint, tidy } from './words'

type Placed = { name: string; order: string }

/** The objects of a list as they are read, by order and then by id. */
function placed(tree: Tree, list: Branch): Placed[] {
  return [...list.keys()]
    .flatMap((name): Placed[] => {
      const order = tree.look(list, name)?.get('order')
      return tree.look(list, name) ? [{ name, order: isOrder(order) ? order : '' }] : []
    })
    .sort(inOrder)
}

/**
 * An order for `name` after the object `after` (null = first, undefined or gone = last). Two neighbours that share one order leave
 * no room; then `renumber` gives everything a new one.
 */
function orderAfter(
  name: string,
  others: Placed[],
  after: string | null | undefined,
  renumber: (orders: Map<string, string>) => void,
): string {
  const at = after === null ? -1 : others.findIndex((one) => one.name === after)
  const i = at < 0 && after !== null ? others.length - 1 : at
  const [low, high] = [i < 0 ? '' : (others[i]?.order ?? ''), others[i + 1]?.order ?? null]
  if ((i < 0 || low !== '') && (high === null || low < high) && low.length < 100) return orderFor(name, low, high)
  const orders = spread(others.length + 1)
  const own = orders[i + 1] ?? ''
  const rest = orders.filter((_, k) => k !== i + 1)
  renumber(new Map(others.map((one, k) => [one.name, rest[k] ?? ''])))
  return own
}

function orderInList(tree: Tree, list: Branch, name: string, after: string | null | undefined): string {
  const others = placed(tree, list).filter((one) => one.name !== name)
  return orderAfter(name, others, after, (orders) => {
    for (const [other, order] of orders) {
      const branch = tree.into(list, other)
      if (branch) put(branch, 'order', order)
    }
  })
}

export function addObject(tree: Tree, list: unknown, object: unknown, after: unknown): void {
  if (!isList(list) || !isFields(object)) return
  const id = fieldOf(object, 'id')
  const branch = tree.open(list)
  if (!branch || !isId(id) || branch.has(id) || branch.size >= (list === 'cases' ? LIMITS.cases : LIMITS.list)) return
  const ready = prepare(list, object)
  if (!ready) return
  const order = orderInList(tree, branch, id, typeof after === 'string' ? after : undefined)
  growObject(tree, branch, id, { ...ready, order })
}

export type Ready = {
  values: Map<string, unknown>
  outline?: { key: string; point: Point; order: string }[]
  off?: string[]
  set?: [path: string, value: unknown][]
}

/** An object as it is to be stored, or null when one of its values cannot stand. `keys`: of the outline's vertices. */
export function prepare(list: ListWord, object: Fields, keys?: readonly string[]): Ready | null {
  const kind = fieldOf(object, 'kind')
  if (list === 'features' && !isFeatureKind(kind)) return null
  const values = storableFields(objectFields(list, kind), object)
  if (!values) return null
  if (list === 'features') values.set('kind', kind)
  if (list === 'bodies') {
    const outline = fieldOf(object, 'outline')
    if (!Array.isArray(outline) || outline.length > LIMITS.outline) return null
    const points = outline.map(storablePoint)
    const orders = spread(points.length)
    const vertices = points.flatMap((point, i) =>
      point ? [{ key: keys?.[i] ?? `v${i + 1}`, point, order: orders[i] ?? '' }] : [],
    )
    return vertices.length === points.length ? { values, outline: vertices } : null
  }
  if (list === 'cases') {
    const [off, set] = [fieldOf(object, 'off'), fieldOf(object, 'set')]
    return {
      values,
      off: Array.isArray(off) ? [...new Set(off.filter(isId))].slice(0, LIMITS.set) : [],
      set: isFields(set)
        ? Object.entries(set)
            .filter(([path, value]) => path.length <= 200 && isCaseValue(value))
            .slice(0, LIMITS.set)
        : [],
    }
  }
  return { values }
}

export function growObject(tree: Tree, list: Branch, id: string, ready: Ready & { order: string }): void {
  const branch = tree.grow(list, id)
  branch.set('order', ready.order)
  for (const [name, value] of ready.values) branch.set(name, value)
  if (ready.outline) {
    const outline = tree.grow(branch, 'outline')
    for (const { key, point, order } of ready.outline) outline.set(key, { x: point[0], z: point[1], o: order })
  }
  if (ready.off) {
    const off = tree.grow(branch, 'off')
    const orders = spread(ready.off.length)
    ready.off.forEach((one, i) => {
      off.set(one, orders[i])
    })
  }
  if (ready.set) {
    const set = tree.grow(branch, 'set')
    for (const [path, value] of ready.set) set.set(path, tidy(value))
  }
}

export function removeObject(tree: Tree, list: unknown, id: unknown): void {
  if (!isList(list) || typeof id !== 'string') return
  const branch = tree.open(list)
  if (branch?.has(id)) branch.delete(id)
}

export function reorderObject(tree: Tree, list: unknown, id: unknown, after: unknown): void {
  if (!isList(list) || typeof id !== 'string') return
  const branch = tree.open(list)
  const object = branch && tree.into(branch, id)
  if (!branch || !object || after === id) return
  put(object, 'order', orderInList(tree, branch, id, typeof after === 'string' || after === null ? after : undefined))
}

type Vertices = { branch: Branch; closed: boolean }

function verticesOf(tree: Tree, line: unknown): Vertices | null {
  if (line === 'ground' || line === 'base') {
    const branch = tree.open(line)
    return branch && { branch, closed: false }
  }
  if (typeof line !== 'string' || !line.startsWith('bodies.')) return null
  const bodies = tree.open('bodies')
  const body = bodies && tree.into(bodies, line.slice('bodies.'.length))
  const branch = body && tree.into(body, 'outline')
  return branch && { branch, closed: true }
}

const orderOf = (value: unknown): string => (isFields(value) && isOrder(value.o) ? value.o : '')

export function moveVertex(tree: Tree, line: unknown, key: unknown, to: unknown): void {
  const at = verticesOf(tree, line)
  const point = storablePoint(to)
  if (!at || !point || !isKey(key)) return
  const [x, z] = point
  const madeUp = !at.closed && (key === '~left' || key === '~right')
  if (!at.branch.has(key) && !madeUp) return
  put(at.branch, key, at.closed ? { x, z, o: orderOf(at.branch.get(key)) } : { x, z })
}

export function insertVertex(tree: Tree, line: unknown, key: unknown, to: unknown, after: unknown): void {
  const at = verticesOf(tree, line)
  const point = storablePoint(to)
  if (!at || !point || !isKey(key) || at.branch.has(key)) return
  if (at.branch.size >= (at.closed ? LIMITS.outline : LIMITS.line)) return
  const [x, z] = point
  if (!at.closed) {
    at.branch.set(key, { x, z })
    return
  }
  const { branch } = at
  const others = [...branch.keys()].map((name) => ({ name, order: orderOf(branch.get(name)) })).sort(inOrder)
  const order = orderAfter(key, others, typeof after === 'string' || after === null ? after : undefined, (orders) => {
    for (const [name, o] of orders) {
      const value = branch.get(name)
      if (isFields(value)) put(branch, name, { ...value, o })
    }
  })
  branch.set(key, { x, z, o: order })
}

export function removeVertex(tree: Tree, line: unknown, key: unknown): void {
  const at = verticesOf(tree, line)
  if (at && typeof key === 'string' && at.branch.has(key)) at.branch.delete(key)
}
