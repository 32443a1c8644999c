import type { Section } from '../types'

/** A level strip between two waters, with nothing in it yet: everything can be moved and typed over. */
export const empty: Section = {
  format: 'doab.section',
  version: 1,
  title: 'Untitled section',
  datum: 'm above site datum',
  ground: [
    [0, 10],
    [200, 10],
  ],
  base: [
    [0, 0],
    [200, 0],
  ],
  left: { kind: 'water', x: 0, stage: 7, conductance: null, bed: null },
  right: { kind: 'water', x: 200, stage: 6.5, conductance: null, bed: null },
  materials: [{ id: 'sand', name: 'Sand', k: 5, anisotropy: 3, specificYield: 0.2, porosity: 0.3 }],
  host: 'sand',
  bodies: [],
  recharge: [],
  features: [],
  observations: [],
  limits: [],
  cases: [],
  sources: { 'materials.sand.k': 'assumed; replace by a test' },
  surfaceSeepage: true,
}
