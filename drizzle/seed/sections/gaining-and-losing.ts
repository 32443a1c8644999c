import type { Section } from '~/section'

/** A high canal that loses through its lining and a low river that gains: water passes under the whole strip. */
export const gainingAndLosing: Section = {
  format: 'doab.section',
  version: 1,
  title: 'Section 2, canal loses, river gains',
  datum: 'm above valley datum',
  ground: [
    [0, 19.4],
    [9, 20.1],
    [40, 18.2],
    [120, 17.2],
    [210, 16.4],
    [262, 15.2],
    [280, 13.9],
  ],
  base: [
    [0, 7.4],
    [140, 6.8],
    [280, 6.1],
  ],
  left: { kind: 'water', x: 0, name: 'High Level Canal', stage: 18.6, conductance: 0.12, bed: 16.4 },
  right: { kind: 'water', x: 280, name: 'River Amble', stage: 12.1, conductance: 1.8, bed: 11.2 },
  materials: [
    { id: 'gravel', name: 'Sandy gravel', k: 6.5, anisotropy: 4, specificYield: 0.24, porosity: 0.28 },
    { id: 'clay', name: 'Puddled clay', k: 0.003, anisotropy: 1, specificYield: 0.04, porosity: 0.42 },
  ],
  host: 'gravel',
  bodies: [
    {
      id: 'apron',
      name: 'Old puddle apron',
      material: 'clay',
      outline: [
        [2, 15.6],
        [30, 14.9],
        [34, 15.5],
        [6, 16.6],
      ],
    },
  ],
  recharge: [{ id: 'pasture', name: 'Pasture', from: 9, to: 280, rate: 0.0005 }],
  features: [{ id: 'back', kind: 'ditch', name: 'Back drain', x: 46, level: 13.8, conductance: 0.4 }],
  observations: [
    { id: 'hl1', name: 'HL-1', x: 84, head: 13.76, date: '2026-05-06', sd: 0.05 },
    { id: 'hl2', name: 'HL-2', x: 206, head: 12.86, date: '2026-05-06', sd: 0.05 },
  ],
  limits: [],
  cases: [
    { id: 'relined', name: 'Canal relined', off: [], set: { 'left.conductance': 0.02 } },
    { id: 'flood', name: 'Amble in flood', off: [], set: { 'right.stage': 13.6 } },
  ],
  sources: {
    'left.stage': 'canal company, weir level',
    'left.conductance': 'ponding test, stop planks in, January 2026',
    'right.stage': 'river gauge at Amble Bridge, median',
    'right.conductance': 'assumed: 0.5 m of silty gravel over 9 m wetted width',
    'materials.gravel.k': 'slug tests HL-1 and HL-2',
    'materials.clay.k': 'laboratory, two tube samples',
    'recharge.pasture.rate': 'as Section 1, less run-off on the slope',
  },
  surfaceSeepage: true,
}
