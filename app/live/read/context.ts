import { LIMITS, type Problem, type Rule, said, troubleWith, withoutUnseen } from '~/section'
import { inOrder } from '../order'

export type Held = ReadonlyMap<string, unknown>
export const isHeld = (value: unknown): value is Held => value instanceof Map
export const NONE: Held = new Map()

export type Place = Problem['place']
export type Say = (path: string, message: string, place?: Place) => void

/** Problems in the order they are met, which is the same on every replica. */
export function problemList(): { problems: Problem[]; say: Say } {
  const problems: Problem[] = []
  return {
    problems,
    say(path, message, place) {
      if (problems.length < LIMITS.problems) problems.push(place ? { path, message, place } : { path, message })
    },
  }
}

/** The branches in a branch, in their order; what is no branch is left out and said. */
export function listOf(held: Held, list: string, most: number, say: Say): [id: string, fields: Held][] {
  const found: { name: string; order: string; fields: Held }[] = []
  for (const [name, fields] of held) {
    const order = isHeld(fields) ? fields.get('order') : undefined
    if (isHeld(fields)) found.push({ name, order: typeof order === 'string' ? order.slice(0, 200) : '', fields })
  }
  if (found.length < held.size)
    say(list, `${said(held.size - found.length)} of ${list} could not be read and are left out.`)
  found.sort(inOrder)
  if (found.length > most)
    say(list, `There are ${said(found.length)} in ${list}; only the first ${said(most)} are shown.`)
  return found.slice(0, most).map(({ name, fields }) => [name, fields])
}

/**
 * A field as it may stand: as stored, else mended, else undefined. Numbers beyond their limits are brought to the limit; texts are
 * cut and cleaned.
 */
export function readField(held: Held, field: string, rule: Rule, path: string, say: Say, place?: Place): unknown {
  const value = held.get(field)
  const trouble = troubleWith(rule, value)
  if (trouble === null) {
    if (value === undefined && rule.type === 'number' && rule.nullable) return null
    return value === 0 ? 0 : value
  }
  if (rule.type === 'number' && typeof value === 'number' && !Number.isNaN(value)) {
    const mended = value < rule.min || (rule.above && value === rule.min) ? lowest(rule) : highest(rule)
    say(path, `${trouble} Taken as ${said(mended)}.`, place)
    return mended
  }
  if (rule.type === 'text' && typeof value === 'string' && !rule.date) {
    say(path, `${trouble} It is shown shortened or cleaned.`, place)
    return withoutUnseen(withoutUnseen(value).slice(0, rule.max))
  }
  if (rule.type === 'number' && rule.nullable) {
    say(path, `${trouble} Taken as not given.`, place)
    return null
  }
  const optional = (rule.type === 'number' || rule.type === 'text') && rule.optional
  say(path, optional ? `${trouble} It is left out.` : trouble, place)
  return undefined
}
type Bounded = { min: number; max: number; above?: true; below?: true }
const lowest = ({ min, max, above }: Bounded) => (above ? min + (max - min) * 1e-3 : min)
const highest = ({ min, max, below }: Bounded) => (below ? max - (max - min) * 1e-3 : max)

/** All fields of an object by their rules; `missing` names the first field without which the object means nothing. */
export function readFields(
  held: Held,
  rules: Record<string, Rule>,
  path: string,
  say: Say,
  place?: Place,
): { values: Record<string, unknown>; missing: string | null } {
  const values: Record<string, unknown> = {}
  let missing: string | null = null
  for (const [field, rule] of Object.entries(rules)) {
    const value = readField(held, field, rule, `${path}.${field}`, say, place)
    if (value !== undefined) values[field] = value
    else if (!((rule.type === 'number' || rule.type === 'text') && rule.optional)) missing ??= field
  }
  return { values, missing }
}

/** Where an unread object stands, as far as its numbers tell. */
export function placeOfHeld(held: Held): Place {
  const number = (field: string) => {
    const value = held.get(field)
    return typeof value === 'number' && Math.abs(value) <= LIMITS.coordinate ? value : undefined
  }
  const x = number('x') ?? number('from')
  if (x === undefined) return undefined
  const z = number('level') ?? number('head')
  return z === undefined ? { x } : { x, z }
}

type Remembered = { key: string; value: unknown; said: Problem[] }
const memory = new WeakMap<Held, Remembered>()

/**
 * What was made of this branch before, for the same key; else made now. Branches are never changed once made, so the reading of one
 * that an edit did not touch need not be worked out again. Problems said while making it are said again.
 */
export function remembered<T>(held: Held, key: string, say: Say, make: (say: Say) => T): T {
  let known = memory.get(held)
  if (known?.key !== key) {
    const quiet = problemList()
    known = { key, value: make(quiet.say), said: quiet.problems }
    if (held !== NONE) memory.set(held, known)
  }
  for (const { path, message, place } of known.said) say(path, message, place)
  return known.value as T
}
