import fc from 'fast-check'
import type { Section } from '~/section'
import { arrows, flowLines, footing, readAt, type SolveOptions, solveSteady, travelTime } from '~/solver'
import { rain, sectionOf, water } from '../../app/solver/testing'
import { drawable } from '../../app/solver/testing/arbitrary'

/** `npm run bench:solver`: medians on this machine beside what was asked for. */
type Row = { what: string; median: number; goal: number | null; note: string }

function median(run: () => unknown, seconds = 1): number {
  for (let i = 0; i < 200; i++) run()
  const times: number[] = []
  const end = performance.now() + seconds * 1000
  while (performance.now() < end || times.length < 20) {
    const start = performance.now()
    run()
    times.push(performance.now() - start)
  }
  times.sort((a, b) => a - b)
  return times[times.length >> 1] ?? Number.NaN
}

/** The size of a section somebody draws: two waters, three bodies, two zones, ditch, drain and wall, limits. */
const level: Section = sectionOf({
  left: water(0, 9.1, 0.8),
  right: water(300, 7.4),
  ground: Array.from({ length: 12 }, (_, i) => [(300 * i) / 11, 13 + Math.sin(i)] as [number, number]),
  base: [
    [0, 2],
    [300, 2],
  ],
  materials: [
    { id: 'sand', k: 8, porosity: 0.28 },
    { id: 'silt', k: 0.4, porosity: 0.35 },
    { id: 'gravel', k: 60, porosity: 0.25 },
  ],
  bodies: [band('b1', 'silt', 80, 110), band('b2', 'gravel', 180, 220), band('b3', 'silt', 250, 262)],
  recharge: [rain(0, 120, 0.0008), rain(120, 300, 0.0004, 'r2')],
  features: [
    { id: 'd1', kind: 'ditch', x: 150, level: 8.2, conductance: 2 },
    { id: 'd2', kind: 'drain', x: 170, level: 8.4, conductance: 0.5 },
    { id: 'w1', kind: 'wall', x: 210, thickness: 0.6, k: 0.01 },
  ],
  limits: [{ id: 'l1', from: 60, to: 80, level: 10.8, clearance: 0.5 }],
})
const sloping: Section = {
  ...level,
  base: [
    [0, 3],
    [60, 2.4],
    [140, 2.9],
    [230, 1.6],
    [300, 1.2],
  ],
  surfaceSeepage: true,
  bodies: [
    {
      id: 'lens',
      material: 'silt',
      outline: [
        [60, 5],
        [90, 4],
        [140, 4.4],
        [160, 5.5],
        [140, 7],
        [85, 6.8],
      ],
    },
    {
      id: 'sheet',
      material: 'gravel',
      outline: [
        [180, 3],
        [310, 2.5],
        [310, 4],
        [180, 4.6],
      ],
    },
    band('core', 'silt', 250, 262),
  ],
}

function band(id: string, material: string, from: number, to: number) {
  return {
    id,
    material,
    outline: [
      [from, -5],
      [to, -5],
      [to, 40],
      [from, 40],
    ] as [number, number][],
  }
}

function solved(section: Section, options: SolveOptions = {}) {
  const solution = solveSteady(section, options)
  if (solution.status !== 'solved') throw new Error(solution.reason.map(({ message }) => message).join(' '))
  return solution
}

const rows: Row[] = []
const exact = solved(level)
const general = solved(sloping)
rows.push({
  what: 'demo section, exact path',
  median: median(() => solveSteady(level)),
  goal: 0.5,
  note: exact.method.reason,
})
rows.push({
  what: 'demo section, general path',
  median: median(() => solveSteady(sloping)),
  goal: 1.5,
  note: `${general.error.nodes} nodes, ${general.error.refinements} refinements`,
})
rows.push({
  what: 'flow lines and arrows as the sheet asks for them',
  median: median(() => {
    flowLines(general, { tubes: 10, stations: 120 })
    arrows(general, { columns: 12, rows: 3 })
  }),
  goal: 4,
  note: '10 tubes, 36 arrows, general path',
})
rows.push({
  what: 'travel time from one spot',
  median: median(() => travelTime(general, 100)),
  goal: null,
  note: 'read at the reading line',
})
rows.push({ what: 'footing', median: median(() => footing(sloping, general)), goal: null, note: 'all lines' })
rows.push({
  what: 'same as exact, general path forced',
  median: median(() => solveSteady(level, { path: 'general' })),
  goal: null,
  note: '',
})
const many = solved(sloping, { nodes: 4000 })
rows.push({
  what: 'about 4,000 nodes',
  median: median(() => solveSteady(sloping, { nodes: 4000 }), 2),
  goal: 15,
  note: `${many.error.nodes} nodes`,
})
rows.push({ what: 'readAt, 1,000 places', median: median(() => readThousand()), goal: null, note: '' })
function readThousand() {
  let sum = 0
  for (let i = 0; i < 1000; i++) sum += readAt(general, (300 * i) / 1000).head
  return sum
}

const random = fc.sample(drawable, { numRuns: 500, seed: 7 })
const times = random.map((section) => {
  solveSteady(section)
  const start = performance.now()
  solveSteady(section)
  return performance.now() - start
})
times.sort((a, b) => a - b)
rows.push({
  what: '500 random sections, median',
  median: times[250] ?? 0,
  goal: null,
  note: `95 %: ${(times[475] ?? 0).toFixed(2)} ms`,
})

const wide = Math.max(...rows.map(({ what }) => what.length))
console.log(`${'median of one call'.padEnd(wide)}      ms    goal`)
for (const { what, median: ms, goal, note } of rows) {
  const verdict = goal === null ? '' : ms <= goal ? 'met' : 'NOT MET'
  console.log(
    `${what.padEnd(wide)}  ${ms.toFixed(3).padStart(6)}  ${(goal ?? '').toString().padStart(6)}  ${verdict.padEnd(8)} ${note}`,
  )
}

if (process.argv.includes('--memory')) {
  const heap = () => {
    globalThis.gc?.()
    return process.memoryUsage().heapUsed / 2 ** 20
  }
  for (let i = 0; i < 2000; i++) solveSteady(sloping)
  const start = heap()
  for (let i = 1; i <= 100_000; i++) {
    solveSteady(i % 2 ? level : sloping)
    if (i % 20_000 === 0) console.log(`after ${i} solves: heap ${heap().toFixed(1)} MiB (start ${start.toFixed(1)})`)
  }
}
