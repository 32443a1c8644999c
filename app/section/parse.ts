import type { z } from 'zod'
import { migrate } from './migrate'
import { LISTS } from './rules/fields'
import { LIMITS, SLACK } from './rules/limits'
import { SCHEMA } from './schema'
import type { ParseResult, Point, Problem, Section } from './types'
import { findProblems } from './validate'

type Step = string | number
type Json = Record<string, unknown>
const isJson = (value: unknown): value is Json => typeof value === 'object' && value !== null && !Array.isArray(value)

/**
 * Reads a section document (format "doab.section", version 1) from parsed JSON. Strict: an unknown field is an error with its
 * path. Left out, these mean: a list: empty; title "Untitled section"; datum "m above site datum"; host: the only material;
 * conductance, bed: null; clearance 0; a case's off and set: empty; surfaceSeepage: true. A last vertex that repeats an outline's
 * first is dropped; line ends within a nanometre of their bank are put at it. SI: metres and days. Never throws, whatever comes in; every error has the path in the format's words (ids for
 * objects in lists), a sentence that says how to mend it, and a place on the drawing where there is one.
 */
export function parseSection(input: unknown): ParseResult {
  try {
    return parse(input)
  } catch {
    // A getter or a proxy that throws, or something nested without end.
    return {
      ok: false,
      errors: [{ path: 'section', message: 'This is not plain JSON and cannot be read as a section.' }],
    }
  }
}

function parse(input: unknown): ParseResult {
  if (!isJson(input)) return { ok: false, errors: [{ path: 'section', message: 'A section must be a JSON object.' }] }
  const current = migrate(input)
  if (!current.ok) return current
  const hidden = findHidden(current.input)
  if (hidden) return { ok: false, errors: [hidden] }
  const read = SCHEMA.safeParse(current.input)
  if (!read.success)
    return {
      ok: false,
      errors: read.error.issues.flatMap((issue) => problemsOf(issue, current.input)).slice(0, LIMITS.problems),
    }
  const { host, ...rest } = clean(read.data)
  const doubles = LISTS.flatMap((list) => findDoubles(list, rest[list]))
  if (doubles.length > 0) return { ok: false, errors: doubles.slice(0, LIMITS.problems) }
  const only = rest.materials.length === 1 ? rest.materials[0]?.id : undefined
  const chosen = host ?? only
  if (chosen === undefined)
    return {
      ok: false,
      errors: [
        rest.materials.length === 0
          ? { path: 'materials', message: 'A section needs at least one material: the one its ground is of.' }
          : { path: 'host', message: 'Name the material that lies wherever there is no body.' },
      ],
    }
  const section: Section = { ...rest, host: chosen }
  for (const line of [section.ground, section.base]) {
    atBank(line[0], section.left.x)
    atBank(line.at(-1), section.right.x)
  }
  const errors = findProblems(section)
  return errors.length > 0 ? { ok: false, errors } : { ok: true, section }
}

/** An end that misses its bank by the rounding of a sum stands at it. */
function atBank(end: Point | undefined, x: number): void {
  if (end && Math.abs(end[0] - x) <= SLACK) end[0] = x
}

/** zod keeps a key whose value is undefined; the section has the key or has it not. */
function clean<T>(value: T): T {
  if (Array.isArray(value)) {
    value.forEach(clean)
    return value
  }
  if (isJson(value))
    for (const key of Object.keys(value)) {
      if (value[key] === undefined) delete value[key]
      else clean(value[key])
    }
  return value
}

/** JSON may spell a field "__proto__", which schemas pass over; here it is an unknown field like any other. */
function findHidden(value: unknown, path: Step[] = [], depth = 0): Problem | null {
  if (depth > 8 || typeof value !== 'object' || value === null) return null
  if (Object.hasOwn(value, '__proto__'))
    return { path: [...path, '__proto__'].join('.'), message: '“__proto__” is no field of a section: remove it.' }
  for (const [key, inner] of Object.entries(value)) {
    const found = findHidden(inner, [...path, key], depth + 1)
    if (found) return found
  }
  return null
}

function findDoubles(list: (typeof LISTS)[number], objects: readonly { id: string }[]): Problem[] {
  const seen = new Set<string>()
  return objects.flatMap((object, i): Problem[] => {
    const double = seen.has(object.id)
    seen.add(object.id)
    if (!double) return []
    const place = placeIn(objects[i], [])
    return [
      {
        path: `${list}.${object.id}`,
        message: `Two of ${list} have the id “${object.id}” (number ${i + 1} is the second): give each its own.`,
        ...(place ? { place } : {}),
      },
    ]
  })
}

function problemsOf(issue: z.core.$ZodIssue, input: Json): Problem[] {
  const steps = issue.path.map((step): Step => (typeof step === 'symbol' ? String(step) : step))
  if (issue.code === 'unrecognized_keys')
    return issue.keys.map((key) =>
      problem([...steps, key], `“${key}” is no field here: remove it or mend its spelling.`, input),
    )
  if (issue.code === 'invalid_union')
    return [problem([...steps, ...(isJson(at(input, steps)) ? ['kind'] : [])], issue.message, input)]
  const ours = issue.code === 'custom' || issue.code === 'too_big' || !issue.message.startsWith('Invalid input')
  return [problem(steps, ours ? issue.message : 'This must be an object with the fields of the format.', input)]
}

function problem(steps: Step[], message: string, input: Json): Problem {
  const place = placeFor(steps, input)
  return { path: named(steps, input), message, ...(place ? { place } : {}) }
}

/** The path in the format's words: an object of a list by its id when it has one that is its own. */
function named(steps: Step[], input: Json): string {
  const [list, index] = steps
  const objects = typeof list === 'string' && LISTS.some((one) => one === list) ? input[list] : undefined
  const id = typeof index === 'number' && Array.isArray(objects) ? idOf(objects[index]) : undefined
  const own = id !== undefined && Array.isArray(objects) && objects.filter((one) => idOf(one) === id).length === 1
  return [list, own ? id : index, ...steps.slice(2)].filter((step) => step !== undefined).join('.')
}
const idOf = (value: unknown): string | undefined =>
  isJson(value) && typeof value.id === 'string' && value.id !== '' ? value.id : undefined

function at(input: unknown, steps: Step[]): unknown {
  return steps.reduce<unknown>(
    (value, step) =>
      Array.isArray(value)
        ? value[Number(step)]
        : isJson(value) && Object.hasOwn(value, step)
          ? value[step]
          : undefined,
    input,
  )
}

const finite = (value: unknown): number | undefined =>
  typeof value === 'number' && Number.isFinite(value) && Math.abs(value) <= 1e9 ? value : undefined

function placeFor(steps: Step[], input: Json): Problem['place'] {
  const [head] = steps
  if (head === 'left' || head === 'right') return placeIn(input[head], [])
  if (head === 'ground' || head === 'base') return pointPlace(at(input, steps.slice(0, 2)))
  if (typeof steps[1] === 'number') return placeIn(at(input, steps.slice(0, 2)), steps.slice(2))
  return undefined
}

function placeIn(object: unknown, rest: Step[]): Problem['place'] {
  if (!isJson(object)) return undefined
  if (Array.isArray(object.outline)) {
    const vertex = rest[0] === 'outline' && typeof rest[1] === 'number' ? object.outline[rest[1]] : undefined
    return pointPlace(vertex) ?? pointPlace(object.outline.find((one) => pointPlace(one)))
  }
  const x = finite(object.x) ?? finite(object.from) ?? finite(object.to)
  if (x === undefined) return undefined
  const z = finite(object.stage) ?? finite(object.level) ?? finite(object.head)
  const to = finite(object.to)
  return { x, ...(z === undefined ? {} : { z }), ...(to === undefined || to <= x ? {} : { to }) }
}

function pointPlace(value: unknown): Problem['place'] {
  if (!Array.isArray(value)) return undefined
  const [x, z] = [finite(value[0]), finite(value[1])]
  return x === undefined ? undefined : z === undefined ? { x } : { x, z }
}
