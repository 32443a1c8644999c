import type { Section } from '~/section'

/** A drained field with a hollow: in the hollow the water stands at the ground in spite of the drain. */
export const drainedField: Section = {
  format: 'doab.section',
  version: 1,
  title: 'Section 4, Long Hollow field',
  datum: 'm above valley datum',
  ground: [
    [0, 8.6],
    [4, 9.1],
    [35, 9.2],
    [58, 8.35],
    [70, 8.25],
    [82, 8.4],
    [104, 9.1],
    [136, 9],
    [140, 8.5],
  ],
  base: [
    [0, 4.9],
    [140, 4.7],
  ],
  left: { kind: 'water', x: 0, name: 'North ditch', stage: 7.6, conductance: 0.5, bed: 7.1 },
  right: { kind: 'water', x: 140, name: 'South ditch', stage: 7.5, conductance: 0.4, bed: 7 },
  materials: [{ id: 'loam', name: 'Fine sandy loam', k: 0.9, anisotropy: 4, specificYield: 0.12, porosity: 0.36 }],
  host: 'loam',
  bodies: [],
  recharge: [{ id: 'field', name: 'Field', from: 0, to: 140, rate: 0.0032 }],
  features: [{ id: 'tile', kind: 'drain', name: 'Tile drain', x: 32, level: 7.9, conductance: 0.25 }],
  observations: [{ id: 'f1', name: 'F-1', x: 96, head: 8.53, date: '2026-01-12', sd: 0.05 }],
  limits: [{ id: 'roots', name: 'Root zone, winter wheat', from: 8, to: 50, level: 8.9, clearance: 0.1 }],
  cases: [
    { id: 'undrained', name: 'Without the tile drain', off: ['tile'], set: {} },
    { id: 'summer', name: 'Summer', off: [], set: { 'recharge.field.rate': 0.0004 } },
  ],
  sources: {
    'materials.loam.k': 'auger-hole tests, four holes',
    'recharge.field.rate': 'design surplus of the drainage plan, once in two years',
    'features.tile.conductance': 'assumed from pipe and gravel surround',
    'left.stage': 'levelled 12 January 2026',
    'right.stage': 'levelled 12 January 2026',
  },
  surfaceSeepage: true,
}
