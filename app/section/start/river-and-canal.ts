import type { Section } from '../types'

/** Two waters at different stages, rain on the land between: a mound with a divide nearer the higher water. */
export const riverAndCanal: Section = {
  format: 'doab.section',
  version: 1,
  title: 'Withy Brook to Lode Canal',
  datum: 'm above site datum',
  ground: [
    [0, 9.6],
    [18, 11.2],
    [70, 12.1],
    [165, 12.8],
    [240, 12.3],
    [310, 11.4],
    [340, 10.9],
  ],
  base: [
    [0, 1.5],
    [340, 1.5],
  ],
  left: { kind: 'water', x: 0, name: 'Withy Brook', stage: 8.7, conductance: null, bed: null },
  right: { kind: 'water', x: 340, name: 'Lode Canal', stage: 9.2, conductance: null, bed: null },
  materials: [{ id: 'sand', name: 'Silty sand', k: 2.6, anisotropy: 4, specificYield: 0.21, porosity: 0.3 }],
  host: 'sand',
  bodies: [],
  recharge: [{ id: 'meadow', name: 'Meadow', from: 0, to: 340, rate: 0.0009 }],
  features: [],
  observations: [{ id: 'p1', name: 'P-1', x: 165, head: 9.66, date: '2026-04-18', sd: 0.05 }],
  limits: [{ id: 'cellar', name: 'Barn cellar floor', from: 150, to: 166, level: 10.9, clearance: 0.5 }],
  cases: [
    {
      id: 'wet',
      name: 'Wet spring',
      off: [],
      set: { 'left.stage': 9.3, 'right.stage': 9.4, 'recharge.meadow.rate': 0.0016 },
    },
    { id: 'dry', name: 'Dry autumn', off: [], set: { 'left.stage': 8.2, 'recharge.meadow.rate': 0.0003 } },
  ],
  sources: {
    'left.stage': 'staff gauge at the footbridge, mean of April',
    'right.stage': 'lock-keeper’s book',
    'materials.sand.k': 'grading curve, three samples',
    'recharge.meadow.rate': 'rain less evaporation, ten-year mean',
  },
  surfaceSeepage: true,
}
