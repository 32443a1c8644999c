import type { Bank, Feature, Section } from '~/section'
import type { Subject } from '../paths'
import type { Kind } from './quantities'

/** One number of an object: its label, what it is, and what an empty field would mean. */
export type Spec = {
  field: string
  label: string
  kind: Kind
  /** What leaving it empty means; a field without this may not be emptied. `as` is what is written then. */
  empty?: { means: string; as: null | undefined }
  hint?: string
}

const direct = { means: 'stands directly against the aquifer', as: null } as const
const unset = { means: 'not given', as: undefined } as const

const x: Spec = { field: 'x', label: 'Distance', kind: 'distance' }
const level: Spec = { field: 'level', label: 'Level', kind: 'elevation' }
const conductance: Spec = {
  field: 'conductance',
  label: 'Conductance',
  kind: 'conductance',
  empty: direct,
  hint: 'Flow per metre of bank for each metre of head between water and aquifer.',
}

const MATERIAL: Spec[] = [
  {
    field: 'k',
    label: 'Conductivity',
    kind: 'conductivity',
    hint: 'Horizontal, K.',
  },
  {
    field: 'anisotropy',
    label: 'Horizontal to vertical',
    kind: 'ratio',
    empty: { means: '1: the same both ways', as: undefined },
  },
  {
    field: 'porosity',
    label: 'Porosity',
    kind: 'ratio',
    empty: unset,
    hint: 'Effective; times of travel hang on it.',
  },
  { field: 'specificYield', label: 'Specific yield', kind: 'ratio', empty: unset },
]

const FEATURES: Record<Feature['kind'], Spec[]> = {
  ditch: [x, level, conductance],
  drain: [x, level, conductance],
  trench: [x, { field: 'rate', label: 'Pumped', kind: 'flow', hint: 'Per metre of trench; plus takes water out.' }],
  wall: [
    x,
    { field: 'thickness', label: 'Thickness', kind: 'length' },
    { field: 'k', label: 'Conductivity', kind: 'conductivity' },
  ],
}

const BANKS: Record<Bank['kind'], Spec[]> = {
  water: [
    { field: 'stage', label: 'Stage', kind: 'elevation' },
    conductance,
    {
      field: 'bed',
      label: 'Underside of the bed',
      kind: 'elevation',
      empty: { means: 'never perched', as: null },
      hint: 'When the aquifer falls below it, the water is perched.',
    },
  ],
  'no-flow': [],
  inflow: [{ field: 'rate', label: 'Inflow', kind: 'flow', hint: 'Into the aquifer, at either end.' }],
}

const RECHARGE: Spec[] = [
  { field: 'from', label: 'From', kind: 'distance' },
  { field: 'to', label: 'To', kind: 'distance' },
  { field: 'rate', label: 'Recharge', kind: 'recharge', hint: 'Less than 0 where more evaporates than falls.' },
]
const LIMIT: Spec[] = [
  { field: 'from', label: 'From', kind: 'distance' },
  { field: 'to', label: 'To', kind: 'distance' },
  level,
  {
    field: 'clearance',
    label: 'Clearance',
    kind: 'length',
    hint: 'The water stays this far below the level.',
  },
]
const OBSERVATION: Spec[] = [
  x,
  { field: 'head', label: 'Observed head', kind: 'elevation' },
  { field: 'sd', label: 'Good to ±', kind: 'length', empty: unset },
]

/** The numbers of whatever a path is about, with the path each stands at. */
export function specsOf(section: Section, subject: Subject): { base: string; specs: Spec[] } {
  if (subject.kind === 'bank') return { base: subject.side, specs: BANKS[section[subject.side].kind] }
  if (subject.kind !== 'object') return { base: '', specs: [] }
  const base = `${subject.list}.${subject.id}`
  switch (subject.list) {
    case 'materials':
      return { base, specs: MATERIAL }
    case 'recharge':
      return { base, specs: RECHARGE }
    case 'limits':
      return { base, specs: LIMIT }
    case 'observations':
      return { base, specs: OBSERVATION }
    case 'features': {
      const feature = section.features.find(({ id }) => id === subject.id)
      return { base, specs: feature ? FEATURES[feature.kind] : [] }
    }
    default:
      return { base, specs: [] }
  }
}

/** The spec of one path ("recharge.r1.rate"), or null. */
export function specAt(section: Section, path: string, subject: Subject): Spec | null {
  const { base, specs } = specsOf(section, subject)
  return specs.find(({ field }) => `${base}.${field}` === path) ?? null
}

export {
  FEATURES as FEATURE_SPECS,
  LIMIT as LIMIT_SPECS,
  MATERIAL as MATERIAL_SPECS,
  OBSERVATION as OBSERVATION_SPECS,
  RECHARGE as RECHARGE_SPECS,
}
