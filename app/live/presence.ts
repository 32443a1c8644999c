import { z } from 'zod'
import type { Edit, Presence } from './types'

/** What one connection may show of itself at most; beyond it a field is left out. */
export const PRESENCE = { name: 80, word: 40, path: 160, picked: 500, edits: 2000, laser: 64 } as const

const FAR = 1e7
const number = z.number().min(-FAR).max(FAR)
const word = z.string().max(PRESENCE.word)

// Every edit is tried by itself when it is applied (edit/perform.ts); here only its outline.
const edit = z.custom<Edit>(
  (value) => typeof value === 'object' && value !== null && 'do' in value && typeof value.do === 'string',
)

const FIELDS = {
  pointer: z.object({ x: number, z: number, panel: word }).nullable(),
  picked: z.array(z.string().max(PRESENCE.path)).max(PRESENCE.picked),
  caseId: z.string().max(64).nullable(),
  tool: word,
  gesture: z.object({ id: z.string().max(64), edits: z.array(edit).max(PRESENCE.edits) }).nullable(),
  reading: number.nullable(),
  view: z
    .object({ x0: number, x1: number, z0: number, z1: number })
    .refine(({ x0, x1, z0, z1 }) => x0 < x1 && z0 < z1)
    .nullable(),
  presenting: z.boolean(),
  laser: z.array(z.object({ x: number, z: number, t: z.number() })).max(PRESENCE.laser),
}
const WHO = z.object({
  id: z.string().min(1).max(64),
  name: z.string().max(PRESENCE.name),
  ink: z.number().int().min(0).max(1000),
  kind: z.enum(['person', 'link']),
})

const isJson = (value: unknown): value is Record<string, unknown> =>
  typeof value === 'object' && value !== null && !Array.isArray(value)

/**
 * What somebody's connection shows, from whatever it sent: fields that cannot be read are left out, unknown ones too. null when it
 * does not say who it is. A link holder shows a pointer only, and nobody's gesture is more than edits.
 */
export function readPresence(input: unknown): Presence | null {
  if (!isJson(input)) return null
  const who = WHO.safeParse(input.who)
  if (!who.success) return null
  const presence: Record<string, unknown> = { who: who.data }
  for (const [name, schema] of Object.entries(FIELDS)) {
    if (!Object.hasOwn(input, name) || (who.data.kind === 'link' && name !== 'pointer')) continue
    const read = schema.safeParse(input[name])
    if (read.success) presence[name] = read.data
  }
  return { ...presence, who: who.data }
}
