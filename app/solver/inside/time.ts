import type { Solution, Solved, TravelTime } from '../types'
import { integrate } from './quadrature'
import { heightOf, materialAt, type Station, shareBelow, stationAt, storedWater } from './stream'

/** Whoever can end a path: banks, and features that take water. */
type Stop = { x: number; exit: string; always: boolean; feature: boolean }

function stops(solution: Solved): Stop[] {
  const list: Stop[] = [
    { x: solution.left, exit: 'left', always: true, feature: false },
    { x: solution.right, exit: 'right', always: true, feature: false },
  ]
  for (const exchange of solution.exchanges) {
    const id = exchange.of.startsWith('features.') ? exchange.of.slice('features.'.length) : null
    if (id === null || exchange.x === undefined || Array.isArray(exchange.head)) continue
    // A ditch that takes water ends every path that reaches it (METHODS §2a.15); another feature where q changes sign across it.
    list.push({ x: exchange.x, exit: id, always: exchange.kind === 'ditch' && exchange.rate > 0, feature: true })
  }
  return list.sort((a, b) => a.x - b.x)
}

/** Where the integrand has a kink: breaks of the drawing, ends of wet and dry reaches, places where the flow turns. */
function breaksBetween(solution: Solved, from: number, to: number): number[] {
  const low = Math.min(from, to)
  const high = Math.max(from, to)
  const turns = [...solution.divides, ...solution.seepage, ...solution.dry].flatMap((reach) => [reach.from, reach.to])
  const xs = [...new Set([...solution.inner.ground.x, ...turns])].filter((x) => x > low && x < high)
  const list = [low, ...xs.sort((a, b) => a - b), high]
  return from <= to ? list : list.reverse()
}

/**
 * Time for the water under x to reach where it leaves, by the mean velocity over the thickness, v = |q| / ∫ n dz
 * (METHODS §2a.15).
 *
 * @param from distance along the section, m; at a sink or wall the side the water flows away on is taken.
 * @returns days, and where it leaves: "left", "right" or the id of a feature. `days` is null at a divide or where nothing moves
 * ("never leaves"), in an unsolved section, outside the strip, and when a material on the way has no porosity (`why` says which).
 */
export function travelTime(solution: Solution, from: number): TravelTime {
  const never = (why: string): TravelTime => ({ days: null, exit: null, why })
  if (solution.status !== 'solved') return never('There is no steady answer.')
  if (!(from >= solution.left && from <= solution.right)) return never('Outside the strip.')

  const right = stationAt(solution, from, 'right')
  const left = stationAt(solution, from, 'left')
  const scale = solution.profile.flow.reduce((most, q) => Math.max(most, Math.abs(q)), 0)
  const still = scale * 1e-12
  const goesRight = right.flow > still && from < solution.right
  const goesLeft = left.flow < -still && from > solution.left
  const here = stops(solution).find((stop) => stop.x === from)
  const arrivesHere = left.flow > still || right.flow < -still
  // A ditch ends every path that reaches it; a bank only takes what flows towards it.
  if (here?.feature && (here.always || (arrivesHere && !goesRight && !goesLeft))) return { days: 0, exit: here.exit }
  if (here && !here.feature && (here.exit === 'left' ? right.flow < -still : left.flow > still))
    return { days: 0, exit: here.exit }
  if (!goesRight && !goesLeft) return never('The water stands still here: at a divide it never leaves.')
  // Fed from a feature both ways: the shorter name for the path is the way of the larger flow.
  const sign = goesRight && goesLeft ? (right.flow >= -left.flow ? 1 : -1) : goesRight ? 1 : -1

  const ahead = stops(solution).filter((stop) => (stop.x - from) * sign > 0)
  if (sign < 0) ahead.reverse()
  let end: Stop | undefined
  for (const stop of ahead) {
    const beyond = stationAt(solution, stop.x, sign > 0 ? 'right' : 'left')
    if (stop.always || beyond.flow * sign <= still) {
      end = stop
      break
    }
  }
  const turns = solution.divides.find(
    (turn) => turn.kind === 'trough' && (turn.from - from) * sign > 0 && (!end || (end.x - turn.from) * sign > 0),
  )
  if (!end || turns) return never('The water is taken up on the way and reaches neither bank.')
  const arrives = stationAt(solution, end.x, sign > 0 ? 'left' : 'right')
  if (arrives.flow * sign <= still) return never('The water is taken up on the way and reaches neither bank.')

  const days = timeAlong(solution, from, end.x, sign)
  return days === null
    ? { days: null, exit: end.exit, why: 'A material on the way has no porosity.' }
    : { days: Number.isFinite(days) ? days : null, exit: end.exit }
}

/** ∫ (∫ n dz) / |q| dx, days; null without porosity. */
function timeAlong(solution: Solved, from: number, to: number, sign: 1 | -1): number | null {
  const xs = breaksBetween(solution, from, to)
  let days = 0
  let missing = false
  for (let i = 1; i < xs.length; i++) {
    const a = xs[i - 1] ?? from
    const b = xs[i] ?? to
    const part = integrate(
      (x) => {
        const station = stationAt(solution, x, sign > 0 ? 'right' : 'left')
        const stored = storedWater(station)
        if (stored === null) {
          missing = true
          return 0
        }
        return stored / Math.abs(station.flow)
      },
      Math.min(a, b),
      Math.max(a, b),
      1e-7,
      24,
    )
    if (missing) return null
    days += part
  }
  return days
}

/**
 * Age of the water at a spot: days since it entered at the water table, a bank or a feature, followed back along its flow line
 * with the local seepage velocity. At a divide the water came straight down (Vogel 1967). null above the water table, outside,
 * or without porosity.
 */
export function ageAt(solution: Solution, x: number, z: number): number | null {
  if (solution.status !== 'solved' || !(x >= solution.left && x <= solution.right)) return null
  const station = stationAt(solution, x, 'right')
  if (z > station.head || z <= station.base) return null
  const scale = solution.profile.flow.reduce((most, q) => Math.max(most, Math.abs(q)), 0)
  if (Math.abs(station.flow) <= scale * 1e-9) return ageUnderDivide(solution, station, z)

  const sign = station.flow > 0 ? 1 : -1
  const carried = Math.abs(station.flow) * shareBelow(station, z)
  // Upstream until everything that flows passes below the line: there it came in.
  const xs = breaksBetween(solution, x, sign > 0 ? solution.left : solution.right)
  let days = 0
  for (let i = 1; i < xs.length; i++) {
    const near = xs[i - 1] ?? x
    let far = xs[i] ?? x
    const side = (spot: number) => stationAt(solution, spot, spot > Math.min(near, far) && sign > 0 ? 'left' : 'right')
    const inner = stationAt(solution, far, sign > 0 ? 'right' : 'left')
    const ends = inner.flow * sign <= carried
    if (ends) {
      // |q| falls below the carried flow in here: bisect for the spot where the line was born.
      let inside = near
      let outside = far
      for (let n = 0; n < 60; n++) {
        const middle = (inside + outside) / 2
        if (side(middle).flow * sign > carried) inside = middle
        else outside = middle
      }
      far = inside
    }
    let missing = false
    days += integrate(
      (spot) => {
        const there = side(spot)
        const { k, porosity } = materialAt(there, heightOf(there, carried / Math.abs(there.flow)))
        if (porosity === null) {
          missing = true
          return 0
        }
        return (porosity * there.transmissivity) / (Math.abs(there.flow) * k)
      },
      Math.min(near, far),
      Math.max(near, far),
      1e-7,
      24,
    )
    if (missing) return null
    if (ends) break
  }
  return Number.isFinite(days) ? days : null
}

/** t = ∫ n / (w F) dz from z up to the water table: the water sinks at v_z = −w·F/n. */
function ageUnderDivide(solution: Solved, station: Station, z: number): number | null {
  const gain = gainAt(solution, station.x)
  if (gain <= 0) return null
  const edges = [z, ...station.stack.map(({ to }) => to).filter((to) => to > z && to < station.head), station.head]
  let days = 0
  for (let i = 1; i < edges.length; i++) {
    const from = edges[i - 1] ?? z
    const to = edges[i] ?? z
    const { porosity } = materialAt(station, (from + to) / 2)
    if (porosity === null) return null
    days += integrate((height) => porosity / (gain * shareBelow(station, height)), from, to, 1e-8, 24)
  }
  return days
}

/** Local gain of discharge dq/dx, m/d (recharge less seepage), by a difference within the stretch. */
export function gainAt(solution: Solved, x: number): number {
  const step = (solution.right - solution.left) * 1e-5
  const a = Math.max(solution.left, x - step)
  const b = Math.min(solution.right, x + step)
  return (stationAt(solution, b, 'left').flow - stationAt(solution, a, 'right').flow) / (b - a)
}
