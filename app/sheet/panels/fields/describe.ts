import type { Section } from '~/section'
import type { UnitSet } from '../../state'
import { nameOf, subjectOf } from '../paths'
import { plain, show } from './quantities'
import { specAt } from './specs'

/** A path in words: what it belongs to, which value, and how such a value is shown. */
export function describePath(
  section: Section,
  path: string,
  units: UnitSet,
): { of: string; field: string; show: (value: unknown) => string } {
  if (path === 'surfaceSeepage')
    return { of: 'Whole section', field: 'surface seepage', show: (value) => (value ? 'yes' : 'no') }
  if (path === 'host')
    return { of: 'Whole section', field: 'the ground is', show: (value) => materialName(section, value) }
  const subject = subjectOf(path)
  const spec = specAt(section, path, subject)
  return {
    of: nameOf(section, path),
    field: (spec?.label ?? path.split('.').at(-1) ?? path).toLowerCase(),
    show: (value) => {
      if (typeof value === 'number') return spec ? show(value, spec.kind, units) : plain(value)
      if (value === null || value === undefined) return spec?.empty?.means ?? 'not given'
      // A case may give a body or the ground another material.
      return materialName(section, value)
    },
  }
}

const materialName = (section: Section, id: unknown) =>
  section.materials.find((one) => one.id === id)?.name ?? String(id)
