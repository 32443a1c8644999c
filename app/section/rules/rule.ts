import type { QuantityKind } from '../units/kinds'

/** What may stand in one field. Limits are inclusive unless `above` or `below` is set. */
export type NumberRule = {
  type: 'number'
  label: string
  kind: QuantityKind
  /** Unit in words for messages; '' for a bare ratio. */
  unit: string
  min: number
  max: number
  above?: true
  below?: true
  /** May be left out. */
  optional?: true
  /** May be null, which says something of its own. */
  nullable?: true
}
export type TextRule = { type: 'text'; label: string; max: number; optional?: true; date?: true }
/** Id of a material. */
export type MaterialRule = { type: 'material'; label: string }
export type FlagRule = { type: 'flag'; label: string }
export type Rule = NumberRule | TextRule | MaterialRule | FlagRule

/** A number in a message: no exponent in the usual range, a true minus sign. */
export function said(value: number): string {
  if (!Number.isFinite(value)) return Number.isNaN(value) ? 'no number' : 'infinite'
  const size = Math.abs(value)
  const text =
    size !== 0 && (size < 1e-4 || size >= 1e15)
      ? String(Number(size.toPrecision(6)))
      : Number(size.toPrecision(9)).toLocaleString('en', { maximumFractionDigits: 9, useGrouping: size >= 1e4 })
  return (value < 0 ? '−' : '') + text
}

// Letters XML and a person cannot see: control characters other than line ends and tabs, halves of a surrogate pair.
const UNSEEN = /[^\P{Cc}\t\n\r]|\p{Cs}|[\ufffe\uffff]/u

export const hasUnseen = (text: string) => UNSEEN.test(text)
export const withoutUnseen = (text: string) => text.replace(new RegExp(UNSEEN.source, 'gu'), '')

const RESERVED = new Set([...Object.getOwnPropertyNames(Object.prototype), 'prototype'])
const ID = /^[\p{L}\p{N}_-]{1,64}$/u

/** Ids stand in paths and on drawings: letters, digits, hyphen and underscore, at most 64. */
export const isId = (value: unknown): value is string =>
  typeof value === 'string' && ID.test(value) && !RESERVED.has(value)

export const ID_SAYS = 'An id is 1 to 64 letters, digits, hyphens or underscores.'

/** Why a value cannot stand in a field, as a sentence to act on; null when it can. References are looked up elsewhere. */
export function troubleWith(rule: Rule, value: unknown): string | null {
  switch (rule.type) {
    case 'number':
      return troubleWithNumber(rule, value)
    case 'text':
      return troubleWithText(rule, value)
    case 'material':
      return isId(value) ? null : `${rule.label} must name a material by its id.`
    case 'flag':
      return typeof value === 'boolean' ? null : `${rule.label} must be true or false.`
  }
}

function troubleWithNumber(rule: NumberRule, value: unknown): string | null {
  const { label, min, max } = rule
  const unit = rule.unit ? ` ${rule.unit}` : ''
  if (value === null && rule.nullable) return null
  if (value === undefined)
    return rule.optional || rule.nullable ? null : `${label} is missing: give a number${inUnit(rule)}.`
  if (typeof value !== 'number' || Number.isNaN(value))
    return `${label} must be a number${inUnit(rule)}${rule.nullable ? ' or null' : ''}.`
  if (value < min || (rule.above && value === min))
    return `${label} must be ${rule.above ? 'more than' : 'at least'} ${said(min)}${unit}; it is ${said(value)}.`
  if (value > max || (rule.below && value === max))
    return `${label} must be ${rule.below ? 'less than' : 'at most'} ${said(max)}${unit}; it is ${said(value)}.`
  return null
}
const inUnit = ({ unit }: NumberRule) => (unit ? ` in ${unit}` : '')

const DATE = /^(\d{4})-(\d{2})-(\d{2})$/
export function isDate(text: string): boolean {
  const [, year, month, day] = (DATE.exec(text) ?? []).map(Number)
  if (year === undefined || month === undefined || day === undefined) return false
  const date = new Date(Date.UTC(year, month - 1, day))
  date.setUTCFullYear(year)
  return date.getUTCMonth() === month - 1 && date.getUTCDate() === day
}

function troubleWithText(rule: TextRule, value: unknown): string | null {
  if (value === undefined) return rule.optional ? null : `${rule.label} is missing: give a text.`
  if (typeof value !== 'string') return `${rule.label} must be a text.`
  if (value.length > rule.max)
    return `${rule.label} may have at most ${said(rule.max)} characters; it has ${said(value.length)}.`
  if (hasUnseen(value)) return `${rule.label} holds characters that cannot be printed; type it anew.`
  if (rule.date && !isDate(value)) return `${rule.label} must be a date as year-month-day, like 2026-05-02.`
  return null
}
