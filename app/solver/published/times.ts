import { ageAt, travelTime } from '../index'
import { answerOf, strip } from './strip'
import type { PublishedCase } from './types'

const YEAR = 365.25
const sand = (k: number, porosity: number) => ({ materials: [{ id: 'sand', k, porosity }] })

/** Travel times and ages (facts from the list of checks, T5). */
export const times: PublishedCase[] = [
  {
    id: 'T5-02',
    title: 'Vogel age profile under a divide, n = 0.3, D = 20 m, N = 0.3 m/yr',
    source: 'Vogel (1967) relation t = (n D/N) ln(D/z); values ours',
    kind: 'derived',
    fromMemory: false,
    compare: () => {
      // A very wide conductivity keeps the water table level at 20 m; the divide is at the middle.
      const solution = answerOf(
        strip({ length: 200, k: 1e4, left: 20, right: 20, w: 0.3 / YEAR, more: sand(1e4, 0.3) }),
      )
      return (
        [
          [18, 2.10721],
          [15, 5.75364],
          [10, 13.86294],
          [5, 27.72589],
          [2, 46.0517],
        ] as const
      ).map(([z, theirs]) => ({
        name: `age(z=${z})`,
        unit: 'yr',
        theirs,
        tolerance: 1e-4 * theirs,
        ours: (ageAt(solution, 100, z) ?? Number.NaN) / YEAR,
      }))
    },
  },
  {
    id: 'T5-04',
    title: 'From 10 m to the bank at 100 m with recharge, divide at 0 (n = 0.3, K = 1 m/d, w = 1 mm/d)',
    source: 'Chesnaux, Molson & Chapuis (2005) closed form; number ours',
    kind: 'derived',
    fromMemory: true,
    compare: () => {
      const solution = answerOf(
        strip({
          length: 100,
          k: 1,
          left: 5,
          right: 5,
          w: 1e-3,
          more: { ...sand(1, 0.3), left: { kind: 'no-flow', x: 0 } },
        }),
      )
      const ours = travelTime(solution, 10).days ?? Number.NaN
      return [{ name: 't(10→100)', unit: 'd', theirs: 3956.1503, tolerance: 0.001, ours }]
    },
  },
  {
    id: 'METHODS-3',
    title: 'Bank to bank without recharge, t = 4nL²(h₁³−h₂³)/(3K(h₁²−h₂²)²)',
    source: 'closed form of the mean velocity over a level base; number ours',
    kind: 'derived',
    fromMemory: false,
    compare: () => {
      const solution = answerOf(strip({ length: 300, k: 6, left: 9, right: 4, more: sand(6, 0.25) }))
      const theirs = (4 * 0.25 * 300 ** 2 * (9 ** 3 - 4 ** 3)) / (3 * 6 * (81 - 16) ** 2)
      return [
        { name: 't', unit: 'd', theirs, tolerance: 1e-6 * theirs, ours: travelTime(solution, 1e-9).days ?? Number.NaN },
      ]
    },
  },
]
