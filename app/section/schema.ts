import { z } from 'zod'
import { FORMAT, VERSION } from './migrate'
import { BANK, BODY, FEATURE, LIMIT, MATERIAL, NAMED, OBSERVATION, POINT, RECHARGE, SECTION } from './rules/fields'
import { LIMITS } from './rules/limits'
import { ID_SAYS, isId, type NumberRule, said, type TextRule, troubleWith } from './rules/rule'
import type { CaseValue, Point } from './types'

const num = (rule: NumberRule) =>
  z.unknown().transform((value, context): number => {
    const trouble = troubleWith({ ...rule, nullable: undefined }, value)
    if (trouble === null && typeof value === 'number') return value + 0
    context.addIssue({ code: 'custom', message: trouble ?? `${rule.label} must be a number.` })
    return z.NEVER
  })
const maybe = (rule: NumberRule) =>
  z.unknown().transform((value, context): number | undefined => {
    const trouble = troubleWith(rule, value)
    if (trouble === null) return typeof value === 'number' ? value + 0 : undefined
    context.addIssue({ code: 'custom', message: trouble })
    return z.NEVER
  })
const orNull = (rule: NumberRule) =>
  z.unknown().transform((value, context): number | null => {
    const trouble = troubleWith(rule, value)
    if (trouble === null) return typeof value === 'number' ? value + 0 : null
    context.addIssue({ code: 'custom', message: trouble })
    return z.NEVER
  })
const text = (rule: TextRule) =>
  z.unknown().transform((value, context): string => {
    const trouble = troubleWith(rule, value)
    if (trouble === null && typeof value === 'string') return value
    context.addIssue({ code: 'custom', message: trouble ?? `${rule.label} must be a text.` })
    return z.NEVER
  })

const id = z.unknown().transform((value, context): string => {
  if (isId(value)) return value
  context.addIssue({ code: 'custom', message: value === undefined ? `The id is missing. ${ID_SAYS}` : ID_SAYS })
  return z.NEVER
})
const named = { name: text(NAMED.name).optional(), note: text(NAMED.note).optional() }
const reference = (label: string) =>
  z.unknown().transform((value, context): string => {
    if (isId(value)) return value
    context.addIssue({ code: 'custom', message: `${label} must name a material by its id.` })
    return z.NEVER
  })

const point = z
  .tuple([num(POINT.x), num(POINT.z)], { error: 'A vertex must be two numbers, [x, z], in m.' })
  .transform(([x, z]): Point => [x, z])

const line = (word: string) =>
  z
    .array(point, { error: `The ${word} must be a list of vertices, [[x, z], …], from bank to bank.` })
    .max(LIMITS.line, `The ${word} may have at most ${said(LIMITS.line)} vertices.`)

const kindError = (kinds: string) => `The kind must be one of: ${kinds}.`
const literal = <K extends string>(kind: K) => z.literal(kind)

const bank = (side: string) =>
  z.discriminatedUnion(
    'kind',
    [
      z.strictObject({
        kind: literal('water'),
        x: num(BANK.water.x),
        stage: num(BANK.water.stage),
        conductance: orNull(BANK.water.conductance).default(null),
        bed: orNull(BANK.water.bed).default(null),
        ...named,
      }),
      z.strictObject({ kind: literal('no-flow'), x: num(BANK['no-flow'].x), ...named }),
      z.strictObject({ kind: literal('inflow'), x: num(BANK.inflow.x), rate: num(BANK.inflow.rate), ...named }),
    ],
    {
      error: ({ input }) =>
        typeof input === 'object' && input !== null
          ? kindError('water, no-flow, inflow')
          : `The ${side} bank is missing: give its kind (water, no-flow or inflow) and its x.`,
    },
  )

const material = z.strictObject({
  id,
  k: num(MATERIAL.k),
  anisotropy: maybe(MATERIAL.anisotropy).optional(),
  specificYield: maybe(MATERIAL.specificYield).optional(),
  porosity: maybe(MATERIAL.porosity).optional(),
  ...named,
})
const body = z.strictObject({
  id,
  material: reference(BODY.material.label),
  outline: z
    .array(point, { error: 'The outline must be a list of vertices, [[x, z], …].' })
    .max(LIMITS.outline + 1, `An outline may have at most ${said(LIMITS.outline)} vertices.`)
    .transform(opened),
  ...named,
})
/** An outline closes by itself; a last vertex that repeats the first is dropped. */
function opened(outline: Point[]): Point[] {
  const [first, last] = [outline[0], outline.at(-1)]
  const closed = outline.length > 3 && first && last && first[0] === last[0] && first[1] === last[1]
  return closed ? outline.slice(0, -1) : outline
}

const zone = z.strictObject({
  id,
  from: num(RECHARGE.from),
  to: num(RECHARGE.to),
  rate: num(RECHARGE.rate),
  ...named,
})
const held = (rules: typeof FEATURE.ditch) => ({
  id,
  x: num(rules.x),
  level: num(rules.level),
  conductance: orNull(rules.conductance).default(null),
  ...named,
})
const feature = z.discriminatedUnion(
  'kind',
  [
    z.strictObject({ kind: literal('ditch'), ...held(FEATURE.ditch) }),
    z.strictObject({ kind: literal('drain'), ...held(FEATURE.drain) }),
    z.strictObject({ kind: literal('trench'), id, x: num(FEATURE.trench.x), rate: num(FEATURE.trench.rate), ...named }),
    z.strictObject({
      kind: literal('wall'),
      id,
      x: num(FEATURE.wall.x),
      thickness: num(FEATURE.wall.thickness),
      k: num(FEATURE.wall.k),
      ...named,
    }),
  ],
  {
    error: ({ input }) =>
      typeof input === 'object' && input !== null
        ? kindError('ditch, drain, trench, wall')
        : 'A feature must be an object.',
  },
)
const observation = z.strictObject({
  id,
  x: num(OBSERVATION.x),
  head: num(OBSERVATION.head),
  date: text(OBSERVATION.date).optional(),
  sd: maybe(OBSERVATION.sd).optional(),
  ...named,
})
const limit = z.strictObject({
  id,
  from: num(LIMIT.from),
  to: num(LIMIT.to),
  level: num(LIMIT.level),
  clearance: num(LIMIT.clearance).default(0),
  ...named,
})

const caseValue = z.unknown().transform((value, context): CaseValue => {
  if (value === null || typeof value === 'string' || typeof value === 'boolean') return value
  if (typeof value === 'number') return value + 0
  context.addIssue({ code: 'custom', message: 'A case sets a path to a number, a text, true, false or null.' })
  return z.NEVER
})
const size = (most: number, what: string) => (record: object) =>
  Object.keys(record).length <= most ? undefined : `At most ${said(most)} ${what} fit here.`
const limited = <T extends z.ZodType<object>>(schema: T, most: number, what: string) =>
  schema.superRefine((value, context) => {
    const message = size(most, what)(value)
    if (message) context.addIssue({ code: 'custom', message })
  })

const oneCase = z.strictObject({
  id,
  off: z
    .array(z.string({ error: 'Name each object that this case leaves out by its id.' }), {
      error: '“off” must be a list of ids.',
    })
    .max(LIMITS.set, `A case may leave out at most ${said(LIMITS.set)} objects.`)
    .default(() => []),
  set: limited(
    z.record(z.string(), caseValue, { error: '“set” must be an object of paths and values.' }),
    LIMITS.set,
    'changed values',
  ).default(() => ({})),
  ...named,
})

const source = z.unknown().transform((value, context): string => {
  const trouble = troubleWith({ type: 'text', label: 'The source', max: 2000 }, value)
  if (trouble === null && typeof value === 'string') return value
  context.addIssue({ code: 'custom', message: trouble ?? 'The source must be a text.' })
  return z.NEVER
})

const list = <T extends z.ZodType>(one: T, word: string, most: number = LIMITS.list) =>
  z
    .array(one, { error: `“${word}” must be a list.` })
    .max(most, `“${word}” may hold at most ${said(most)}.`)
    .default(() => [])

/** The fields of a section by themselves; how they go together is `findProblems`' to say. Unknown fields are refused. */
export const SCHEMA = z.strictObject({
  format: z.literal(FORMAT),
  version: z.literal(VERSION),
  title: text(SECTION.title).default('Untitled section'),
  datum: text(SECTION.datum).default('m above site datum'),
  ground: line('ground line'),
  base: line('base'),
  left: bank('left'),
  right: bank('right'),
  materials: list(material, 'materials'),
  host: reference(SECTION.host.label).optional(),
  bodies: list(body, 'bodies'),
  recharge: list(zone, 'recharge'),
  features: list(feature, 'features'),
  observations: list(observation, 'observations'),
  limits: list(limit, 'limits'),
  cases: list(oneCase, 'cases', LIMITS.cases),
  sources: limited(
    z.record(z.string(), source, { error: '“sources” must be an object of paths and texts.' }),
    LIMITS.sources,
    'sources',
  ).default(() => ({})),
  surfaceSeepage: z.boolean({ error: `${SECTION.surfaceSeepage.label} must be true or false.` }).default(true),
  ...named,
})
