import type { World } from '../scene'
import type { Context, Sample } from './context'

const at = { panel: 'section', layer: 'water' } as const

/** Saturated ground, the water table, what seeps and what is dry, and the straight line for comparison. */
export function composeWater(context: Context): void {
  const { solution, samples, items, left, right, clips, say } = context
  if (solution.status !== 'solved' || samples.length < 2) return
  const table: World[] = samples.map(({ x, head }) => ({ x, z: head }))
  const ring = [...table, ...[...samples].reverse().map(({ x, base }) => ({ x, z: base }))]
  clips.push({ id: 'wet', panel: 'section', ring })
  items.push({
    ...at,
    kind: 'area',
    id: 'saturated',
    of: 'result.saturated',
    role: 'saturated',
    rings: [ring],
    hatch: 'none',
  })
  items.push({
    ...at,
    kind: 'path',
    id: 'straight',
    of: 'result.straight',
    role: 'straight-line',
    closed: false,
    label: 'Straight line between the banks',
    points: [
      { x: left, z: solution.straight.left },
      { x: right, z: solution.straight.right },
    ],
  })
  for (const [i, reach] of solution.seepage.entries()) {
    const line = between(samples, reach.from, reach.to).map(({ x, ground }) => ({ x, z: ground }))
    if (line.length > 1)
      items.push({
        ...at,
        layer: 'results',
        kind: 'path',
        id: `seepage-${i}`,
        of: `result.seepage.${i}`,
        role: 'seepage',
        points: line,
        closed: false,
        label: 'Surface seepage',
      })
    items.push({
      ...at,
      layer: 'results',
      kind: 'symbol',
      symbol: 'spring',
      id: `spring-${i}`,
      of: `result.seepage.${i}`,
      role: 'water-table',
      at: mid(line, reach.from, samples),
    })
    items.push({
      ...at,
      layer: 'results',
      kind: 'text',
      id: `seepage-${i}-text`,
      of: `result.seepage.${i}`,
      role: 'text-water',
      at: mid(line, reach.from, samples),
      shift: { dx: 1, dy: -4.2 },
      text: `seeps out ${say(reach.rate, 'flow')}`,
      size: 2.5,
      weight: 500,
      anchor: 'start',
      base: 'bottom',
      priority: 5,
    })
  }
  for (const [i, reach] of solution.dry.entries()) {
    const line = between(samples, reach.from, reach.to).map(({ x, base }) => ({ x, z: base }))
    if (line.length > 1)
      items.push({
        ...at,
        layer: 'results',
        kind: 'path',
        id: `dry-${i}`,
        of: `result.dry.${i}`,
        role: 'dry',
        points: line,
        closed: false,
        label: 'Dry reach',
      })
  }
  items.push({
    ...at,
    kind: 'path',
    id: 'water-table',
    of: 'result.water-table',
    role: 'water-table',
    points: table,
    closed: false,
    label: 'Water table',
  })
  const spot = openSpot(context)
  if (spot)
    items.push({
      ...at,
      kind: 'symbol',
      symbol: 'water-table',
      id: 'water-table-mark',
      of: 'result.water-table',
      role: 'water-table',
      at: { x: spot.x, z: spot.head },
    })
}

const between = (samples: Sample[], from: number, to: number) =>
  samples.filter(({ x }) => x >= from - 1e-9 && x <= to + 1e-9)
function mid(line: World[], x: number, samples: Sample[]): World {
  const found = line[Math.floor(line.length / 2)]
  if (found) return found
  const near = samples.reduce((best, next) => (Math.abs(next.x - x) < Math.abs(best.x - x) ? next : best))
  return { x: near.x, z: near.ground }
}

/** Where the mark of the water table stands clear of works, observations, limits and divides. */
function openSpot({ section, solution, samples, left, right }: Context): Sample | undefined {
  if (solution.status !== 'solved') return undefined
  const busy = [
    ...section.features.map(({ x }) => [x, x]),
    ...section.observations.map(({ x }) => [x, x]),
    ...section.limits.map(({ from, to }) => [from, to]),
    ...solution.divides.map(({ from, to }) => [from, to]),
    ...solution.seepage.map(({ from, to }) => [from, to]),
  ] as [number, number][]
  const room = (x: number) => Math.min(right - left, ...busy.map(([a, b]) => Math.max(a - x, x - b, 0)))
  const tries = [0.36, 0.6, 0.25, 0.7, 0.48, 0.16, 0.82].map((part) => left + part * (right - left))
  const x = tries.find((at) => room(at) > (right - left) * 0.06) ?? tries.reduce((a, b) => (room(b) > room(a) ? b : a))
  return samples.reduce((best, next) => (Math.abs(next.x - x) < Math.abs(best.x - x) ? next : best))
}
