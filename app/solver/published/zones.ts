import type { Body, Section } from '~/section'
import { readAt } from '../index'
import { rain, water } from '../testing'
import { answerOf, placeOfHead, strip } from './strip'
import type { PublishedCase } from './types'

const block = (id: string, material: string, from: number, to: number, z0: number, z1: number): Body => ({
  id,
  material,
  outline: [
    [from, z0],
    [to, z0],
    [to, z1],
    [from, z1],
  ],
})

/** Vertical zones side by side, each over the full height. */
function zones(list: { to: number; k: number }[], left: number, right: number): Section {
  const length = list[list.length - 1]?.to ?? 0
  return strip({
    length,
    k: 1,
    left,
    right,
    more: {
      materials: list.map(({ k }, i) => ({ id: `z${i}`, k })),
      host: 'z0',
      bodies: list.slice(1).map(({ to }, i) => block(`b${i}`, `z${i + 1}`, list[i]?.to ?? 0, to, -100, 10_000)),
    },
  })
}

/** A lower layer up to z, another above it. */
function twoLayers(
  lower: number,
  upper: number,
  z: number,
  length: number,
  left: number,
  right: number,
  w = 0,
): Section {
  return strip({
    length,
    k: 1,
    left,
    right,
    w,
    more: {
      materials: [
        { id: 'upper', k: upper },
        { id: 'lower', k: lower },
      ],
      host: 'upper',
      bodies: [block('lower', 'lower', -10, length + 10, -10, z)],
    },
  })
}

/** One material on a base that falls to the right. */
function slope(length: number, fall: number, k: number, upstream: number, downstream: number): Section {
  return strip({
    length,
    k,
    left: 0,
    right: 0,
    more: {
      base: [
        [0, fall],
        [length, 0],
      ],
      left: water(0, fall + upstream),
      right: water(length, downstream),
      ground: [
        [0, fall + 50],
        [length, 50],
      ],
    },
  })
}

/** Zones, layers and sloping bases (facts from the list of checks, T2). */
export const zonesAndSlopes: PublishedCase[] = [
  {
    id: 'T2-01',
    title: 'Two zones in series (feet)',
    source: 'problem: tutorbin.com (two-soil reach); method: NPTEL Groundwater Hydrology lect. 9 eq. 9.13-9.14',
    kind: 'exercise',
    fromMemory: false,
    compare: () => {
      const solution = answerOf(
        zones(
          [
            { to: 2000, k: 10 },
            { to: 5000, k: 9 },
          ],
          50,
          45,
        ),
      )
      return [
        { name: 'q', unit: 'ft²/d', theirs: 0.4453125, tolerance: 1e-6, ours: readAt(solution, 100).flow },
        { name: 'h at the contact', unit: 'ft', theirs: 48.18584, tolerance: 1e-4, ours: readAt(solution, 2000).head },
      ]
    },
  },
  {
    id: 'T2-02',
    title: 'Three zones in series (confined slab), as a slab under a far tighter cover',
    source: 'GATE 2016 Civil Engineering Q56, gate-exam.in/CE/Civil-GATE-2016-Question-56',
    kind: 'published',
    fromMemory: false,
    compare: () => {
      // 3 m of aquifer in three zones; the heads stand far above it in a cover that carries nothing.
      const section = zones(
        [
          { to: 20, k: 2 },
          { to: 50, k: 3 },
          { to: 60, k: 1 },
        ],
        105,
        100,
      )
      section.materials.push({ id: 'cover', k: 1e-12 })
      section.bodies.push(block('cover', 'cover', -10, 70, 3, 10_000))
      const q = readAt(answerOf(section), 10).flow
      return [
        { name: 'q', unit: 'm²/d', theirs: 0.5, tolerance: 1e-9, ours: q },
        { name: 'K equivalent', unit: 'm/d', theirs: 2, tolerance: 1e-9, ours: (q * 60) / (3 * 5) },
      ]
    },
  },
  {
    id: 'T2-03',
    title: 'Three zones incl. a tight core',
    source: 'closed form as T2-01; numbers ours',
    kind: 'derived',
    fromMemory: false,
    compare: () => {
      const solution = answerOf(
        zones(
          [
            { to: 300, k: 12 },
            { to: 400, k: 1.5 },
            { to: 1000, k: 25 },
          ],
          12,
          8,
        ),
      )
      return [
        { name: 'q', unit: 'm²/d', theirs: 0.3458213, tolerance: 1e-7, ours: readAt(solution, 500).flow },
        { name: 'h at 300', unit: 'm', theirs: 11.256506, tolerance: 1e-6, ours: readAt(solution, 300).head },
        { name: 'h at 400', unit: 'm', theirs: 8.977718, tolerance: 1e-6, ours: readAt(solution, 400).head },
      ]
    },
  },
  {
    id: 'T2-06',
    title: 'Water table leaving the upper layer',
    source: 'CE 473/573 Groundwater, Fall 2010 homework 3 no. 16 gives the matching of flows; numbers ours',
    kind: 'derived',
    fromMemory: false,
    compare: () => {
      const solution = answerOf(twoLayers(20, 5, 6, 800, 9, 4))
      const q = readAt(solution, 400).flow
      return [
        {
          name: 'x where it leaves',
          unit: 'm',
          theirs: 525.3219,
          tolerance: 0.001,
          ours: placeOfHead(solution, 6, 0, 800),
        },
        { name: 'q', unit: 'm²/d', theirs: 0.728125, tolerance: 1e-8, ours: q },
      ]
    },
  },
  {
    id: 'T2-07',
    title: 'Two layers with recharge between equal stages (Girinskii)',
    source: 'Girinskii potential (collections.lib.utah.edu/details?id=1145055, after Halek & Svec 1979); numbers ours',
    kind: 'derived',
    fromMemory: false,
    compare: () => {
      const solution = answerOf(twoLayers(15, 2, 3, 200, 5, 5, 0.004))
      return [{ name: 'h mid', unit: 'm', theirs: 5.404819, tolerance: 1e-6, ours: readAt(solution, 100).head }]
    },
  },
  {
    id: 'T2-08',
    title: 'Sloping base, rising (backwater) profile; tolerance of the general path (0.01 %)',
    source: 'Pavlovsky / Polubarinova-Kochina closed form x i = h2-h1 + hn ln((h2-hn)/(h1-hn)); numbers ours',
    kind: 'derived',
    fromMemory: true,
    compare: () => {
      const q = readAt(answerOf(slope(500, 5, 10, 4, 6)), 250).flow
      return [
        { name: 'q', unit: 'm²/d', theirs: 0.2898293, tolerance: 3e-5, ours: q },
        { name: 'normal depth', unit: 'm', theirs: 2.898293, tolerance: 3e-4, ours: q / (10 * 0.01) },
      ]
    },
  },
  {
    id: 'T2-09',
    title: 'Sloping base, falling (drawdown) profile; tolerance of the general path (0.01 %)',
    source: 'as T2-08',
    kind: 'derived',
    fromMemory: true,
    compare: () => {
      const q = readAt(answerOf(slope(500, 5, 10, 6, 3)), 250).flow
      return [
        { name: 'q', unit: 'm²/d', theirs: 0.7612806, tolerance: 8e-5, ours: q },
        { name: 'normal depth', unit: 'm', theirs: 7.612806, tolerance: 8e-4, ours: q / (10 * 0.01) },
      ]
    },
  },
  {
    id: 'T2-10',
    title: 'Recharge on a sloping base, free toe',
    source: 'Henderson & Wooding (1964) steady equation K h(i-dh/dx) = w x; solved by us',
    kind: 'derived',
    fromMemory: true,
    compare: () => {
      const section: Section = {
        ...slope(100, 5, 10, 0, 0),
        left: { kind: 'no-flow', x: 0 },
        recharge: [rain(0, 100, 0.002)],
      }
      const { profile } = answerOf(section)
      let at = 0
      profile.saturated.forEach((s, i) => {
        if (s > (profile.saturated[at] ?? 0)) at = i
      })
      return [
        { name: 'thickest', unit: 'm', theirs: 0.34178, tolerance: 2e-4, ours: profile.saturated[at] ?? Number.NaN },
        { name: 'x of it', unit: 'm', theirs: 85.45, tolerance: 0.1, ours: profile.x[at] ?? Number.NaN },
      ]
    },
  },
]
