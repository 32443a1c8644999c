// biome-ignore-all lint/style/noNonNullAssertion: the loops keep every index inside its array.
import type { Section } from '~/section'
import { potential, transmissivity } from '../ground/columns'
import type { Ground } from '../ground/ground'
import { firstHeads, reachOf } from './guess'
import { endTransmissivity, headInLink, type Inner, makeInner, REACH } from './inner'
import { cut, firstCells } from './mesh'
import { buildNet, sinkFlow } from './net'
import { solveNet } from './newton'
import { endOf } from './reaches'
import { STATE } from './state'

export type General = {
  inner: Inner
  error: { head: number; flow: number; nodes: number; refinements: number }
  /** The head goal, m. */
  goal: number
  converged: boolean
}

const FIRST = 48
const MOST = 6000

/** Head goal, m: 0.01 % of the head range, and never coarser than 1 mm for a range below 10 m. */
function goalOf(h: Float64Array): number {
  let low = Number.POSITIVE_INFINITY
  let high = Number.NEGATIVE_INFINITY
  for (const head of h) {
    if (head < low) low = head
    if (head > high) high = head
  }
  return Math.max(1e-4 * (high - low), 1e-6)
}

/**
 * How far the head over link j is off because T changes along x within it, m. The cell's own scheme takes the column at mid
 * length; where T at the ends, at the same heads, differs from it by the factor r, the missing head is ∫ q (1 − 1/r) dx / T.
 * 0 for one material over a level base, where the scheme is exact. In thin water the whole change of thickness counts, with a
 * minus sign: such errors fade along the slope, so they do not add up. Flows up to `least` m²/d count as none.
 */
export function linkError(inner: Inner, j: number, goal: number, least: number): number {
  const { net, ground, h } = inner
  if (net.panel[j]! < 0 || inner.reach[j] === REACH.dry) return 0
  const hl = h[j]!
  const hr = h[j + 1]!
  const drop = net.drop[j]!
  const sl = hl - net.base[j]!
  const sr = hr - net.base[j + 1]!
  if (Math.max(sl, sr) < goal) return 0
  const own = net.columns
  const upslope = drop > 0 ? sl : sr
  const fall = Math.abs(drop)
  if (fall > 0 && Math.min(upslope, drop > 0 ? sr : sl) < fall / 2) {
    // Water that climbs here spills over the crest above: its film stands too high, and the pool behind it too low.
    const climbs = drop > 0 ? inner.before[j + 1]! < -least : inner.after[j]! > least
    if (climbs) return -Math.abs(hl - hr)
    const layered = own.start[j + 1]! - own.start[j]! > 1 ? thinLayers(inner, j, Math.max(sl, sr)) : 0
    const known = net.w[j]! >= 0 ? Math.min(0.5, (2 * upslope) / fall) : 0.5
    return -Math.max(layered, Math.min(Math.abs(sl - sr) * known, Math.abs(hl - hr)))
  }
  if (drop === 0 && own.start[j + 1]! - own.start[j]! === 1) return 0
  const mid = transmissivity(own, j, (hl + hr) / 2)
  if (mid <= 0) return Math.abs(hl - hr)
  const part = (end: 0 | 1, head: number, q: number) => {
    const here = endTransmissivity(ground, net, j, end, head)
    const ratio = here > 0 ? transmissivity(own, j, head) / here : 4
    return q * (1 - Math.min(4, ratio))
  }
  const lost = part(0, hl, inner.after[j]!) + part(1, hr, inner.before[j + 1]!)
  // Opposite ends nearly cancel when T runs straight; what is left of the curvature is the error, their difference a warning.
  return Math.abs((lost * net.length[j]!) / (6 * mid))
}

/**
 * In thin water over layers: how far the thickness s is off because the link takes the mean K over its whole fall, and the
 * column at mid length for both ends, m.
 */
function thinLayers({ net, ground }: Inner, j: number, s: number): number {
  const { columns } = net
  const floor = columns.z[columns.start[j]!]!
  const fall = Math.abs(net.drop[j]!)
  const mid = transmissivity(columns, j, floor + s)
  if (!(mid > 0)) return 0
  const taken = (2 * potential(columns, j, floor + fall) * Math.min(s, fall / 2)) / (fall * fall)
  const own = transmissivity(columns, j, floor + Math.min(s, fall / 2))
  const ends = [0, 1].map((end) => endTransmissivity(ground, net, j, end === 0 ? 0 : 1, net.base[j + end]! + s) / mid)
  const off = Math.max(Math.abs(taken / own - 1), ...ends.map((ratio) => Math.abs(ratio - 1)))
  return s * Math.min(1, off)
}

/** A quarter, a sixteenth … of the cells asked for, so that quartering comes out at them. */
const startOf = (nodes: number): number => (nodes > 250 ? startOf(nodes / 4) : Math.max(1, Math.round(nodes)))

/** Heads of a finer mesh from those of a coarser one: the coarse interpolation at the new nodes. */
function carry(inner: Inner, parts: Int32Array, nodes: number): Float64Array {
  const { net, h } = inner
  const out = new Float64Array(nodes)
  let at = 0
  let cell = 0
  for (let j = 0; j < net.links; j++) {
    out[at++] = h[j]!
    if (net.panel[j]! < 0) continue
    const m = parts[cell++]!
    for (let i = 1; i < m; i++) out[at++] = headInLink(net, j, i / m, h[j]!, h[j + 1]!, inner.reach[j] === REACH.wet)
  }
  out[at] = h[net.nodes - 1]!
  return out
}

function partsFor(inner: Inner, errors: Float64Array, total: number, goal: number): Int32Array {
  const { net } = inner
  let cells = 0
  for (let j = 0; j < net.links; j++) if (net.panel[j]! >= 0) cells++
  const parts = new Int32Array(cells)
  const each = goal / (2 * cells)
  const whole = net.x[net.nodes - 1]! - net.x[0]!
  const size = new Float64Array(net.links)
  for (let j = 0; j < net.links; j++) {
    const e = errors[j]!
    const m = e < 0 ? (-2 * e) / goal : total > goal ? Math.sqrt(e / each) : 1
    size[j] = net.length[j]! / Math.min(8, Math.max(1, Math.ceil(m)))
    if (net.panel[j]! < 0) continue
    if (doubt(inner, j) > goal / 4 && net.length[j]! > whole * 1e-7) size[j] = net.length[j]! / 8
    if (!edgeOfReach(inner, j)) continue
    if (net.length[j]! > whole * 1e-7 && Math.abs(inner.h[j]! - inner.h[j + 1]!) > goal / 2)
      size[j] = net.length[j]! / 8
  }
  // A reach may end a little beyond where the coarse mesh put it: cells grow no faster than 3-fold away from its end.
  for (let j = 0; j < net.links; j++) {
    if (net.panel[j]! < 0 || !(edgeOfReach(inner, j) || doubt(inner, j) > goal / 4)) continue
    for (const way of [-1, 1]) {
      let most = size[j]!
      for (let i = j + way; i >= 0 && i < net.links && net.length[i]! > most; i += way) {
        most *= 3
        if (size[i]! > most) size[i] = most
      }
    }
  }
  let c = 0
  for (let j = 0; j < net.links; j++) {
    if (net.panel[j]! >= 0) parts[c++] = Math.min(64, Math.max(1, Math.round(net.length[j]! / size[j]!)))
  }
  return parts
}

/** A link where a wet or dry reach begins or ends. */
function edgeOfReach(inner: Inner, j: number): boolean {
  const a = inner.state[j]!
  const b = inner.state[j + 1]!
  if (a === b) return false
  if (a === STATE.dry || b === STATE.dry) return true
  // A spring at a low point has no width: the reach ends at the node, and there is nothing to look closer at.
  if (a === STATE.upper && b === STATE.free) return endOf(inner, j, 1) !== inner.net.x[j]
  if (b === STATE.upper && a === STATE.free) return endOf(inner, j + 1, -1) !== inner.net.x[j + 1]
  return a === STATE.upper || b === STATE.upper
}

/**
 * Head that may hide in a link although its nodes are wet or dry, m: on a coarse mesh a node's half cells can outweigh what
 * happens at the node itself (a trench or a wall in wet ground, a spring in dry ground, a reach where T falls). There a wet
 * node would have to take water in, or a dry link has water coming onto it.
 */
function doubt(inner: Inner, j: number): number {
  const { net, h, before, after, state, reach } = inner
  const length = net.length[j]!
  if (reach[j] === REACH.wet) {
    let lacks = Math.max(0, before[j + 1]! - after[j]! - net.w[j]! * length)
    for (const i of [j, j + 1]) {
      const inside = i > 0 && i < net.nodes - 1 && state[i] === STATE.upper
      if (inside) lacks = Math.max(lacks, after[i]! + sinkFlow(net, i, h[i]!) - before[i]!)
    }
    if (lacks <= 0) return 0
    return (lacks * length) / Math.max(1e-300, transmissivity(net.columns, j, (h[j]! + h[j + 1]!) / 2))
  }
  if (reach[j] === REACH.dry) {
    let gains = Math.max(0, net.w[j]!) * length
    for (const i of [j, j + 1]) if (state[i] === STATE.dry) gains = Math.max(gains, -sinkFlow(net, i, h[i]!))
    return gains > 0 ? Math.sqrt((2 * gains * length) / net.columns.k[net.columns.start[j]!]!) : 0
  }
  return 0
}

/** The general path: finite volumes, refined where the link error is large, then halved to estimate the error. */
export function solveGeneral(section: Section, ground: Ground, options: { nodes?: number } = {}): General {
  const reach = reachOf(section)
  const fixed = options.nodes !== undefined
  let cells = firstCells(
    ground,
    fixed ? startOf(options.nodes ?? FIRST) : FIRST,
    fixed || ground.x.length > 200 ? 1 : 2,
    fixed,
  )
  let net = buildNet(section, ground, cells)
  let answer = solveNet(net, firstHeads(net, reach), reach)
  let inner = makeInner(section, ground, net, answer, false)
  let refinements = 0
  const to = (parts: Int32Array) => {
    cells = cut(cells, parts)
    net = buildNet(section, ground, cells)
    answer = solveNet(net, carry(inner, parts, net.nodes), reach)
    inner = makeInner(section, ground, net, answer, false)
    refinements++
  }
  if (fixed) {
    const wanted = options.nodes ?? FIRST
    while (cells.panel.length * 3 <= wanted) to(new Int32Array(cells.panel.length).fill(4))
    return {
      inner,
      goal: Number.POSITIVE_INFINITY,
      converged: answer.converged,
      error: { head: Number.NaN, flow: Number.NaN, nodes: net.nodes, refinements },
    }
  }
  let goal = goalOf(inner.h)
  let error = { head: Number.NaN, flow: Number.NaN }
  const room = Math.max(MOST, 10 * cells.panel.length)
  for (let level = 0; level < 8; level++) {
    const errors = new Float64Array(net.links)
    let total = 0
    let least = 0
    for (const flow of inner.after) least = Math.max(least, 1e-9 * Math.abs(flow))
    for (let j = 0; j < net.links; j++) {
      errors[j] = linkError(inner, j, goal, least)
      total += Math.max(0, errors[j]!)
    }
    const parts = partsFor(inner, errors, total, goal)
    const last = parts.every((m) => m === 1)
    let size = 0
    for (let c = 0; c < parts.length; c++) {
      if (last) parts[c] = 2
      size += parts[c]!
    }
    if (size > room) break
    const coarse = inner
    to(parts)
    if (!answer.converged && coarse.closed) {
      // The finer mesh would not close: stay with the one that did, and say how far off it may be.
      inner = coarse
      const off = Number.isNaN(error.head) ? Math.max(total, 10 * goal) : error.head
      return {
        inner,
        goal,
        converged: true,
        error: { head: off, flow: error.flow || 0, nodes: coarse.net.nodes, refinements: refinements - 1 },
      }
    }
    goal = goalOf(inner.h)
    error = differences(coarse, inner, parts)
    if (last && error.head <= goal) break
  }
  return { inner, goal, converged: answer.converged, error: { ...error, nodes: net.nodes, refinements } }
}

/** Between two meshes, at the nodes both have: a third of the head's and flow's largest change (second order), m and m²/d. */
function differences(coarse: Inner, fine: Inner, parts: Int32Array): { head: number; flow: number } {
  let head = 0
  let flow = 0
  let at = 0
  let cell = 0
  for (let j = 0; j <= coarse.net.links; j++) {
    head = Math.max(head, Math.abs(fine.h[at]! - coarse.h[j]!))
    if (coarse.reach[j] !== REACH.wet && coarse.reach[j - 1] !== REACH.wet) {
      flow = Math.max(
        flow,
        Math.abs(fine.after[at]! - coarse.after[j]!),
        Math.abs(fine.before[at]! - coarse.before[j]!),
      )
    }
    at += j < coarse.net.links && coarse.net.panel[j]! >= 0 ? parts[cell++]! : 1
  }
  return { head: head / 3, flow: flow / 3 }
}
