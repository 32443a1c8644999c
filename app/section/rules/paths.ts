import type { Bank, Section } from '../types'
import { bankFields, fieldRule, isList, type ListWord, objectFields, SECTION } from './fields'
import type { Rule } from './rule'

/** An object of a list by its id; undefined when there is none. */
export function objectAt(section: Section, list: ListWord, id: string): Section[ListWord][number] | undefined {
  const objects: readonly Section[ListWord][number][] = section[list]
  return objects.find((one) => one.id === id)
}

const own = (from: object, field: string): unknown =>
  Object.hasOwn(from, field) ? Object.entries(from).find(([name]) => name === field)?.[1] : undefined

/** Value at a path in the format's words ("left.stage", "materials.sand.k", "title"); undefined where there is none. */
export function valueAt(section: Section, path: string): unknown {
  const [head = '', id, ...rest] = path.split('.')
  if (id === undefined) return own(section, head)
  if (head === 'left' || head === 'right') return rest.length === 0 ? own(section[head], id) : undefined
  if (!isList(head) || rest.length > 1) return undefined
  const object = objectAt(section, head, id)
  return object && rest[0] !== undefined ? own(object, rest[0]) : object
}

/** What may stand at a path; null when the section has no such field. Ids, kinds and shapes are no fields. */
export function ruleAt(section: Section, path: string): Rule | null {
  const [head = '', id, field, more] = path.split('.')
  if (more !== undefined) return null
  if (id === undefined) return fieldRule(SECTION, head)
  if (head === 'left' || head === 'right')
    return field === undefined ? fieldRule(bankFields(section[head].kind), id) : null
  if (!isList(head) || field === undefined) return null
  const object = objectAt(section, head, id)
  return object ? fieldRule(objectFields(head, 'kind' in object ? object.kind : undefined), field) : null
}

/** Whether a source may be noted at a path: a field, an object, a bank, a line or an outline that the section has. */
export function isPathOf(section: Section, path: string): boolean {
  if (path === 'ground' || path === 'base' || path === 'left' || path === 'right') return true
  const [head, id = '', field, more] = path.split('.')
  if (isList(head) && more === undefined && (field === undefined || (head === 'bodies' && field === 'outline')))
    return objectAt(section, head, id) !== undefined
  return ruleAt(section, path) !== null
}

const IN_CASE: Partial<Record<ListWord, readonly string[]>> = {
  materials: ['k', 'anisotropy', 'specificYield', 'porosity'],
  bodies: ['material'],
  recharge: ['from', 'to', 'rate'],
  features: ['x', 'level', 'conductance', 'rate', 'thickness', 'k'],
  observations: ['head', 'sd'],
  limits: ['from', 'to', 'level', 'clearance'],
}
const BANK_IN_CASE: readonly string[] = ['stage', 'conductance', 'bed', 'rate'] satisfies (
  | keyof Extract<Bank, { kind: 'water' }>
  | keyof Extract<Bank, { kind: 'inflow' }>
)[]

/**
 * What a case may set at a path; null when a case cannot hold a value there. The drawing's shape (ground, base, outlines, the
 * banks' places and kinds), names and notes are common to all cases. `kind`: of the bank or feature the path leads to; anything
 * but undefined for another object that is there.
 */
export function caseRuleFor(path: string, kind: unknown): Rule | null {
  const [head, id = '', field = '', more] = path.split('.')
  if (path === 'host' || path === 'surfaceSeepage') return SECTION[path]
  if (more !== undefined || kind === undefined) return null
  if (head === 'left' || head === 'right')
    return field === '' && BANK_IN_CASE.includes(id) ? fieldRule(bankFields(kind), id) : null
  return isList(head) && IN_CASE[head]?.includes(field) ? fieldRule(objectFields(head, kind), field) : null
}

/** As `caseRuleFor`, in a section. */
export function caseRuleAt(section: Section, path: string): Rule | null {
  const [head, id = ''] = path.split('.')
  if (head === 'left' || head === 'right') return caseRuleFor(path, section[head].kind)
  const object = isList(head) ? objectAt(section, head, id) : undefined
  return caseRuleFor(path, object && ('kind' in object ? object.kind : 'object'))
}

/** Every path a case may set in this section, in the order of the document. */
export function casePathsOf(section: Section): string[] {
  const paths = [
    'surfaceSeepage',
    'host',
    ...(['left', 'right'] as const).flatMap((side) => BANK_IN_CASE.map((field) => `${side}.${field}`)),
    ...Object.entries(IN_CASE).flatMap(([list, fields]) =>
      isList(list) ? section[list].flatMap(({ id }) => fields.map((field) => `${list}.${id}.${field}`)) : [],
    ),
  ]
  return paths.filter((path) => caseRuleAt(section, path) !== null)
}

/** Lists whose objects a case may leave out. */
export const OFF_LISTS = ['bodies', 'recharge', 'features', 'observations', 'limits'] as const

/** Where an object or field stands on the drawing, if it stands anywhere. */
export function placeOf(section: Section, path: string): { x: number; z?: number; to?: number } | undefined {
  const [head, id = ''] = path.split('.')
  if (head === 'left' || head === 'right') {
    const bank = section[head]
    return bank.kind === 'water' ? { x: bank.x, z: bank.stage } : { x: bank.x }
  }
  if (!isList(head)) return undefined
  const object = objectAt(section, head, id)
  if (!object) return undefined
  if ('outline' in object) return object.outline[0] ? { x: object.outline[0][0], z: object.outline[0][1] } : undefined
  if ('from' in object)
    return 'level' in object ? { x: object.from, z: object.level, to: object.to } : { x: object.from, to: object.to }
  if ('head' in object) return { x: object.x, z: object.head }
  if ('x' in object) return 'level' in object ? { x: object.x, z: object.level } : { x: object.x }
  return undefined
}
