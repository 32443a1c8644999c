import type { Bank, Feature } from '../types'
import { LIMITS } from './limits'
import type { FlagRule, MaterialRule, NumberRule, Rule, TextRule } from './rule'

const C = LIMITS.coordinate
const distance = (label: string) =>
  ({ type: 'number', label, kind: 'distance', unit: 'm', min: -C, max: C }) satisfies NumberRule
const elevation = (label: string) =>
  ({ type: 'number', label, kind: 'elevation', unit: 'm', min: -C, max: C }) satisfies NumberRule
const flow = (label: string) =>
  ({ type: 'number', label, kind: 'flow', unit: 'm²/d', min: -1e5, max: 1e5 }) satisfies NumberRule
const share = (label: string) =>
  ({
    type: 'number',
    label,
    kind: 'ratio',
    unit: '',
    min: 0,
    max: 1,
    above: true,
    below: true,
    optional: true,
  }) satisfies NumberRule
const conductance = {
  type: 'number',
  label: 'The conductance',
  kind: 'conductance',
  unit: 'm/d',
  min: 0,
  max: 1e6,
  nullable: true,
} satisfies NumberRule

/** On any object. */
export const NAMED = {
  name: { type: 'text', label: 'The name', max: 500, optional: true },
  note: { type: 'text', label: 'The note', max: 5000, optional: true },
} satisfies Record<string, TextRule>

export const POINT = { x: distance('The distance x'), z: elevation('The elevation z') }

export const SECTION = {
  title: { type: 'text', label: 'The title', max: 200 } satisfies TextRule,
  datum: { type: 'text', label: 'The datum', max: 200 } satisfies TextRule,
  host: { type: 'material', label: 'The host' } satisfies MaterialRule,
  surfaceSeepage: { type: 'flag', label: 'Surface seepage' } satisfies FlagRule,
}

export const BANK = {
  water: {
    x: distance('The bank’s distance x'),
    stage: elevation('The stage'),
    conductance,
    bed: { ...elevation('The underside of the bed'), nullable: true },
  },
  'no-flow': { x: distance('The bank’s distance x') },
  inflow: { x: distance('The bank’s distance x'), rate: flow('The inflow') },
} satisfies Record<Bank['kind'], Record<string, NumberRule>>

export const MATERIAL = {
  k: { type: 'number', label: 'The conductivity', kind: 'conductivity', unit: 'm/d', min: 1e-12, max: 1e5 },
  anisotropy: {
    type: 'number',
    label: 'The ratio of horizontal to vertical conductivity',
    kind: 'ratio',
    unit: '',
    min: 1e-3,
    max: 1e5,
    optional: true,
  },
  specificYield: share('The specific yield'),
  porosity: share('The porosity'),
} satisfies Record<string, NumberRule>

export const BODY = { material: { type: 'material', label: 'The body’s material' } satisfies MaterialRule }

export const RECHARGE = {
  from: distance('The start of the recharge zone'),
  to: distance('The end of the recharge zone'),
  rate: { type: 'number', label: 'The recharge', kind: 'recharge', unit: 'm/d', min: -1, max: 1 },
} satisfies Record<string, NumberRule>

export const FEATURE = {
  ditch: { x: distance('The ditch’s distance x'), level: elevation('The ditch’s level'), conductance },
  drain: { x: distance('The drain’s distance x'), level: elevation('The drain’s level'), conductance },
  trench: { x: distance('The trench’s distance x'), rate: flow('The pumped rate') },
  wall: {
    x: distance('The wall’s distance x'),
    thickness: {
      type: 'number',
      label: 'The wall’s thickness',
      kind: 'length',
      unit: 'm',
      min: 0,
      max: 1000,
      above: true,
    },
    k: { type: 'number', label: 'The wall’s conductivity', kind: 'conductivity', unit: 'm/d', min: 0, max: 1e5 },
  },
} satisfies Record<Feature['kind'], Record<string, NumberRule>>

export const OBSERVATION = {
  x: distance('The observation’s distance x'),
  head: elevation('The observed head'),
  date: { type: 'text', label: 'The date', max: 10, optional: true, date: true } satisfies TextRule,
  sd: {
    type: 'number',
    label: 'The standard deviation',
    kind: 'length',
    unit: 'm',
    min: 0,
    max: 1000,
    above: true,
    optional: true,
  } satisfies NumberRule,
}

export const LIMIT = {
  from: distance('The start of the limit'),
  to: distance('The end of the limit'),
  level: elevation('The limit’s level'),
  clearance: { type: 'number', label: 'The clearance', kind: 'length', unit: 'm', min: 0, max: 1e4 },
} satisfies Record<string, NumberRule>

export type ListWord = 'materials' | 'bodies' | 'recharge' | 'features' | 'observations' | 'limits' | 'cases'
export const LISTS: readonly ListWord[] = [
  'materials',
  'bodies',
  'recharge',
  'features',
  'observations',
  'limits',
  'cases',
]
export const isList = (word: unknown): word is ListWord => LISTS.some((list) => list === word)

const isKindOf = <K extends string>(table: Record<K, unknown>, kind: unknown): kind is K =>
  typeof kind === 'string' && Object.hasOwn(table, kind)
export const isBankKind = (kind: unknown): kind is Bank['kind'] => isKindOf(BANK, kind)
export const isFeatureKind = (kind: unknown): kind is Feature['kind'] => isKindOf(FEATURE, kind)

/** The fields of a bank of some kind, without name and note; none for an unknown kind. */
export const bankFields = (kind: unknown): Record<string, Rule> => (isBankKind(kind) ? BANK[kind] : {})

/** The fields of an object in a list, without id, kind, outline, name and note. Features differ by kind. */
export function objectFields(list: ListWord, kind?: unknown): Record<string, Rule> {
  switch (list) {
    case 'materials':
      return MATERIAL
    case 'bodies':
      return BODY
    case 'recharge':
      return RECHARGE
    case 'features':
      return isFeatureKind(kind) ? FEATURE[kind] : {}
    case 'observations':
      return OBSERVATION
    case 'limits':
      return LIMIT
    case 'cases':
      return {}
  }
}

/** The rule of one field, name and note included; null when there is no such field. */
export function fieldRule(fields: Record<string, Rule>, field: string): Rule | null {
  if (field === 'name' || field === 'note') return NAMED[field]
  return Object.hasOwn(fields, field) ? (fields[field] ?? null) : null
}
