import type { Section } from '../types'

/** A slope with rock behind it, a falling base, a lens of clayey silt, a stream at its foot: seepage where the slope breaks. */
export const valleySide: Section = {
  format: 'doab.section',
  version: 1,
  title: 'Hanging Wood to Sallow Beck',
  datum: 'm above site datum',
  ground: [
    [0, 46],
    [60, 42.5],
    [140, 36.2],
    [210, 31.6],
    [262, 28.9],
    [300, 28.2],
    [320, 27.4],
  ],
  base: [
    [0, 33],
    [110, 26.5],
    [230, 21.4],
    [320, 20.2],
  ],
  left: { kind: 'no-flow', x: 0, name: 'Rock of the hill' },
  right: { kind: 'water', x: 320, name: 'Sallow Beck', stage: 26.9, conductance: null, bed: null },
  materials: [
    { id: 'gravel', name: 'Silty gravel', k: 1.1, anisotropy: 3, specificYield: 0.18, porosity: 0.26 },
    { id: 'silt', name: 'Clayey silt', k: 0.02, anisotropy: 6, specificYield: 0.05, porosity: 0.4 },
  ],
  host: 'gravel',
  bodies: [
    {
      id: 'lens',
      name: 'Silt lens',
      material: 'silt',
      outline: [
        [150, 25.6],
        [195, 24.2],
        [238, 24.4],
        [226, 26.9],
        [172, 28.6],
      ],
    },
  ],
  recharge: [
    { id: 'wood', name: 'Under the wood', from: 0, to: 140, rate: 0.0006 },
    { id: 'pasture', name: 'Pasture', from: 140, to: 320, rate: 0.0009 },
  ],
  features: [],
  observations: [
    { id: 'b2', name: 'BH-2', x: 96, head: 31.95, date: '2026-03-09', sd: 0.1 },
    { id: 'b3', name: 'BH-3', x: 252, head: 28.7, date: '2026-03-09', sd: 0.1 },
  ],
  limits: [{ id: 'track', name: 'Track bed', from: 256, to: 266, level: 28.8, clearance: 0.4 }],
  cases: [
    {
      id: 'thaw',
      name: 'Thaw',
      off: [],
      set: { 'recharge.wood.rate': 0.0014, 'recharge.pasture.rate': 0.0018, 'right.stage': 27.2 },
    },
  ],
  sources: {
    base: 'three boreholes and a refraction line',
    'materials.gravel.k': 'slug tests BH-2, BH-3',
    'right.stage': 'levelled 9 March',
  },
  surfaceSeepage: true,
}
