import {
  type Case,
  type CaseValue,
  caseRuleAt,
  inCase,
  isId,
  isPathOf,
  LIMITS,
  NAMED,
  offIds,
  placeOf,
  problemsOfCase,
  type Section,
  said,
  troubleWith,
  valueAt,
} from '~/section'
import { inOrder } from '../order'
import { type Held, isHeld, listOf, NONE, problemList, readFields, type Say } from './context'
import { mend } from './mend'

type Values = [path: string, value: CaseValue][]

/** The cases of a section that is sound by itself; each case read is sound too. Values of things that are gone are passed over. */
export function readCases(held: Held, section: Section, say: Say): Case[] {
  const known = offIds(section)
  return listOf(held, 'cases', LIMITS.cases, say).flatMap(([id, fields]): Case[] => {
    if (!isId(id)) {
      say('cases', 'One of the cases has an id that cannot be read and is left out.')
      return []
    }
    const names: Pick<Case, 'name' | 'note'> = readFields(fields, NAMED, `cases.${id}`, say).values
    const [off, set] = [fields.get('off'), fields.get('set')]
    const one: Case = {
      id,
      off: readOff(isHeld(off) ? off : NONE, known),
      set: Object.fromEntries(readSet(isHeld(set) ? set : NONE, `cases.${id}.set`, section, say)),
      ...names,
    }
    return [settleCase(section, one, say)]
  })
}

function readOff(held: Held, known: Set<string>): string[] {
  return [...held]
    .filter(([id]) => known.has(id))
    .map(([name, order]) => ({ name, order: typeof order === 'string' ? order.slice(0, 200) : '' }))
    .sort(inOrder)
    .slice(0, LIMITS.set)
    .map(({ name }) => name)
}

function readSet(held: Held, at: string, section: Section, say: Say): Values {
  const values: Values = []
  for (const path of [...held.keys()].sort()) {
    const rule = caseRuleAt(section, path)
    if (!rule || values.length >= LIMITS.set) continue
    const value = held.get(path)
    const trouble = troubleWith(rule, value)
    if (trouble === null && isValue(value)) values.push([path, value === 0 ? 0 : value])
    else
      say(
        `${at}.${path}`,
        `${trouble ?? 'This value cannot be read.'} The case keeps the drawing’s value.`,
        placeOf(section, path),
      )
  }
  return values
}
const isValue = (value: unknown): value is CaseValue =>
  value === null || typeof value === 'number' || typeof value === 'string' || typeof value === 'boolean'

/** Brings the values of a case to what goes together with the drawing; those that cannot are left as drawn. */
function settleCase(section: Section, one: Case, say: Say): Case {
  if (Object.keys(one.set).length === 0 || problemsOfCase(section, one).length === 0) return one
  const quiet = problemList()
  const applied = inCase(section, one)
  const mended = mend(applied, quiet.say)
  const set = { ...one.set }
  for (const [path, value] of Object.entries(set)) {
    const fits = valueAt(mended, path)
    if (fits === value || !isValue(fits)) continue
    set[path] = fits
    say(
      `cases.${one.id}.set.${path}`,
      `In the case “${one.name ?? one.id}” ${inWords(value)} does not go together with the rest; ${inWords(fits)} is taken.`,
      placeOf(section, path),
    )
  }
  for (const drop of [named, all]) {
    const left = problemsOfCase(section, { ...one, set })
    if (left.length === 0) break
    for (const path of drop(
      set,
      left.map((problem) => problem.path),
    )) {
      delete set[path]
      say(
        `cases.${one.id}.set.${path}`,
        `In the case “${one.name ?? one.id}” this value does not go together with the rest; the drawing’s is taken.`,
        isPathOf(section, path) ? placeOf(section, path) : undefined,
      )
    }
  }
  return { ...one, set }
}
const named = (set: Record<string, CaseValue>, paths: string[]) =>
  Object.keys(set).filter((path) => paths.includes(path))
const all = (set: Record<string, CaseValue>) => Object.keys(set)
const inWords = (value: CaseValue) => (typeof value === 'number' ? said(value) : `“${String(value)}”`)
