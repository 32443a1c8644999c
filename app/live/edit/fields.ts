import {
  bankFields,
  caseRuleFor,
  fieldRule,
  isBankKind,
  isId,
  isList,
  LIMITS,
  type ListWord,
  objectFields,
  type Rule,
  SECTION,
  troubleWith,
} from '~/section'
import { isOrder, orderFor } from '../order'
import type { Branch, Tree } from '../shape'
import { drop, put } from '../shape'
import {
  type Fields,
  fieldOf,
  isFields,
  isSourcePath,
  SOURCE_MOST,
  storable,
  storableFields,
  tidy,
  write,
} from './words'

/** The rule of a field as the document stands, and the branch it lies in. */
function find(tree: Tree, path: string): { rule: Rule; branch: Branch; field: string } | null {
  const [head = '', id, field, more] = path.split('.')
  if (more !== undefined) return null
  if (id === undefined) return found(fieldRule(SECTION, head), tree.open('section'), head)
  if (head === 'left' || head === 'right') {
    const bank = tree.open(head)
    return field === undefined && bank ? found(fieldRule(bankFields(bank.get('kind')), id), bank, id) : null
  }
  if (!isList(head) || field === undefined) return null
  const list = tree.open(head)
  const object = list && tree.into(list, id)
  return object ? found(fieldRule(objectFields(head, object.get('kind')), field), object, field) : null
}
const found = (rule: Rule | null, branch: Branch | null, field: string) =>
  rule && branch ? { rule, branch, field } : null

export function setField(tree: Tree, path: unknown, value: unknown): void {
  if (typeof path !== 'string') return
  const at = find(tree, path)
  const stored = at && storable(at.rule, value)
  if (at && stored) write(at.branch, at.field, stored.value)
}

export function setBank(tree: Tree, side: unknown, bank: unknown): void {
  if ((side !== 'left' && side !== 'right') || !isFields(bank) || !isBankKind(fieldOf(bank, 'kind'))) return
  const branch = tree.open(side)
  if (branch) fillBank(branch, bank)
}

/** Fields of another kind stay where they are: whoever changes the kind back finds them, and nobody reads them meanwhile. */
export function fillBank(branch: Branch, bank: Fields): void {
  const kind = fieldOf(bank, 'kind')
  const values = storableFields(bankFields(kind), bank)
  if (!values || !isBankKind(kind)) return
  put(branch, 'kind', kind)
  for (const name of ['name', 'note']) if (!values.has(name)) drop(branch, name)
  for (const [name, value] of values) put(branch, name, value)
}

export function setSource(tree: Tree, path: unknown, text: unknown): void {
  const sources = tree.open('sources')
  if (!sources || !isSourcePath(path)) return
  if (text === null) drop(sources, path)
  else if (
    troubleWith({ type: 'text', label: '', max: SOURCE_MOST }, text) === null &&
    (sources.has(path) || sources.size < LIMITS.sources)
  )
    put(sources, path, text)
}

const OFF: readonly ListWord[] = ['bodies', 'recharge', 'features', 'observations', 'limits']

function caseBranch(tree: Tree, id: unknown, part: 'set' | 'off'): Branch | null {
  const cases = tree.open('cases')
  const one = cases && typeof id === 'string' ? tree.into(cases, id) : null
  if (!one) return null
  return tree.into(one, part)
}

/** The rule a case's value must keep to, as the drawing stands now. */
function ruleInCase(tree: Tree, path: string): Rule | null {
  const [head = '', id, field] = path.split('.')
  const look = (): unknown => {
    if (head === 'left' || head === 'right') return tree.open(head)?.get('kind')
    if (!isList(head) || id === undefined || field === undefined) return undefined
    const list = tree.open(head)
    const object = list && tree.look(list, id)
    return object ? (object.get('kind') ?? 'object') : undefined
  }
  return caseRuleFor(path, look())
}

export function setInCase(tree: Tree, id: unknown, path: unknown, value: unknown): void {
  const set = caseBranch(tree, id, 'set')
  if (!set || typeof path !== 'string') return
  if (value === undefined) {
    drop(set, path)
    return
  }
  const rule = ruleInCase(tree, path)
  if (!rule || troubleWith(rule, value) !== null || (!set.has(path) && set.size >= LIMITS.set)) return
  put(set, path, tidy(value))
}

export function setOff(tree: Tree, id: unknown, object: unknown, off: unknown): void {
  const branch = caseBranch(tree, id, 'off')
  if (!branch || !isId(object)) return
  if (off !== true) {
    drop(branch, object)
    return
  }
  if (branch.has(object) || branch.size >= LIMITS.set) return
  const exists = OFF.some((list) => tree.open(list)?.has(object) ?? false)
  if (!exists) return
  const orders = [...branch.keys()]
    .map((key) => branch.get(key))
    .filter(isOrder)
    .sort()
  const last = orders.at(-1) ?? ''
  branch.set(object, orderFor(object, last, null))
}
