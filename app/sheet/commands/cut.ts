import { z } from 'zod'
import type { Edit, LiveSection } from '~/live'
import type { Section } from '~/section'
import { ownerOf, shown } from '../tools/paths'

const number = z.number().refine(Number.isFinite)
const named = { name: z.string().max(500).optional(), note: z.string().max(5000).optional() }
const id = z.string().regex(/^[^.\s]{1,60}$/)
const point = z.tuple([number, number])
const feature = { id, x: number, ...named }
const outflow = { level: number, conductance: number.nullable() }

/** Part of a section on its way by the clipboard: whole objects, with the materials their bodies are of. */
const CUT = z.strictObject({
  format: z.literal('doab.cut'),
  version: z.literal(1),
  materials: z.array(
    z.strictObject({
      id,
      k: number,
      anisotropy: number.optional(),
      specificYield: number.optional(),
      porosity: number.optional(),
      ...named,
    }),
  ),
  bodies: z.array(z.strictObject({ id, material: id, outline: z.array(point).min(3), ...named })),
  recharge: z.array(z.strictObject({ id, from: number, to: number, rate: number, ...named })),
  features: z.array(
    z.discriminatedUnion('kind', [
      z.strictObject({ ...feature, kind: z.literal('ditch'), ...outflow }),
      z.strictObject({ ...feature, kind: z.literal('drain'), ...outflow }),
      z.strictObject({ ...feature, kind: z.literal('trench'), rate: number }),
      z.strictObject({ ...feature, kind: z.literal('wall'), thickness: number, k: number }),
    ]),
  ),
  observations: z.array(
    z.strictObject({ id, x: number, head: number, date: z.string().optional(), sd: number.optional(), ...named }),
  ),
  limits: z.array(z.strictObject({ id, from: number, to: number, level: number, clearance: number, ...named })),
})
export type Cut = z.infer<typeof CUT>

const LISTS = ['bodies', 'recharge', 'features', 'observations', 'limits'] as const

/** What of the picked can be carried elsewhere: whole objects as they are in the case shown. null when there is none. */
export function cutOut(live: LiveSection, caseId: string | null, picked: readonly string[]): Cut | null {
  const section = shown(live, caseId)
  const wanted = new Set(picked.map(ownerOf))
  const has = (list: (typeof LISTS)[number]) => (one: { id: string }) => wanted.has(`${list}.${one.id}`)
  const bodies = section.bodies.filter(has('bodies'))
  const cut = {
    format: 'doab.cut' as const,
    version: 1 as const,
    materials: section.materials.filter((material) => bodies.some((body) => body.material === material.id)),
    bodies,
    recharge: section.recharge.filter(has('recharge')),
    features: section.features.filter(has('features')),
    observations: section.observations.filter(has('observations')),
    limits: section.limits.filter(has('limits')),
  }
  return LISTS.some((list) => cut[list].length > 0) ? structuredClone(cut) : null
}

/** Reads what may be anything at all from the clipboard; null when it is no cut of a section. */
export function readCut(text: string): Cut | null {
  if (!text.startsWith('{') || text.length > 2_000_000) return null
  try {
    const read = CUT.safeParse(JSON.parse(text))
    return read.success ? read.data : null
  } catch {
    // Not JSON: some other text.
    return null
  }
}

/** From the leftmost to the rightmost x of a cut. */
export function reach(cut: Cut): { from: number; to: number } {
  const xs = [
    ...cut.bodies.flatMap((body) => body.outline.map(([x]) => x)),
    ...[...cut.recharge, ...cut.limits].flatMap(({ from, to }) => [from, to]),
    ...[...cut.features, ...cut.observations].map(({ x }) => x),
  ]
  return { from: Math.min(...xs), to: Math.max(...xs) }
}

/**
 * The edits that put a cut into a section, shifted along x, under fresh ids. A material that is there already (same name and
 * same values) is used; another comes along.
 */
export function pasteEdits(
  cut: Cut,
  section: Section,
  shift: number,
  fresh: (prefix: string) => string,
): { edits: Edit[]; picked: string[] } {
  const edits: Edit[] = []
  const picked: string[] = []
  const materials = new Map<string, string>()
  for (const material of cut.materials) {
    const { id: _, ...values } = material
    const same = section.materials.find(
      ({ id: other, ...theirs }) =>
        equal(values, theirs) || (other === material.id && theirs.name === material.name && theirs.k === material.k),
    )
    if (same) materials.set(material.id, same.id)
    else {
      const id = fresh('m')
      materials.set(material.id, id)
      edits.push({ do: 'add', list: 'materials', object: { ...material, id } })
    }
  }
  const add = (list: (typeof LISTS)[number], object: Extract<Edit, { do: 'add' }>['object']) => {
    edits.push({ do: 'add', list, object })
    picked.push(`${list}.${object.id}`)
  }
  for (const body of cut.bodies)
    add('bodies', {
      ...body,
      id: fresh('b'),
      material: materials.get(body.material) ?? section.host,
      outline: body.outline.map(([x, z]) => [x + shift, z]),
    })
  for (const zone of cut.recharge)
    add('recharge', { ...zone, id: fresh('r'), from: zone.from + shift, to: zone.to + shift })
  for (const one of cut.features) add('features', { ...one, id: fresh(one.kind.slice(0, 1)), x: one.x + shift })
  for (const one of cut.observations) add('observations', { ...one, id: fresh('o'), x: one.x + shift })
  for (const one of cut.limits) add('limits', { ...one, id: fresh('l'), from: one.from + shift, to: one.to + shift })
  return { edits, picked }
}

const equal = (a: object, b: object) =>
  JSON.stringify(Object.entries(a).sort()) === JSON.stringify(Object.entries(b).sort())
