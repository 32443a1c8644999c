import type { LiveSection } from '~/live'

/** Does this path still lead somewhere? Vertices by key ("ground.v:KEY"), objects by id, banks always. */
export function exists(live: LiveSection, path: string): boolean {
  const [vertexOf, key] = path.split('.v:')
  if (key !== undefined) {
    if (vertexOf === 'ground' || vertexOf === 'base') return live.keys[vertexOf].includes(key)
    return live.keys.bodies[(vertexOf ?? '').replace(/^bodies\./, '')]?.includes(key) ?? false
  }
  const [list, id] = path.split('.')
  if (id === undefined || list === 'left' || list === 'right') return true
  if (list === 'marks') return live.markup.marks.some((mark) => mark.id === id)
  if (list === 'layers') return live.markup.layers.some((layer) => layer.id === id)
  const objects = lists(live)[list ?? '']
  return objects ? objects.some((object) => object.id === id) : true
}

const lists = ({ section }: LiveSection): Record<string, { id: string }[]> => ({
  materials: section.materials,
  bodies: section.bodies,
  recharge: section.recharge,
  features: section.features,
  observations: section.observations,
  limits: section.limits,
  cases: section.cases,
})
