import type { Section } from '~/section'

/** A body of silt holds the water up under a house: the cellar floor is wet, and the drain as planned would cure it. */
export const siltAndCellar: Section = {
  format: 'doab.section',
  version: 1,
  title: 'Section 3, silt under the mill house',
  datum: 'm above valley datum',
  ground: [
    [0, 12.4],
    [10, 13.6],
    [55, 14.1],
    [110, 14.4],
    [165, 14],
    [205, 13.2],
    [220, 12.3],
  ],
  base: [
    [0, 4.2],
    [120, 4],
    [220, 3.6],
  ],
  left: { kind: 'water', x: 0, name: 'Mill leat', stage: 11.6, conductance: null, bed: null },
  right: { kind: 'water', x: 220, name: 'Teasel Brook', stage: 10.7, conductance: 0.9, bed: 9.8 },
  materials: [
    { id: 'sand', name: 'Silty sand', k: 1.8, anisotropy: 5, specificYield: 0.17, porosity: 0.32 },
    { id: 'silt', name: 'Lake silt', k: 0.06, anisotropy: 8, specificYield: 0.06, porosity: 0.44 },
  ],
  host: 'sand',
  bodies: [
    {
      id: 'silt',
      name: 'Filled-in mill pond',
      material: 'silt',
      outline: [
        [86, 14.6],
        [90, 7.2],
        [118, 4.9],
        [150, 6.2],
        [158, 14.6],
      ],
    },
  ],
  recharge: [
    { id: 'gardens', name: 'Gardens', from: 0, to: 140, rate: 0.0012 },
    { id: 'paddock', name: 'Paddock', from: 140, to: 220, rate: 0.0009 },
  ],
  features: [],
  observations: [
    { id: 'm1', name: 'M-1', x: 60, head: 11.97, date: '2026-02-20', sd: 0.05 },
    { id: 'm2', name: 'M-2', x: 178, head: 11.15, date: '2026-02-20', sd: 0.05 },
  ],
  limits: [{ id: 'cellar', name: 'Mill house cellar floor', from: 92, to: 108, level: 12.1, clearance: 0.3 }],
  cases: [
    {
      id: 'wet',
      name: 'Wet spring',
      off: [],
      set: { 'recharge.gardens.rate': 0.002, 'recharge.paddock.rate': 0.0016 },
    },
    { id: 'leat', name: 'Leat lowered', off: [], set: { 'left.stage': 10.6 } },
  ],
  sources: {
    'materials.sand.k': 'slug tests M-1 and M-2',
    'materials.silt.k': 'laboratory, one tube sample',
    'limits.cellar.level': 'levelled from the mill house step',
    'bodies.silt': 'trial pits TP-4 to TP-7 and the estate map of 1838',
    'recharge.gardens.rate': 'soil-water budget with garden watering',
  },
  surfaceSeepage: true,
}
