import { readAt } from '../index'
import { answerOf, inputFor, outflow, placeOfHead, strip } from './strip'
import type { PublishedCase } from './types'

const DAY = 86_400
const YEAR = 365

/** Strips between two waters over a level base (facts from the list of checks, T1). */
export const twoWaters: PublishedCase[] = [
  {
    id: 'T1-01',
    title: 'Two drains, no recharge',
    source: 'ABELE 1st Ed Vol II Answer Key, agricultural engineering board review, pp 71-136',
    kind: 'published',
    fromMemory: false,
    compare: () => {
      const solution = answerOf(strip({ length: 1000, k: 12, left: 10, right: 8 }))
      const q = readAt(solution, 500).flow
      return [
        { name: 'q', unit: 'm³/h per m', theirs: 0.009, tolerance: 5e-5, ours: q / 24 },
        { name: 'q', unit: 'm²/d', theirs: 0.216, tolerance: 1e-9, ours: q },
      ]
    },
  },
  {
    id: 'T1-04',
    title: 'Sand aquifer between two wells, no recharge (book rounding K = 1.7)',
    source: 'C.W. Fetter, Applied Hydrogeology (3rd/4th ed.), ch. 4 unconfined-flow example',
    kind: 'published',
    fromMemory: true,
    compare: () => {
      const solution = answerOf(strip({ length: 175, k: 1.7, left: 10, right: 7.5 }))
      const first = readAt(solution, 0)
      return [
        { name: 'q', unit: 'm²/d', theirs: 0.21, tolerance: 0.005, ours: first.flow },
        { name: 'v at h1', unit: 'm/d', theirs: 0.079, tolerance: 0.001, ours: first.flow / (0.27 * first.saturated) },
        { name: 'h mid', unit: 'm', theirs: 8.8, tolerance: 0.05, ours: readAt(solution, 87.5).head },
      ]
    },
  },
  {
    id: 'T1-05',
    title: 'Canal parallel to a river (feet; book rounding w = 0.0014)',
    source: 'C.W. Fetter, Applied Hydrogeology, ch. 4 example (canal and river)',
    kind: 'exercise',
    fromMemory: true,
    compare: () => {
      const solution = answerOf(strip({ length: 1500, k: 1.2, left: 31, right: 27, w: 0.0014 }))
      return [
        { name: 'divide', unit: 'ft', theirs: 684, tolerance: 0.5, ours: solution.divides[0]?.from ?? Number.NaN },
        { name: 'h max', unit: 'ft', theirs: 38.8, tolerance: 0.05, ours: solution.highest.head },
        { name: 'river', unit: 'ft³/d per 1000 ft', theirs: 957, tolerance: 1, ours: 1000 * outflow(solution, 'left') },
        {
          name: 'canal',
          unit: 'ft³/d per 1000 ft',
          theirs: 1143,
          tolerance: 1,
          ours: 1000 * outflow(solution, 'right'),
        },
      ]
    },
  },
  {
    id: 'T1-06',
    title: 'Two rivers 1000 m apart, net recharge 5 cm/yr',
    source: 'Bedient, Rifai & Newell, Ground Water Contamination, ch. 2 example (two rivers)',
    kind: 'exercise',
    fromMemory: true,
    compare: () => {
      const solution = answerOf(strip({ length: 1000, k: 0.5, left: 20, right: 18, w: 0.05 / YEAR }))
      return [
        { name: 'divide', unit: 'm', theirs: 361.2, tolerance: 0.2, ours: solution.divides[0]?.from ?? Number.NaN },
        { name: 'h max', unit: 'm', theirs: 20.9, tolerance: 0.05, ours: solution.highest.head },
        { name: 'river 1', unit: 'm³/d per km', theirs: 49.5, tolerance: 0.1, ours: 1000 * outflow(solution, 'left') },
        { name: 'river 2', unit: 'm³/d per km', theirs: 87.5, tolerance: 0.1, ours: 1000 * outflow(solution, 'right') },
      ]
    },
  },
  {
    id: 'T1-07',
    title: 'Two rivers, 10 m and 5 m',
    source: 'transtutors.com/questions/...13408969 (problem statement only)',
    kind: 'exercise',
    fromMemory: false,
    compare: () => {
      const solution = answerOf(strip({ length: 1000, k: 21.3, left: 10, right: 5, w: 0.002 }))
      return [
        { name: 'divide', unit: 'm', theirs: 100.625, tolerance: 1e-6, ours: solution.divides[0]?.from ?? Number.NaN },
        { name: 'h max', unit: 'm', theirs: 10.04742, tolerance: 1e-5, ours: solution.highest.head },
        { name: 'q1', unit: 'm²/d', theirs: 0.20125, tolerance: 1e-9, ours: outflow(solution, 'left') },
        { name: 'q2', unit: 'm²/d', theirs: 1.79875, tolerance: 1e-9, ours: outflow(solution, 'right') },
      ]
    },
  },
  {
    id: 'T1-08',
    title: 'Two lakes 1200 m apart',
    source: 'askfilo.com ...3438333536363535 (problem; worked answer shown without its figures)',
    kind: 'exercise',
    fromMemory: false,
    compare: () => {
      const solution = answerOf(strip({ length: 1200, k: 5, left: 10, right: 8, w: 0.002 }))
      return [
        { name: 'divide', unit: 'm', theirs: 562.5, tolerance: 1e-9, ours: solution.divides[0]?.from ?? Number.NaN },
        { name: 'h max', unit: 'm', theirs: 15.05199, tolerance: 1e-5, ours: solution.highest.head },
        { name: 'q1', unit: 'm²/d', theirs: 1.125, tolerance: 1e-9, ours: outflow(solution, 'left') },
        { name: 'q2', unit: 'm²/d', theirs: 1.275, tolerance: 1e-9, ours: outflow(solution, 'right') },
      ]
    },
  },
  {
    id: 'T1-09',
    title: 'Largest recharge that keeps a crest below a limit',
    source: 'transtutors.com/questions/...3554433 (problem c; answer ours)',
    kind: 'exercise',
    fromMemory: false,
    compare: () => {
      const crest = (w: number) => answerOf(strip({ length: 50, k: 0.8, left: 2.5, right: 2.5, w })).highest.head
      return [{ name: 'w', unit: 'm/d', theirs: 0.01248, tolerance: 1e-9, ours: inputFor(crest, 4, 1e-4, 0.1) }]
    },
  },
  {
    id: 'T1-11',
    title: 'Drains above an impervious stratum (ellipse), spacing',
    source:
      'Punmia & Lal, Irrigation and Water Power Engineering, Example 16.5 (FOSSEE/Scilab-TBC-Uploads 2087/CH16/EX16.5)',
    kind: 'published',
    fromMemory: false,
    compare: () => {
      const crest = (length: number) =>
        answerOf(strip({ length, k: 1e-4 * DAY, left: 8.2, right: 8.2, w: 0.008 })).highest.head
      return [{ name: 'spacing', unit: 'm', theirs: 147, tolerance: 0.5, ours: inputFor(crest, 8.5, 10, 500) }]
    },
  },
  {
    id: 'T1-12',
    title: 'Permeability from drain flow',
    source: 'Punmia & Lal, Example 16.6 (FOSSEE/Scilab-TBC-Uploads 2087/CH16/EX16.6)',
    kind: 'published',
    fromMemory: false,
    compare: () => {
      // Both sides give the drain 4e-6 m³/s per m: over the spacing that is the recharge.
      const w = (4e-6 * DAY) / 30
      const crest = (k: number) => answerOf(strip({ length: 30, k: k * DAY, left: 8, right: 8, w })).highest.head
      return [{ name: 'k', unit: 'm/s', theirs: 6.13e-6, tolerance: 6e-9, ours: inputFor(crest, 8.3, 1e-7, 1e-3) }]
    },
  },
  {
    id: 'T1-13',
    title: 'Rainfall that a drain system can carry',
    source: 'Punmia & Lal, Example 16.7 (FOSSEE/Scilab-TBC-Uploads 2087/CH16/EX16.7)',
    kind: 'published',
    fromMemory: false,
    compare: () => {
      const crest = (rainfall: number) =>
        answerOf(strip({ length: 50, k: 1e-5 * DAY, left: 10, right: 10, w: (0.01 * rainfall) / 100 })).highest.head
      return [{ name: 'P', unit: 'cm/yr', theirs: 84, tolerance: 0.5, ours: inputFor(crest, 10.3, 1, 500) }]
    },
  },
  {
    id: 'T1-14',
    title: 'Drain spacing over an impervious layer at 8 m',
    source: 'Exercise for a college course, github.com/Adgoai/sowiso WaterII/Dag5 opgave 7-8',
    kind: 'exercise',
    fromMemory: false,
    compare: () => {
      const crest = (length: number) =>
        answerOf(strip({ length, k: 4e-6 * DAY, left: 6.9, right: 6.9, w: 0.017 })).highest.head
      return [{ name: 'spacing', unit: 'm', theirs: 10.63, tolerance: 0.005, ours: inputFor(crest, 7, 1, 100) }]
    },
  },
  {
    id: 'T10-03',
    title: 'Strip between rivers with bed resistance, symmetric',
    source: 'exact Dupuit with Robin ends; numbers ours',
    kind: 'derived',
    fromMemory: false,
    compare: () => {
      const bank = (x: number) => ({ kind: 'water', x, stage: 8, conductance: 0.5, bed: null }) as const
      const solution = answerOf(
        strip({ length: 500, k: 10, left: 8, right: 8, w: 0.001, more: { left: bank(0), right: bank(500) } }),
      )
      return [
        { name: 'h at bank', unit: 'm', theirs: 8.5, tolerance: 1e-12, ours: readAt(solution, 0).head },
        { name: 'h mid', unit: 'm', theirs: 8.8600226, tolerance: 1e-6, ours: readAt(solution, 250).head },
      ]
    },
  },
  {
    id: 'T6-01',
    title: 'Discharge of a dam with vertical faces (the Dupuit discharge is exact there)',
    source: 'Charny (1951); Polubarinova-Kochina (1962)',
    kind: 'published',
    fromMemory: true,
    compare: () => {
      const solution = answerOf(strip({ length: 16, k: 1, left: 24, right: 4 }))
      return [{ name: 'q', unit: 'K-units', theirs: 17.5, tolerance: 1e-12, ours: readAt(solution, 8).flow }]
    },
  },
  {
    id: 'T6-06',
    title: 'Dupuit surface at mid width of two dams (the two-dimensional surface lies above it)',
    source: 'Dupuit values given beside a two-dimensional solution in the list of checks; numbers ours',
    kind: 'derived',
    fromMemory: false,
    compare: () => {
      const a = answerOf(strip({ length: 16, k: 1, left: 24, right: 4 }))
      const b = answerOf(strip({ length: 0.5, k: 1, left: 1, right: 0.5 }))
      return [
        { name: 'A', unit: 'm', theirs: 17.2047, tolerance: 1e-4, ours: readAt(a, 8).head },
        { name: 'B', unit: '-', theirs: 0.790569, tolerance: 1e-6, ours: readAt(b, 0.25).head },
      ]
    },
  },
  {
    id: 'T1-15',
    title: 'Confined-to-unconfined change along a strip, as a far tighter cover',
    source: "Environmental Engineers' Handbook sec. 9.5 (after Strack 1989), potential method; numbers ours",
    kind: 'derived',
    fromMemory: false,
    compare: () => {
      // The model has no confined ground; a cover 1e-9 times as pervious carries nothing and stands for it.
      const section = strip({
        length: 1000,
        k: 1,
        left: 14,
        right: 6,
        more: {
          materials: [
            { id: 'sand', k: 1 },
            { id: 'cover', k: 1e-9 },
          ],
          bodies: [
            {
              id: 'cover',
              material: 'cover',
              outline: [
                [-10, 10],
                [1010, 10],
                [1010, 500],
                [-10, 500],
              ],
            },
          ],
        },
      })
      const solution = answerOf(section)
      return [
        {
          name: 'x where the head leaves the cover',
          unit: 'm',
          theirs: 555.5556,
          tolerance: 0.001,
          ours: placeOfHead(solution, 10, 0, 1000),
        },
        { name: 'q/K', unit: 'm', theirs: 0.072, tolerance: 1e-9, ours: readAt(solution, 500).flow },
      ]
    },
  },
]
