import { type CaseValue, isId, LIMITS, NAMED, POINT, type Point, type Rule, troubleWith } from '~/section'
import type { Branch } from '../shape'
import { drop, put } from '../shape'

export type Fields = Record<string, unknown>
export const isFields = (value: unknown): value is Fields =>
  typeof value === 'object' && value !== null && !Array.isArray(value)
export const fieldOf = (from: Fields, name: string): unknown => (Object.hasOwn(from, name) ? from[name] : undefined)

/** −0 reads like 0 and must not differ from it. */
export const tidy = (value: unknown): unknown => (value === 0 ? 0 : value)

/** What is stored for a field: undefined removes it. null: the field takes no such value, the edit is passed over. */
export function storable(rule: Rule, value: unknown): { value: unknown } | null {
  if (troubleWith(rule, value) !== null) return null
  if (value === undefined && rule.type === 'number' && rule.nullable) return { value: null }
  return { value: tidy(value) }
}

/** The values of an object's fields, name and note among them; null when one of them cannot stand. */
export function storableFields(rules: Record<string, Rule>, from: Fields): Map<string, unknown> | null {
  const values = new Map<string, unknown>()
  for (const [name, rule] of Object.entries({ ...rules, ...NAMED })) {
    const stored = storable(rule, fieldOf(from, name))
    if (!stored) return null
    if (stored.value !== undefined) values.set(name, stored.value)
  }
  return values
}

export function write(branch: Branch, name: string, value: unknown): void {
  if (value === undefined) drop(branch, name)
  else put(branch, name, value)
}

export function storablePoint(value: unknown): Point | null {
  if (!Array.isArray(value)) return null
  const [x, z]: unknown[] = value
  if (typeof x !== 'number' || typeof z !== 'number') return null
  return troubleWith(POINT.x, x) === null && troubleWith(POINT.z, z) === null ? [x + 0, z + 0] : null
}

export const isCaseValue = (value: unknown): value is CaseValue =>
  value === null ||
  typeof value === 'boolean' ||
  (typeof value === 'number' && Number.isFinite(value)) ||
  (typeof value === 'string' && value.length <= 500)

export const isSourcePath = (value: unknown): value is string =>
  typeof value === 'string' && value.length <= 200 && value.split('.').every((step) => isId(step))

export const SOURCE_MOST = 2000
export const isFull = (branch: Branch, most: number = LIMITS.list) => branch.size >= most
