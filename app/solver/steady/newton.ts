// biome-ignore-all lint/style/noNonNullAssertion: the loops keep every index inside its array.
import { headOfPotential, potential, transmissivity } from '../ground/columns'
import { solveTridiagonal } from '../linear/tridiagonal'
import { closeFlows } from './continuity'
import { flux, linkFlux } from './flux'
import { type Net, sinkFlow, sinkSlope } from './net'
import { emptyStillPools } from './pools'
import { type NetAnswer, STATE } from './state'

type Work = { n: number; lower: Float64Array; diagonal: Float64Array; upper: Float64Array; right: Float64Array }
let work: Work | null = null
function workspace(n: number): Work {
  if (!work || work.n < n) {
    const room = Math.max(512, n * 2)
    const make = () => new Float64Array(room)
    work = { n: room, lower: make(), diagonal: make(), upper: make(), right: make() }
  }
  return work
}

/** Below this share of `reach` a falling thickness goes to 0 at once. */
const DRY = 1e-5
/** Node steps after which the walk in time gives up: about half a second. */
const PATIENCE = 3e6
/** A flow is known no better than this share of the head that drives it. */
const ROUNDING = 2e-15

/**
 * Flows, balances and states at the present heads. Returns the worst balance of the nodes that are free, m²/d, less what
 * rounding alone may leave there.
 */
function balance(
  net: Net,
  h: Float64Array,
  q: Float64Array,
  rest: Float64Array,
  state: Uint8Array,
  w: Work,
  reach: number,
): number {
  const { nodes, links } = net
  for (let i = 0; i < nodes; i++) {
    rest[i] = sinkFlow(net, i, h[i]!) - net.supply[i]!
    w.diagonal[i] = sinkSlope(net, i, h[i]!)
  }
  for (let j = 0; j < links; j++) {
    linkFlux(net, j, h[j]!, h[j + 1]!)
    q[j] = flux.q
    rest[j] = rest[j]! + flux.q
    rest[j + 1] = rest[j + 1]! - flux.q
    w.diagonal[j] = w.diagonal[j]! + flux.left
    w.diagonal[j + 1] = w.diagonal[j + 1]! - flux.right
    w.upper[j] = flux.right
    w.lower[j + 1] = -flux.left
  }
  let worst = 0
  let height = reach
  for (let i = 0; i < nodes; i++) if (h[i]! - net.base[i]! > height) height = h[i]! - net.base[i]!
  const rounding = height * ROUNDING
  for (let i = 0; i < nodes; i++) {
    const r = rest[i]!
    const s = h[i]! - net.base[i]!
    let now: number = STATE.free
    if (!Number.isNaN(net.held[i]!)) now = STATE.held
    else if (h[i]! >= net.upper[i]! && r < 0) now = STATE.upper
    else if (s <= 0 && r >= 0) now = STATE.dry
    else {
      const left = Math.abs(r) - rounding * w.diagonal[i]!
      if (left > worst) worst = left
    }
    state[i] = now
  }
  return worst
}

/** Flow that matters in this strip, m²/d: the yardstick for closing the balance. */
function flowScale(net: Net, q: Float64Array): number {
  let scale = 0
  for (let i = 0; i < net.nodes; i++) {
    scale = Math.max(scale, Math.abs(net.supply[i]!))
    if (net.sink[i] === 3) scale = Math.max(scale, Math.abs(net.sinkG[i]!))
  }
  for (let j = 0; j < net.links; j++) scale = Math.max(scale, Math.abs(q[j]!))
  return scale
}

/**
 * Newton with the exact tridiagonal matrix on the free nodes. Upper and lower bounds by an active set: a node is set free as
 * soon as its own balance pulls it off its bound. A thickness falls by at most a factor 20 and rises by at most `reach` in a
 * step, so a bad guess is walked down from above. `step` (time steps without physical meaning) damps what will not settle.
 */
export function solveNet(net: Net, guess: Float64Array, reach: number): NetAnswer {
  const { nodes } = net
  const h = Float64Array.from(guess)
  for (let i = 0; i < nodes; i++) {
    const held = net.held[i]!
    if (!Number.isNaN(held)) h[i] = held
    else h[i] = Math.max(net.base[i]!, Math.min(h[i]!, net.upper[i]!))
  }
  const q = new Float64Array(net.links)
  const rest = new Float64Array(nodes)
  const state = new Uint8Array(nodes)
  const before = new Float64Array(nodes)
  let iterations = 0
  const run = (limit: number, per: number): boolean => {
    let settled = 0
    for (let k = 0; k < limit; k++) {
      iterations++
      const moved = iterate(net, h, q, rest, state, reach, per, before)
      if (moved.step <= 1e-11 * reach && moved.worst <= 1e-10 * moved.scale) return true
      // No step left that a number of this size can show: the flows' own rounding is all that remains.
      if (moved.step <= 1e-13 * reach && moved.worst <= 1e-7 * moved.scale) return true
      // Rounding floor: the step no longer shrinks although the balance is closed.
      if (moved.step <= 1e-8 * reach && moved.worst <= 1e-9 * moved.scale && ++settled >= 3) return true
    }
    return false
  }
  let converged = run(40, 0)
  // Newton doubles the digits: one step more costs little and leaves rounding only.
  if (converged && moved.step > 0) iterate(net, h, q, rest, state, reach, 0, before)
  if (!converged) {
    const started = iterations
    // Walk there in time from the guess: each step is an easier problem; steps grow until they no longer matter.
    for (let i = 0; i < nodes; i++) {
      h[i] = Number.isNaN(net.held[i]!) ? Math.max(net.base[i]!, Math.min(guess[i]!, net.upper[i]!)) : net.held[i]!
    }
    let width = 0
    for (let i = 0; i < nodes; i++) width += net.width[i]!
    let rate = (1e3 * moved.diagonal) / (width / nodes)
    let growth = 10
    for (let k = 0; k < 150 && !converged && (iterations - started) * nodes < PATIENCE; k++) {
      before.set(h)
      if (run(15, rate)) {
        const worst = balance(net, h, q, rest, state, workspace(nodes), reach)
        converged = worst <= 1e-9 * flowScale(net, q)
        rate /= growth
        if (converged) {
          before.set(h)
          if (!run(40, 0)) h.set(before)
        }
      } else {
        rate *= growth * 2
        growth = Math.max(1.5, growth / 1.7)
        h.set(before)
      }
    }
  }
  balance(net, h, q, rest, state, workspace(nodes), reach)
  const answer: NetAnswer = { h, q, state, rest, converged, iterations, pools: [] }
  if (converged) closeFlows(net, answer, conductsOf(net, h))
  if (converged) answer.pools = emptyStillPools(net, answer, 1e-9 * flowScale(net, q) + 1e-13 * moved.diagonal * reach)
  return answer
}

/** Whether the base is level on both sides of a node. */
const isLevelAt = (net: Net, i: number): boolean =>
  (i === 0 || net.drop[i - 1] === 0) && (i === net.links || net.drop[i] === 0)

/**
 * A step taken in P = ∫ T dh rather than in h: over level ground flow is linear in P, so a rise does not overshoot where T
 * grows from almost nothing or jumps to a far better layer, and a fall over a level base arrives at once. Of the columns
 * beside the node the one that gives the smaller step.
 */
function throughPotential(net: Net, i: number, h: number, delta: number): number {
  let best = delta > 0 ? delta : Number.NEGATIVE_INFINITY
  for (let j = i - 1; j <= i; j++) {
    if (j < 0 || j >= net.links || net.panel[j]! < 0) continue
    const t = transmissivity(net.columns, j, h)
    if (t <= 0) continue
    const step = headOfPotential(net.columns, j, potential(net.columns, j, h) + t * delta) - h
    if (delta > 0 ? step < best : step > best) best = step
  }
  if (delta <= 0) return best === Number.NEGATIVE_INFINITY ? delta : best
  const s = h - net.base[i]!
  return Math.max(best, Math.min(delta, 0.01 * s))
}

function conductsOf(net: Net, h: Float64Array): Float64Array {
  const conducts = new Float64Array(net.links)
  for (let j = 0; j < net.links; j++) {
    linkFlux(net, j, h[j]!, h[j + 1]!)
    conducts[j] = Math.max(flux.left, -flux.right)
  }
  return conducts
}

/** Largest step (m), worst balance, flow that matters (m²/d), largest of the matrix (m/d). */
type Moved = { step: number; worst: number; scale: number; diagonal: number }
const moved: Moved = { step: 0, worst: 0, scale: 0, diagonal: 0 }

function iterate(
  net: Net,
  h: Float64Array,
  q: Float64Array,
  rest: Float64Array,
  state: Uint8Array,
  reach: number,
  per: number,
  before: Float64Array,
): Moved {
  const { nodes } = net
  const w = workspace(nodes)
  moved.worst = balance(net, h, q, rest, state, w, reach)
  moved.scale = flowScale(net, q)
  if (per > 0) {
    // S/Δt per node; the balance to close then holds the storage too.
    let worst = 0
    const rounding = reach * ROUNDING
    for (let i = 0; i < nodes; i++) {
      const storage = per * Math.max(net.width[i]!, 1e-9)
      const change = storage * (h[i]! - before[i]!)
      const r = rest[i]! + change
      rest[i] = r
      w.diagonal[i] = w.diagonal[i]! + storage
      if (state[i] === STATE.held) continue
      const s = h[i]! - net.base[i]!
      if (h[i]! >= net.upper[i]! && r < 0) state[i] = STATE.upper
      else if (s <= 0 && r >= 0) state[i] = STATE.dry
      else {
        state[i] = STATE.free
        const left = Math.abs(r) - rounding * w.diagonal[i]!
        if (left > worst) worst = left
      }
    }
    moved.worst = worst
  }
  let diagonal = 0
  for (let i = 0; i < nodes; i++) if (w.diagonal[i]! > diagonal) diagonal = w.diagonal[i]!
  moved.diagonal = diagonal
  for (let i = 0; i < nodes; i++) {
    if (state[i] === STATE.free) {
      w.right[i] = -rest[i]!
      w.diagonal[i] = w.diagonal[i]! + 1e-300
      if (i === 0) w.lower[i] = 0
      if (i === nodes - 1) w.upper[i] = 0
    } else {
      w.right[i] = 0
      w.diagonal[i] = 1
      w.lower[i] = 0
      w.upper[i] = 0
    }
  }
  solveTridiagonal(nodes, w.lower, w.diagonal, w.upper, w.right)
  let step = 0
  const dry = DRY * reach
  for (let i = 0; i < nodes; i++) {
    if (state[i] !== STATE.free) continue
    const old = h[i]!
    const s = old - net.base[i]!
    let delta = w.right[i]!
    const most = 3 * s + 1e-3 * reach
    if (!(delta < most)) delta = most
    if (delta > 0.02 * s) delta = throughPotential(net, i, old, delta)
    if (delta < 0) {
      if (delta < -0.02 * s && isLevelAt(net, i)) delta = throughPotential(net, i, old, delta)
      const least = s < dry ? -s : -0.95 * s
      if (delta < least) delta = least
    }
    let next = old + delta
    if (next > net.upper[i]!) next = net.upper[i]!
    if (next < net.base[i]!) next = net.base[i]!
    h[i] = next
    const size = Math.abs(next - old)
    if (size > step) step = size
  }
  moved.step = step
  return moved
}
