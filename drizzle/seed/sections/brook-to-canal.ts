import type { Section } from '~/section'

/** Rain between two waters of nearly one height: a mound, and a divide nearer the higher water. */
export const brookToCanal: Section = {
  format: 'doab.section',
  version: 1,
  title: 'Section 1, Teasel Brook to the Cut',
  datum: 'm above valley datum',
  ground: [
    [0, 14.2],
    [12, 15.6],
    [60, 16.4],
    [130, 17.1],
    [200, 17.3],
    [270, 16.6],
    [330, 15.9],
    [360, 15.1],
  ],
  base: [
    [0, 5.5],
    [360, 5.5],
  ],
  left: { kind: 'water', x: 0, name: 'Teasel Brook', stage: 12.9, conductance: null, bed: null },
  right: { kind: 'water', x: 360, name: 'The Cut', stage: 13.3, conductance: null, bed: null },
  materials: [
    {
      id: 'sand',
      name: 'Terrace sand',
      k: 3.2,
      anisotropy: 3,
      specificYield: 0.21,
      porosity: 0.31,
      note: 'Fines upwards',
    },
  ],
  host: 'sand',
  bodies: [],
  recharge: [{ id: 'meadow', name: 'Meadow', from: 0, to: 360, rate: 0.0011 }],
  features: [],
  observations: [
    { id: 'tb1', name: 'TB-1', x: 90, head: 13.5, date: '2026-04-14', sd: 0.05 },
    { id: 'tb2', name: 'TB-2', x: 240, head: 13.8, date: '2026-04-14', sd: 0.05 },
  ],
  limits: [{ id: 'barn', name: 'Barn floor', from: 170, to: 188, level: 15.8, clearance: 0.5 }],
  cases: [
    {
      id: 'wet',
      name: 'Wet spring',
      note: 'The spring of 2024, as the gauges had it',
      off: [],
      set: { 'left.stage': 13.6, 'right.stage': 13.5, 'recharge.meadow.rate': 0.0019 },
    },
    { id: 'dry', name: 'Dry autumn', off: [], set: { 'left.stage': 12.4, 'recharge.meadow.rate': 0.0003 } },
  ],
  sources: {
    'left.stage': 'staff gauge at the footbridge, mean of April 2026',
    'right.stage': 'lock log, normal level',
    'materials.sand.k': 'pumping test TB-2, 72 h, March 2026',
    'recharge.meadow.rate': 'soil-water budget, ten-year mean',
    base: 'top of clay in TB-1 and TB-2',
  },
  surfaceSeepage: true,
}
