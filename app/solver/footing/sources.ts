import type { Section } from '~/section'
import type { FootingLine } from '../types'

/** Paths of the numbers the answer hangs on, in the format's words. */
export function inputPaths(section: Section): string[] {
  const paths: string[] = []
  for (const side of ['left', 'right'] as const) {
    const bank = section[side]
    if (bank.kind === 'water') {
      paths.push(`${side}.stage`)
      if (bank.conductance !== null) paths.push(`${side}.conductance`)
    }
    if (bank.kind === 'inflow') paths.push(`${side}.rate`)
  }
  const used = new Set([section.host, ...section.bodies.map(({ material }) => material)])
  for (const { id } of section.materials) if (used.has(id)) paths.push(`materials.${id}.k`)
  for (const { id } of section.recharge) paths.push(`recharge.${id}.rate`)
  for (const feature of section.features) {
    const at = `features.${feature.id}`
    if (feature.kind === 'trench') paths.push(`${at}.rate`)
    else if (feature.kind === 'wall') paths.push(`${at}.k`)
    else {
      paths.push(`${at}.level`)
      if (feature.conductance !== null) paths.push(`${at}.conductance`)
    }
  }
  for (const { id } of section.limits) paths.push(`limits.${id}.level`)
  return paths
}

/** Every input says where it comes from. */
export function unsourced(section: Section): FootingLine {
  const paths = inputPaths(section)
  // A source on an object or on the whole line serves the numbers below it.
  const known = (path: string) =>
    Object.entries(section.sources).some(
      ([at, text]) => text.trim() !== '' && (path === at || path.startsWith(`${at}.`)),
    )
  const bare = paths.filter((path) => !known(path))
  return {
    key: 'unsourced',
    assumes: 'Every input says where it comes from',
    value: bare.length,
    unit: '',
    bound: 0,
    source: 'ASTM D5718 asks a report to document its inputs (from memory)',
    verdict: bare.length === 0 ? 'holds' : 'doubtful',
    says:
      bare.length === 0
        ? `All ${paths.length} inputs carry a source.`
        : `${bare.length} of ${paths.length} inputs without a source: ${bare.slice(0, 4).join(', ')}${bare.length > 4 ? ', …' : ''}.`,
  }
}
