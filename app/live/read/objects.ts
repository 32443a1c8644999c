import {
  type Bank,
  type Body,
  bankFields,
  type Feature,
  isBankKind,
  isFeatureKind,
  isId,
  LIMITS,
  type Limit,
  type ListWord,
  type Material,
  NAMED,
  type Observation,
  objectFields,
  type RechargeZone,
} from '~/section'
import { type Held, isHeld, listOf, NONE, placeOfHeld, readFields, remembered, type Say } from './context'
import { pointsOf, readOutline } from './lines'

/** Values read by the rules of an object's fields: each is there and of the right kind, which TypeScript cannot see. */
function object<T>(values: Record<string, unknown>): T {
  return values as T
}

function named(held: Held, path: string, say: Say): Record<string, unknown> {
  return held.has('name') || held.has('note') ? readFields(held, NAMED, path, say).values : {}
}

/** A bank; its stage comes back as NaN when it cannot be read, to be set once the ground is known. */
export function readBank(held: Held, side: 'left' | 'right', x: number, say: Say): Bank {
  const kind = held.get('kind')
  const names = named(held, side, say)
  if (!isBankKind(kind)) {
    say(`${side}.kind`, `What the ${side} bank is could not be read; it is taken as closed. Choose its kind.`, { x })
    return object<Bank>({ kind: 'no-flow', x, ...names })
  }
  const { x: _, ...rules } = bankFields(kind)
  const { values } = readFields(held, rules, side, say, { x })
  if (kind === 'inflow') values.rate ??= 0
  if (kind === 'water') values.stage ??= Number.NaN
  return object<Bank>({ kind, x, ...values, ...names })
}

type More = (fields: Held, values: Record<string, unknown>, path: string, say: Say) => Record<string, unknown> | null

/** `hangsOn`: whatever else the reading of an object depends on. */
function objectsOf<T>(held: Held, list: ListWord, say: Say, more: More, hangsOn = ''): T[] {
  return listOf(held, list, LIMITS.list, say).flatMap(([id, fields]): T[] =>
    remembered(fields, `${list}.${id} ${hangsOn}`, say, (told) => objectOf<T>(id, fields, list, told, more)),
  )
}

function objectOf<T>(id: string, fields: Held, list: ListWord, say: Say, more: More): T[] {
  if (!isId(id)) {
    say(list, `One of ${list} has an id that cannot be read and is left out.`, placeOfHeld(fields))
    return []
  }
  const path = `${list}.${id}`
  const kind = fields.get('kind')
  if (list === 'features' && !isFeatureKind(kind)) {
    say(path, 'What kind of feature this is could not be read, so it is left out.', placeOfHeld(fields))
    return []
  }
  const { values, missing } = readFields(fields, objectFields(list, kind), path, say, placeOfHeld(fields))
  if (missing !== null && list !== 'materials') {
    say(path, `Without its ${missing} this means nothing and is left out. Remove it or undo.`, placeOfHeld(fields))
    return []
  }
  const whole = more(fields, values, path, say)
  return whole ? [object<T>({ id, ...whole, ...named(fields, path, say) })] : []
}

const as = (_: Held, values: Record<string, unknown>) => values

export function readMaterials(held: Held, say: Say): Material[] {
  const materials = objectsOf<Material>(held, 'materials', say, (_, values) => ({ ...values, k: values.k ?? 1 }))
  if (materials.length > 0) return materials
  say('materials', 'There is no material left; sand of 1 m/d stands in. Add one.')
  return [{ id: 'sand', name: 'Sand', k: 1 }]
}

export function readBodies(held: Held, host: string, say: Say): Body[] {
  const more: More = (fields, values, path, told) => {
    const inner = fields.get('outline')
    const outline = readOutline(isHeld(inner) ? inner : NONE, `${path}.outline`, told)
    return outline && { material: values.material ?? host, outline: pointsOf(outline) }
  }
  return objectsOf<Body>(held, 'bodies', say, more, host)
}

export const readRecharge = (held: Held, say: Say) => objectsOf<RechargeZone>(held, 'recharge', say, as)
export const readFeatures = (held: Held, say: Say) =>
  objectsOf<Feature>(held, 'features', say, (fields, values) => ({ kind: fields.get('kind'), ...values }))
export const readObservations = (held: Held, say: Say) => objectsOf<Observation>(held, 'observations', say, as)
export const readLimits = (held: Held, say: Say) => objectsOf<Limit>(held, 'limits', say, as)
