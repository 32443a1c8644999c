import { isList, type ListWord } from './rules/fields'
import { objectAt, ruleAt } from './rules/paths'
import type { Feature, Section } from './types'
import type { QuantityKind } from './units/kinds'

const LIST_WORD: Record<Exclude<ListWord, 'features'>, string> = {
  materials: 'material',
  bodies: 'body',
  recharge: 'recharge zone',
  observations: 'observation',
  limits: 'limit',
  cases: 'case',
}
const FEATURE_WORD: Record<Feature['kind'], string> = {
  ditch: 'ditch',
  drain: 'drain',
  trench: 'pumped trench',
  wall: 'cut-off wall',
}
const FIELD_WORD: Record<string, string> = {
  k: 'conductivity',
  anisotropy: 'horizontal to vertical',
  specificYield: 'specific yield',
  sd: 'standard deviation',
  bed: 'underside of bed',
  x: 'distance',
  surfaceSeepage: 'surface seepage',
  host: 'material of the ground',
}

/**
 * A path in words a person reads: "left bank “Withy Brook” · stage", "body b1 · silt", "drain “Tile drain” · level". Paths that
 * lead nowhere come back as they are.
 */
export function describePath(section: Section, path: string): string {
  const [head = '', id, field] = path.split('.')
  const of = ownerWords(section, head, id)
  if (of === null) return path
  const last = head === 'left' || head === 'right' ? id : field
  return last === undefined ? of : `${of} · ${FIELD_WORD[last] ?? last}`
}

function ownerWords(section: Section, head: string, id: string | undefined): string | null {
  if (head === 'left' || head === 'right') return `${head} bank${quoted(section[head].name)}`
  if (head === 'ground') return 'ground line'
  if (head === 'base') return 'base'
  if (!isList(head)) return id === undefined && Object.hasOwn(section, head) ? (FIELD_WORD[head] ?? head) : null
  const object = id === undefined ? undefined : objectAt(section, head, id)
  if (!object) return null
  const word = head === 'features' ? ('kind' in object ? FEATURE_WORD[object.kind] : 'feature') : LIST_WORD[head]
  const name = object.name ? quoted(object.name) : ` ${object.id}`
  if (!('material' in object)) return word + name
  const material = section.materials.find((one) => one.id === object.material)
  return `${word}${name} · ${material?.name ?? object.material}`
}
const quoted = (name: string | undefined) => (name ? ` “${name}”` : '')

/** What kind of number stands at a path; null when none does. */
export function kindAt(section: Section, path: string): QuantityKind | null {
  const rule = ruleAt(section, path)
  return rule?.type === 'number' ? rule.kind : null
}
