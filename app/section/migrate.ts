import type { Problem } from './types'

export const FORMAT = 'doab.section'
export const VERSION = 1

type Json = Record<string, unknown>

/** From each older version to the next. Version 1 is the first, so there is none yet. */
const STEPS: Record<number, (old: Json) => Json> = {}

type Migrated = { ok: true; input: Json } | { ok: false; errors: Problem[] }

/** Brings an older section up to this version, or says why it cannot be read. */
export function migrate(input: Json): Migrated {
  const no = (path: string, message: string): Migrated => ({ ok: false, errors: [{ path, message }] })
  if (input.format !== FORMAT) return no('format', `This is no section: its “format” must be “${FORMAT}”.`)
  const { version } = input
  if (typeof version !== 'number' || !Number.isInteger(version) || version < 1)
    return no('version', `The version must be a whole number from 1 to ${VERSION}.`)
  if (version > VERSION)
    return no(
      'version',
      `This section was written by a newer Doab (version ${version}; this one reads up to ${VERSION}). Open it there, or save it for version ${VERSION}.`,
    )
  let current = input
  for (let at = version; at < VERSION; at++) {
    const step = STEPS[at]
    if (!step) return no('version', `Version ${at} cannot be brought up to version ${VERSION}.`)
    current = step(current)
  }
  return { ok: true, input: current }
}
