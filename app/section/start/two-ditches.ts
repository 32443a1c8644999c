import type { Section } from '../types'

/** A field between two ditches with silted beds, a drain in its middle, a layer of silt over sand. */
export const twoDitches: Section = {
  format: 'doab.section',
  version: 1,
  title: 'Long Acre between its ditches',
  datum: 'm above site datum',
  ground: [
    [0, 3.35],
    [2, 3.6],
    [45, 3.75],
    [90, 3.65],
    [92, 3.35],
  ],
  base: [
    [0, -1.2],
    [92, -1.2],
  ],
  left: { kind: 'water', x: 0, name: 'North ditch', stage: 2.35, conductance: 0.45, bed: 1.7 },
  right: { kind: 'water', x: 92, name: 'South ditch', stage: 2.25, conductance: 0.35, bed: 1.6 },
  materials: [
    { id: 'sand', name: 'Fine sand', k: 2.2, anisotropy: 5, specificYield: 0.16, porosity: 0.32 },
    { id: 'silt', name: 'Sandy silt', k: 0.35, anisotropy: 8, specificYield: 0.08, porosity: 0.38 },
  ],
  host: 'sand',
  bodies: [
    {
      id: 'topsoil',
      name: 'Silt under the plough layer',
      material: 'silt',
      outline: [
        [0, 2.1],
        [92, 2.1],
        [92, 4],
        [0, 4],
      ],
    },
  ],
  recharge: [{ id: 'field', name: 'Field', from: 0, to: 92, rate: 0.0021 }],
  features: [{ id: 'tile', name: 'Tile drain', kind: 'drain', x: 46, level: 2.55, conductance: 0.3 }],
  observations: [],
  limits: [{ id: 'roots', name: 'Root zone', from: 6, to: 86, level: 3.3, clearance: 0.3 }],
  cases: [{ id: 'undrained', name: 'Without the tile drain', off: ['tile'], set: {} }],
  sources: {
    'materials.sand.k': 'auger-hole test, two holes',
    'materials.silt.k': 'assumed from texture',
    'recharge.field.rate': 'design surplus of the drainage plan',
    'left.conductance': 'bed 0.3 m of silt, wetted width 1.1 m',
  },
  surfaceSeepage: true,
}
