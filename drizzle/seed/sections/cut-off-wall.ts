import type { Section } from '~/section'

/** A valley side with rock behind it, a pumped trench for a cutting, and a cut-off wall that keeps the stream out of it. */
export const cutOffWall: Section = {
  format: 'doab.section',
  version: 1,
  title: 'Section 5, cutting below Hanger Wood',
  datum: 'm above valley datum',
  ground: [
    [0, 52],
    [50, 47.5],
    [110, 42.8],
    [160, 39.6],
    [190, 38.9],
    [230, 38.2],
    [262, 36.4],
    [275, 35.1],
  ],
  base: [
    [0, 36],
    [90, 31.2],
    [190, 26.8],
    [275, 26],
  ],
  left: { kind: 'no-flow', x: 0, name: 'Rock of the hill' },
  right: { kind: 'water', x: 275, name: 'Sallow Beck', stage: 34.4, conductance: null, bed: null },
  materials: [
    { id: 'drift', name: 'Stony drift', k: 1.4, anisotropy: 3, specificYield: 0.16, porosity: 0.27 },
    { id: 'sand', name: 'Beck sand', k: 4.5, anisotropy: 2, specificYield: 0.22, porosity: 0.33 },
  ],
  host: 'drift',
  bodies: [
    {
      id: 'beck',
      name: 'Old course of the beck',
      material: 'sand',
      outline: [
        [205, 37.2],
        [212, 29.4],
        [240, 27.5],
        [280, 27.6],
        [280, 37.4],
      ],
    },
  ],
  recharge: [
    { id: 'wood', name: 'Hanger Wood', from: 0, to: 110, rate: 0.0007 },
    { id: 'grass', name: 'Grass', from: 110, to: 275, rate: 0.001 },
  ],
  features: [
    { id: 'trench', kind: 'trench', name: 'Pumped trench', x: 176, rate: 0.22 },
    { id: 'wall', kind: 'wall', name: 'Sheet-pile wall', x: 200, thickness: 0.3, k: 0.002 },
  ],
  observations: [
    { id: 'h1', name: 'H-1', x: 80, head: 34.67, date: '2026-03-18', sd: 0.1 },
    { id: 'h2', name: 'H-2', x: 238, head: 34.36, date: '2026-03-18', sd: 0.1 },
  ],
  limits: [{ id: 'formation', name: 'Cutting formation', from: 168, to: 184, level: 36.4, clearance: 0.5 }],
  cases: [
    { id: 'still', name: 'Pump off', off: ['trench'], set: {} },
    { id: 'nowall', name: 'Without the wall', off: ['wall'], set: {} },
    { id: 'wet', name: 'Wet spring', off: [], set: { 'recharge.wood.rate': 0.0015, 'recharge.grass.rate': 0.0019 } },
  ],
  sources: {
    'materials.drift.k': 'slug tests H-1 and H-3',
    'materials.sand.k': 'grading curves, five samples',
    'features.wall.k': 'interlock leakage after the maker’s tests, spread over 0.3 m',
    'features.trench.rate': 'contractor’s pump log, mean of March',
    base: 'refraction line R-2, tied to H-1 and H-2',
    'right.stage': 'levelled 18 March 2026',
  },
  surfaceSeepage: true,
}
