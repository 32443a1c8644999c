import { describePath, kindAt } from './describe'
import { casePathsOf, caseRuleAt, OFF_LISTS, valueAt } from './rules/paths'
import type { Case, CaseValue, Section } from './types'
import type { QuantityKind } from './units/kinds'

type Fields = Record<string, unknown>

/**
 * The section as a case has it: its values set, the objects it leaves out removed; the list of cases itself stays. Pure: the
 * section given is not changed, and whatever the case does not touch is shared with it. null or an unknown case: the section as
 * drawn. Paths that lead nowhere are passed over (parseSection names them).
 */
export function applyCase(section: Section, caseId: string | null | undefined): Section {
  const chosen = caseId ? section.cases.find(({ id }) => id === caseId) : undefined
  return chosen ? inCase(section, chosen) : section
}

/** As `applyCase`, for a case that need not be in the section's list. */
export function inCase(section: Section, chosen: Case): Section {
  const off = new Set(chosen.off)
  const stays = ({ id }: { id: string }) => !off.has(id)
  const result: Section = { ...section }
  for (const [path, value] of Object.entries(chosen.set)) if (caseRuleAt(section, path)) setIn(result, path, value)
  result.bodies = result.bodies.filter(stays)
  result.recharge = result.recharge.filter(stays)
  result.features = result.features.filter(stays)
  result.observations = result.observations.filter(stays)
  result.limits = result.limits.filter(stays)
  return result
}

function setIn(section: Fields, path: string, value: CaseValue): void {
  const [head = '', id, field] = path.split('.')
  if (id === undefined) section[head] = value
  else if (head === 'left' || head === 'right') section[head] = { ...asFields(section[head]), [id]: value }
  else if (field !== undefined && Array.isArray(section[head])) {
    const list: unknown[] = section[head]
    section[head] = list.map((one) => (asFields(one).id === id ? { ...asFields(one), [field]: value } : one))
  }
}
const asFields = (value: unknown): Fields => (typeof value === 'object' && value !== null ? { ...value } : {})

/** Ids that a case of this section may leave out. */
export function offIds(section: Section): Set<string> {
  return new Set(OFF_LISTS.flatMap((list) => section[list].map(({ id }) => id)))
}

/** A value that a case may set: its path, its name for people, what kind of number it is (null: text, flag), its drawn value. */
export type CasePath = { path: string; label: string; kind: QuantityKind | null; value: CaseValue | undefined }

/** Every value of this section that a case may set, in the order of the document. A value not given is undefined. */
export function casePaths(section: Section): CasePath[] {
  return casePathsOf(section).map((path) => ({
    path,
    label: describePath(section, path),
    kind: kindAt(section, path),
    value: caseValue(valueAt(section, path)),
  }))
}
function caseValue(value: unknown): CaseValue | undefined {
  const plain = value === null || typeof value === 'number' || typeof value === 'string' || typeof value === 'boolean'
  return plain ? value : undefined
}
