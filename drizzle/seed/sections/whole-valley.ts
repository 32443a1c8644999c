import type { Body, Point, Section } from '~/section'

/** Surveyed every 30 m. */
const STEP = 30
const line = (levels: number[]): Point[] => levels.map((z, i) => [i * STEP, z])

const ground = line([
  24.6, 26.1, 26.8, 27.3, 27.9, 28.4, 28.8, 29.5, 30.2, 30.9, 31.4, 31.7, 32.1, 32.6, 32.8, 32.5, 32.2, 31.8, 31.1,
  30.4, 29.8, 29.5, 29.7, 30.1, 30.6, 31.2, 31.5, 31.3, 30.8, 30.1, 29.3, 28.6, 28.1, 27.7, 27.2, 26.9, 26.4, 25.8,
  25.1, 24.2, 22.9,
])
const base = line([
  9.8, 9.7, 9.5, 9.4, 9.4, 9.1, 8.8, 8.6, 8.3, 8.2, 8.4, 8.7, 9.1, 9.5, 9.9, 10.2, 10.1, 9.8, 9.4, 8.9, 8.5, 8.1, 7.8,
  7.6, 7.7, 7.9, 8.2, 8.4, 8.3, 8.1, 7.8, 7.4, 7.1, 6.9, 6.8, 6.6, 6.5, 6.3, 6.2, 6, 5.9,
])

/** A bed as a band between two levels, slightly bowed, as the boreholes have it. */
const bed = (id: string, name: string, material: string, outline: Point[]): Body => ({ id, name, material, outline })

const bodies: Body[] = [
  bed('lower', 'Lower gravel', 'gravel', [
    [60, 9],
    [300, 7.9],
    [520, 9.6],
    [700, 8],
    [900, 8],
    [1090, 6.2],
    [1090, 10.4],
    [900, 11.9],
    [640, 11.6],
    [420, 13],
    [240, 12.2],
    [70, 12.6],
  ]),
  bed('lake', 'Lake clay', 'clay', [
    [330, 14.1],
    [450, 13.8],
    [560, 14.2],
    [610, 15],
    [540, 15.9],
    [430, 15.6],
    [340, 15.2],
  ]),
  bed('middle', 'Middle sand', 'sand', [
    [150, 16.2],
    [320, 16.6],
    [560, 17.1],
    [760, 16.3],
    [900, 16],
    [880, 18.9],
    [700, 19.4],
    [480, 20.2],
    [240, 19.6],
    [160, 18.8],
  ]),
  bed('channel', 'Buried channel', 'gravel', [
    [612, 26.4],
    [630, 20.2],
    [668, 17.8],
    [700, 20.4],
    [716, 26.9],
  ]),
  bed('peat', 'Peat of the hollow', 'peat', [
    [596, 30.2],
    [620, 27.6],
    [668, 27],
    [702, 28.2],
    [716, 30.4],
  ]),
  bed('silt-west', 'Flood silt, west', 'silt', [
    [-5, 22.9],
    [80, 23.2],
    [128, 24.6],
    [132, 28.6],
    [-5, 28.6],
  ]),
  bed('silt-east', 'Flood silt, east', 'silt', [
    [1068, 20.4],
    [1140, 19.6],
    [1205, 19.2],
    [1205, 26.5],
    [1072, 26.9],
  ]),
  bed('lens', 'Silt lens', 'silt', [
    [836, 21.6],
    [902, 21],
    [968, 21.4],
    [940, 22.9],
    [862, 23.1],
  ]),
  bed('fill', 'Quarry fill', 'fill', [
    [742, 32],
    [752, 24.8],
    [806, 24.2],
    [822, 32],
  ]),
]

/** The section through the whole valley floor, with everything the boreholes found. */
export const wholeValley: Section = {
  format: 'doab.section',
  version: 1,
  title: 'Section 6, across the Amble valley floor',
  datum: 'm above valley datum',
  ground,
  base,
  left: { kind: 'water', x: 0, name: 'River Amble', stage: 23.1, conductance: 2.4, bed: 21.4 },
  right: { kind: 'water', x: 1200, name: 'Sallow Beck', stage: 21.2, conductance: 1.1, bed: 20.1 },
  materials: [
    { id: 'terrace', name: 'Terrace sand', k: 4.2, anisotropy: 3, specificYield: 0.2, porosity: 0.3 },
    { id: 'gravel', name: 'Gravel', k: 22, anisotropy: 3, specificYield: 0.25, porosity: 0.27 },
    { id: 'sand', name: 'Medium sand', k: 8, anisotropy: 2, specificYield: 0.23, porosity: 0.32 },
    { id: 'silt', name: 'Flood silt', k: 0.12, anisotropy: 8, specificYield: 0.07, porosity: 0.42 },
    { id: 'clay', name: 'Lake clay', k: 0.0008, anisotropy: 10, specificYield: 0.02, porosity: 0.48 },
    { id: 'peat', name: 'Peat', k: 0.2, anisotropy: 4, specificYield: 0.14, porosity: 0.7 },
    { id: 'fill', name: 'Quarry fill', k: 1.1, anisotropy: 1, specificYield: 0.12, porosity: 0.35 },
  ],
  host: 'terrace',
  bodies,
  recharge: [
    { id: 'west', name: 'West meadows', from: 0, to: 300, rate: 0.0007 },
    { id: 'arable', name: 'Arable', from: 300, to: 590, rate: 0.0009 },
    { id: 'hollow', name: 'Wet hollow, evaporation', from: 590, to: 720, rate: -0.0004 },
    { id: 'quarry', name: 'Restored quarry', from: 720, to: 830, rate: 0.0012 },
    { id: 'east', name: 'East meadows', from: 830, to: 1200, rate: 0.0007 },
  ],
  features: [
    { id: 'catch', kind: 'ditch', name: 'Catch ditch', x: 168, level: 23.6, conductance: 0.5 },
    { id: 'lode', kind: 'ditch', name: 'Hollow lode', x: 654, level: 23.6, conductance: 0.3 },
    { id: 'tile', kind: 'drain', name: 'Deep drain, east field', x: 1010, level: 24, conductance: 0.35 },
    { id: 'wells', kind: 'trench', name: 'Village wells', x: 872, rate: 0.12 },
    { id: 'wall', kind: 'wall', name: 'Quarry slurry wall', x: 734, thickness: 0.6, k: 0.004 },
  ],
  observations: [
    { id: 'a1', name: 'A-1', x: 105, head: 23.65, date: '2026-05-20', sd: 0.08 },
    { id: 'a2', name: 'A-2', x: 285, head: 23.74, date: '2026-05-20', sd: 0.08 },
    { id: 'a3', name: 'A-3', x: 465, head: 23.9, date: '2026-05-20', sd: 0.08 },
    { id: 'a4', name: 'A-4', x: 690, head: 23.58, date: '2026-05-20', sd: 0.08 },
    { id: 'a5', name: 'A-5', x: 795, head: 22.7, date: '2026-05-20', sd: 0.08 },
    { id: 'a6', name: 'A-6', x: 1095, head: 22.06, date: '2026-05-20', sd: 0.08 },
  ],
  limits: [
    { id: 'chapel', name: 'Chapel crypt', from: 392, to: 410, level: 29.4, clearance: 0.5 },
    { id: 'liner', name: 'Quarry fill, underside', from: 752, to: 806, level: 24.2, clearance: 1 },
    { id: 'roots', name: 'Root zone, east field', from: 960, to: 1050, level: 26.4, clearance: 0.3 },
  ],
  cases: [
    {
      id: 'wet',
      name: 'Wet spring',
      note: 'Both rivers at bank, recharge of the wettest March in twenty years',
      off: [],
      set: {
        'left.stage': 24.2,
        'right.stage': 22.3,
        'recharge.west.rate': 0.0016,
        'recharge.arable.rate': 0.0019,
        'recharge.hollow.rate': 0.0006,
        'recharge.east.rate': 0.0016,
      },
    },
    { id: 'dry', name: 'Dry autumn', off: [], set: { 'left.stage': 22.5, 'recharge.hollow.rate': -0.0009 } },
    { id: 'nowells', name: 'Wells closed', off: ['wells'], set: {} },
    { id: 'nowall', name: 'Before the slurry wall', off: ['wall'], set: {} },
  ],
  sources: {
    ground: 'level survey of 2025, every 30 m',
    base: 'boreholes A-1 to A-6, straight between them',
    'left.stage': 'river gauge at Amble Bridge, median',
    'right.stage': 'levelled 20 May 2026',
    'left.conductance': 'fitted to A-1, flood of February 2026',
    'materials.terrace.k': 'pumping test TB-2',
    'materials.gravel.k': 'pumping test of the village wells',
    'materials.clay.k': 'laboratory, two samples',
    'materials.fill.k': 'assumed',
    'features.wells.rate': 'licence returns, mean of five years, spread over the well field’s length',
    'features.wall.k': 'contractor’s panel tests',
    'recharge.arable.rate': 'soil-water budget, ten-year mean',
  },
  surfaceSeepage: true,
}
