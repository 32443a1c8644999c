import type { FlowLine, Solution, Solved } from '../types'
import { heightOf, materialAt, type Station, stationAt } from './stream'

export type FlowLineOptions = {
  /** Tubes that the largest discharge is cut into; each carries max|q| / tubes. */
  tubes?: number
  /** Stations along the strip, besides the breaks. */
  stations?: number
}

/**
 * Flow lines as contours of the stream function at equal steps, so that each tube between neighbours carries the same flow.
 * Lines are drawn in the middle of their tube and run with the flow; those born on the water table carry recharge.
 *
 * @returns paths in metres with the time since entering in days (NaN where a porosity is missing). Empty when nothing flows.
 */
export function flowLines(solution: Solution, { tubes = 12, stations = 240 }: FlowLineOptions = {}): FlowLine[] {
  if (solution.status !== 'solved') return []
  const row = stationsAlong(solution, stations)
  const most = row.reduce((max, { flow }) => Math.max(max, Math.abs(flow)), 0)
  if (!(most > 0)) return []
  const tube = most / tubes
  const lines: FlowLine[] = []
  for (const sign of [1, -1] as const)
    for (let n = 0; n < tubes; n++) lines.push(...contours(solution, row, sign, (n + 0.5) * tube, tube))
  return lines
}

/** Stations with both sides of every jump, left then right, ordered by x. */
function stationsAlong(solution: Solved, count: number): Station[] {
  const { left, right, profile } = solution
  const jumps = new Set<number>()
  profile.x.forEach((x, i) => {
    if (i > 0 && x === profile.x[i - 1]) jumps.add(x)
  })
  const xs = new Set<number>(jumps)
  for (let i = 0; i <= count; i++) xs.add(left + ((right - left) * i) / count)
  for (const reach of [...solution.divides, ...solution.seepage]) xs.add(reach.from).add(reach.to)
  return [...xs]
    .filter((x) => x >= left && x <= right)
    .sort((a, b) => a - b)
    .flatMap((x) =>
      jumps.has(x)
        ? [stationAt(solution, x, 'left'), stationAt(solution, x, 'right')]
        : [stationAt(solution, x, 'right')],
    )
}

type Trace = { points: [number, number][]; rates: number[]; start: string; end: string }

/** Every stretch on which the contour |q|·F = carried exists for one direction of flow. */
function contours(solution: Solved, row: Station[], sign: 1 | -1, carried: number, tube: number): FlowLine[] {
  const traces: Trace[] = []
  let open: Trace | null = null
  const holds = (station: Station) => station.flow * sign >= carried && station.transmissivity > 0
  const add = (station: Station) => {
    const z = heightOf(station, carried / Math.abs(station.flow))
    const { k, porosity } = materialAt(station, z)
    open?.points.push([station.x, z])
    // Days per metre along x.
    open?.rates.push(((porosity ?? Number.NaN) * station.transmissivity) / (Math.abs(station.flow) * k))
  }
  row.forEach((station, i) => {
    const before = row[i - 1]
    if (holds(station)) {
      if (!open) {
        open = { points: [], rates: [], start: before ? place(solution, before, station) : 'left', end: '' }
        if (before) meet(open, before, station, carried, sign)
      }
      add(station)
    } else if (open && before) {
      open.end = place(solution, before, station)
      meet(open, station, before, carried, sign)
      traces.push(open)
      open = null
    }
  })
  if (open !== null) traces.push({ ...(open as Trace), end: 'right' })
  return traces.filter(({ points }) => points.length > 1).map((trace) => asLine(trace, sign, tube))
}

/** Adds the point between two stations where the whole flow is just the carried flow: there the line meets the water table. */
function meet(trace: Trace, outside: Station, inside: Station, carried: number, sign: 1 | -1) {
  const a = outside.flow * sign
  const b = inside.flow * sign
  const jump = outside.x === inside.x
  const t = jump ? 1 : Math.max(0, Math.min(1, (carried - a) / (b - a)))
  const x = outside.x + t * (inside.x - outside.x)
  const z = jump ? Math.min(outside.head, inside.head) : outside.head + t * (inside.head - outside.head)
  const { k, porosity } = materialAt(inside, z)
  trace.points.push([x, z])
  trace.rates.push(
    jump ? 0 : ((porosity ?? Number.NaN) * inside.transmissivity) / (Math.max(Math.abs(inside.flow), carried) * k),
  )
}

/** What stands between two stations: a feature, a seepage reach, or the water table with its recharge. */
function place(solution: Solved, a: Station, b: Station): string {
  if (a.x === b.x) {
    const feature = solution.exchanges.find((exchange) => exchange.x === a.x && exchange.of.startsWith('features.'))
    return feature ? feature.of.slice('features.'.length) : 'water-table'
  }
  const middle = (a.x + b.x) / 2
  const wet = solution.seepage.findIndex((reach) => middle >= reach.from && middle <= reach.to)
  return wet >= 0 && b.flow * Math.sign(a.flow) < a.flow * Math.sign(a.flow) ? `seepage.${wet}` : 'water-table'
}

/** Ordered with the flow, with the days since it entered. */
function asLine(trace: Trace, sign: 1 | -1, tube: number): FlowLine {
  const points = sign > 0 ? trace.points : [...trace.points].reverse()
  const rates = sign > 0 ? trace.rates : [...trace.rates].reverse()
  const days: number[] = [0]
  for (let i = 1; i < points.length; i++) {
    const dx = Math.abs((points[i]?.[0] ?? 0) - (points[i - 1]?.[0] ?? 0))
    days.push((days[i - 1] ?? 0) + (dx === 0 ? 0 : (dx * ((rates[i] ?? 0) + (rates[i - 1] ?? 0))) / 2))
  }
  const born = sign > 0 ? trace.start : trace.end
  const exit = sign > 0 ? trace.end : trace.start
  return { points, days, born, exit, tube }
}
