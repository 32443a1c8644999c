import type { Section } from '../types'

/** A coastal bar between a lake and the sea: dune sand over shelly sand, a cut-off wall and a ditch behind the dunes. */
export const lakeAndSea: Section = {
  format: 'doab.section',
  version: 1,
  title: 'Samphire Bar, lake to sea',
  datum: 'm above mean sea level',
  ground: [
    [0, 2.6],
    [40, 3.1],
    [180, 3.4],
    [300, 2.9],
    [395, 3.6],
    [455, 8.8],
    [520, 11.4],
    [575, 7.2],
    [620, 3.2],
    [660, 0.9],
  ],
  base: [
    [0, -14],
    [300, -15.5],
    [660, -18],
  ],
  left: { kind: 'water', x: 0, name: 'Samphire Lake', stage: 1.85, conductance: 0.9, bed: -0.6 },
  right: { kind: 'water', x: 660, name: 'Sea, mean level', stage: 0.15, conductance: null, bed: null },
  materials: [
    { id: 'dune', name: 'Dune sand', k: 5, anisotropy: 2, specificYield: 0.25, porosity: 0.36 },
    { id: 'shelly', name: 'Shelly sand', k: 9, anisotropy: 4, specificYield: 0.22, porosity: 0.33 },
    { id: 'peat', name: 'Peat', k: 0.15, anisotropy: 5, specificYield: 0.12, porosity: 0.6 },
  ],
  host: 'dune',
  bodies: [
    {
      id: 'bed',
      name: 'Shell bed',
      material: 'shelly',
      outline: [
        [-10, -15],
        [300, -16.5],
        [670, -19],
        [670, -9],
        [320, -8.2],
        [-10, -8.6],
      ],
    },
    {
      id: 'peat',
      name: 'Buried peat',
      material: 'peat',
      outline: [
        [60, 0.2],
        [230, -0.3],
        [338, 0.4],
        [330, 1.2],
        [200, 0.9],
        [70, 1.1],
      ],
    },
  ],
  recharge: [
    { id: 'slack', name: 'Slack', from: 0, to: 395, rate: 0.0005 },
    { id: 'dunes', name: 'Bare dunes', from: 395, to: 620, rate: 0.0012 },
  ],
  features: [
    { id: 'seawall', name: 'Sheet wall', kind: 'wall', x: 612, thickness: 0.4, k: 0.02 },
    { id: 'ditch', name: 'Warden’s ditch', kind: 'ditch', x: 360, level: 1.35, conductance: 0.25 },
  ],
  observations: [{ id: 'w4', name: 'W-4', x: 500, head: 1.24, date: '2026-06-21', sd: 0.08 }],
  limits: [{ id: 'hut', name: 'Warden’s cellar', from: 384, to: 394, level: 2.9, clearance: 0.6 }],
  cases: [
    { id: 'surge', name: 'After a surge', off: [], set: { 'right.stage': 0.8, 'left.stage': 2.2 } },
    { id: 'nowall', name: 'Before the wall', off: ['seawall'], set: {} },
  ],
  sources: {
    'right.stage': 'tide tables, mean of the year',
    'materials.dune.k': 'pumping test W-4',
    'materials.shelly.k': 'assumed from the borehole log',
    'features.seawall.k': 'contractor’s test panels',
  },
  surfaceSeepage: true,
}
