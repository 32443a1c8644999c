import { isDate, isId, troubleWith } from '~/section'
import type { Branch, Tree } from '../shape'

import { type Fields, fieldOf, isFields, write } from './words'

export const MARK_KINDS = ['pen', 'highlight', 'arrow', 'note', 'dimension'] as const
export const INKS = ['ink', 'water', 'trouble', 'recharge', 'divide'] as const
export const MARKUP = {
  layers: 200,
  marks: 5000,
  points: 5000,
  text: 2000,
  name: 200,
  order: 200,
  width: 20,
  far: 1e7,
} as const

const text = (max: number) => (value: unknown) => troubleWith({ type: 'text', label: '', max }, value) === null
const order = (value: unknown) => typeof value === 'string' && value.length <= MARKUP.order
const flag = (value: unknown) => typeof value === 'boolean'
const among = (words: readonly string[]) => (value: unknown) => words.some((word) => word === value)
const optional = (fits: (value: unknown) => boolean) =>
  Object.assign((value: unknown) => value === undefined || fits(value), { optional: true })

export function isMarkPoints(value: unknown): value is [number, number, number?][] {
  return (
    Array.isArray(value) &&
    value.length > 0 &&
    value.length <= MARKUP.points &&
    value.every(
      (point: unknown) =>
        Array.isArray(point) &&
        (point.length === 2 || point.length === 3) &&
        point.every((number: unknown) => typeof number === 'number' && Math.abs(number) <= MARKUP.far),
    )
  )
}

type Fits = ((value: unknown) => boolean) & { optional?: boolean }
export const LAYER_FIELDS: Record<string, Fits> = {
  name: text(MARKUP.name),
  date: (value) => typeof value === 'string' && isDate(value),
  hidden: flag,
  locked: flag,
  order,
}
export const MARK_FIELDS: Record<string, Fits> = {
  layer: isId,
  kind: among(MARK_KINDS),
  points: isMarkPoints,
  text: optional(text(MARKUP.text)),
  ink: among(INKS),
  width: (value) => typeof value === 'number' && value > 0 && value <= MARKUP.width,
  by: optional(text(MARKUP.name)),
  order,
}

const LISTS = {
  layers: { fields: LAYER_FIELDS, most: MARKUP.layers },
  marks: { fields: MARK_FIELDS, most: MARKUP.marks },
} as const
export type MarkupList = keyof typeof LISTS

export function addMarkup(tree: Tree, list: MarkupList, object: unknown): void {
  const branch = tree.open(list)
  const { fields, most } = LISTS[list]
  if (!branch || !isFields(object)) return
  const id = fieldOf(object, 'id')
  if (!isId(id) || branch.has(id) || branch.size >= most) return
  if (!Object.entries(fields).every(([name, fits]) => fits(fieldOf(object, name)))) return
  growMarkup(tree, branch, list, id, object)
}

export function growMarkup(tree: Tree, branch: Branch, list: MarkupList, id: string, object: Fields): void {
  const made = tree.grow(branch, id)
  for (const name of Object.keys(LISTS[list].fields)) {
    const value = fieldOf(object, name)
    if (value !== undefined) made.set(name, value)
  }
}

export function setMarkup(tree: Tree, list: MarkupList, id: unknown, change: unknown): void {
  const branch = tree.open(list)
  const object = branch && typeof id === 'string' ? tree.into(branch, id) : null
  if (!object || !isFields(change)) return
  for (const [name, fits] of Object.entries(LISTS[list].fields)) {
    if (!Object.hasOwn(change, name)) continue
    const value = change[name]
    if (value === undefined ? fits.optional : fits(value)) write(object, name, value)
  }
}

export function removeMarkup(tree: Tree, list: MarkupList, id: unknown): void {
  const branch = tree.open(list)
  if (!branch || typeof id !== 'string') return
  if (branch.has(id)) branch.delete(id)
  if (list !== 'layers') return
  // Its marks go with it, in the same step, so that undo brings the whole layer back.
  const marks = tree.open('marks')
  for (const mark of [...(marks?.keys() ?? [])])
    if (marks && tree.look(marks, mark)?.get('layer') === id) marks.delete(mark)
}
