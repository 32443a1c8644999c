import {
  addDependencies,
  create,
  createUnitDependencies,
  divideDependencies,
  evaluateDependencies,
  type FactoryFunctionMap,
  multiplyDependencies,
  powDependencies,
  subtractDependencies,
  type Unit,
  unaryMinusDependencies,
  unaryPlusDependencies,
  unitDependencies,
} from 'mathjs'
import { formatQuantity } from './format'
import { type QuantityKind, shapeOf, type UnitSet, YEAR } from './kinds'
import { type Token, tokensOf } from './numbers'

// This module brings mathjs along and is loaded late: see loadUnits in ./index.

export type Quantity = { ok: true; value: number; text: string } | { ok: false; message: string }

const NEEDS: FactoryFunctionMap = {}
for (const [name, need] of Object.entries({
  addDependencies,
  createUnitDependencies,
  divideDependencies,
  evaluateDependencies,
  multiplyDependencies,
  powDependencies,
  subtractDependencies,
  unaryMinusDependencies,
  unaryPlusDependencies,
  unitDependencies,
}))
  if (need) NEEDS[name] = need
const math = create(NEEDS)
// mathjs knows metres, feet, seconds and the rest; these are the short words of the trade.
math.createUnit('d', '86400 s')
math.createUnit('yr', `${YEAR * 86400} s`)
math.createUnit('usgal', '0.003785411784 m^3')
math.createUnit('gpd', '1 usgal/d')

/** Other spellings, in small letters; mathjs takes "in" for an operator. */
const WORDS: Record<string, string> = {
  in: 'inch',
  ins: 'inch',
  inches: 'inch',
  day: 'd',
  days: 'd',
  a: 'yr',
  y: 'yr',
  yrs: 'yr',
  year: 'yr',
  years: 'yr',
  hr: 'h',
  hrs: 'h',
  hour: 'h',
  hours: 'h',
  sec: 's',
  secs: 's',
  mins: 'minute',
  min: 'minute',
  gal: 'usgal',
  gallon: 'usgal',
  gallons: 'usgal',
  metre: 'm',
  metres: 'm',
  feet: 'ft',
  foot: 'ft',
  miles: 'mile',
  mi: 'mile',
  l: 'litre',
  liter: 'litre',
  litres: 'litre',
  µm: 'um',
  μm: 'um',
}

const WANTED: Record<QuantityKind, { unit: string; is: string; like: Record<UnitSet, string> }> = {
  distance: { unit: 'm', is: 'a distance is a length', like: { si: '120 m', us: '400 ft' } },
  elevation: { unit: 'm', is: 'an elevation is a length', like: { si: '9.1 m', us: '30 ft' } },
  length: { unit: 'm', is: 'this is a length', like: { si: '0.6 m', us: '2 ft' } },
  'small-length': { unit: 'm', is: 'this is a length', like: { si: '5 mm', us: '0.2 in' } },
  conductivity: { unit: 'm/d', is: 'a conductivity is a length per time', like: { si: '2e-4 cm/s', us: '25 ft/d' } },
  recharge: { unit: 'm/d', is: 'a recharge is a depth per time', like: { si: '300 mm/yr', us: '12 in/yr' } },
  flow: {
    unit: 'm^2/d',
    is: 'a flow per metre of bank is an area per time',
    like: { si: '0.4 m²/d or 400 m³/d/km', us: '4 ft²/d or 30 gpd/ft' },
  },
  'km-flow': {
    unit: 'm^2/d',
    is: 'a flow per length of bank is an area per time',
    like: { si: '400 m³/d/km', us: '30 gpd/ft' },
  },
  conductance: { unit: 'm/d', is: 'a conductance is a length per time', like: { si: '0.5 m/d', us: '1.6 ft/d' } },
  ratio: { unit: '', is: 'this is a bare number', like: { si: '0.3 or 30 %', us: '0.3 or 30 %' } },
  time: { unit: 'd', is: 'this is a time', like: { si: '30 d', us: '30 d' } },
}

/** What a wrong unit measures, to say why it does not fit. */
const MEASURES: [unit: string, what: string][] = [
  ['m', 'a length'],
  ['m^2', 'an area'],
  ['m^3', 'a volume'],
  ['d', 'a time'],
  ['m/d', 'a length per time'],
  ['m^2/d', 'an area per time'],
  ['m^3/d', 'a volume per time'],
  ['1/d', 'a rate per time'],
  ['1/m', 'a number per length'],
  ['kg', 'a mass'],
  ['kg/m^3', 'a density'],
  ['Pa', 'a pressure'],
  ['N', 'a force'],
  ['K', 'a temperature'],
  ['rad', 'an angle'],
  ['A', 'an electric current'],
  ['J', 'an energy'],
  ['W', 'a power'],
]

const LONGEST = 120

/**
 * Reads what was typed into a number field: a value with a unit ("2e-4 cm/s"), a sum ("= 0.35*820 mm/yr"), or a bare number, which
 * is taken in the unit that the chosen set shows for this kind. Years count 365.25 days, gallons are US gallons. Gives the value in
 * metres and days and the text it is then shown as, or a sentence that says what is wrong. Never throws.
 */
export function parseQuantity(typed: string, kind: QuantityKind, options: { set: UnitSet }): Quantity {
  const { set } = options
  const wanted = WANTED[kind]
  const no = (message: string): Quantity => ({ ok: false, message })
  const text = typed.trim().replace(/^=\s*/, '')
  if (text === '') return no(`Type a number${shapeOf(kind, set).unit ? ` with a unit, e.g. ${wanted.like[set]}` : ''}.`)
  if (text.length > LONGEST) return no(`That is too long to be a number; ${LONGEST} characters are enough.`)
  const split = tokensOf(text)
  if (!split.ok) return no(split.message)
  const spelt = spell(split.tokens)
  if (!spelt.ok) return no(`${spelt.message} ${sentence(wanted.is)}, e.g. ${wanted.like[set]}.`)
  let result: unknown
  try {
    result = math.evaluate(spelt.text)
  } catch {
    return no(`“${text}” cannot be worked out. Type it like ${wanted.like[set]}.`)
  }
  const value = inBase(result, kind, set)
  if (typeof value === 'string') return no(`“${unitPart(typed)}” is ${value}; ${wanted.is}, e.g. ${wanted.like[set]}.`)
  if (value === null) return no(`“${text}” is no number. Type it like ${wanted.like[set]}.`)
  if (!Number.isFinite(value)) return no(`“${text}” has no finite value; is something divided by 0?`)
  const clean = value === 0 ? 0 : value
  return { ok: true, value: clean, text: formatQuantity(clean, kind, set, { exact: true }) }
}

const sentence = (text: string) => text.charAt(0).toUpperCase() + text.slice(1)
const unitPart = (typed: string) => typed.replace(/^[=\s\d.,+\-−*·×()eE]+(?=\p{L})/u, '').trim() || typed.trim()

function isUnit(value: unknown): value is Unit {
  return typeof value === 'object' && value !== null && 'equalBase' in value
}

/** The value in metres and days; what it measures instead, when it does not fit; null when it is neither number nor unit. */
function inBase(result: unknown, kind: QuantityKind, set: UnitSet): number | string | null {
  const { unit } = WANTED[kind]
  if (typeof result === 'number') return result / shapeOf(kind, set).times
  if (!isUnit(result)) return null
  if (unit !== '' && result.equalBase(math.unit(unit)) && result.value !== null) return result.toNumber(unit)
  if (result.value === null) return null
  const found = MEASURES.find(([one]) => result.equalBase(math.unit(one)))
  return found ? found[1] : 'something else'
}

type Spelt = { ok: true; text: string } | { ok: false; message: string }

/** The tokens as mathjs takes them: only numbers, signs and units it knows ever reach it, so nothing typed can be run. */
function spell(tokens: Token[]): Spelt {
  const parts: string[] = []
  for (const [i, token] of tokens.entries()) {
    const before = tokens[i - 1]
    const next = tokens[i + 1]
    if (token.is !== 'word') {
      if (token.text === '(' && before?.is === 'word' && before.text !== 'per')
        return { ok: false, message: `“${before.text}(…)” cannot be used here.` }
      parts.push(token.is === 'number' && token.text.startsWith('-') ? `(${token.text})` : token.text)
      continue
    }
    if (token.text === '%') {
      parts.push('* 0.01')
      continue
    }
    if (token.text.toLowerCase() === 'per') {
      parts.push('/')
      continue
    }
    const unit = unitOf(token.text)
    if (unit === null) return { ok: false, message: `“${token.text}” is no unit known here.` }
    parts.push(unit)
    // "cm s^-1": a unit beside a number or unit multiplies, as it does on paper.
    if (next?.is === 'word' && !['per', '%'].includes(next.text.toLowerCase())) parts.push('*')
  }
  return { ok: true, text: parts.join(' ') }
}

function unitOf(word: string): string | null {
  const [, stem = word, power = ''] = /^(.*?)([23]?)$/u.exec(word) ?? []
  const raised = power ? `^${power}` : ''
  const small = stem.toLowerCase()
  for (const name of [Object.hasOwn(WORDS, small) ? WORDS[small] : undefined, stem, small])
    if (name !== undefined && math.Unit.isValuelessUnit(name)) return name + raised
  return null
}
