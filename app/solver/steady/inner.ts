// biome-ignore-all lint/style/noNonNullAssertion: the loops keep every index inside its array.
import type { Section } from '~/section'
import { headOfPotential, potential } from '../ground/columns'
import { type Ground, shareOf } from '../ground/ground'
import type { Net } from './net'
import { type NetAnswer, STATE } from './state'

/** How the water stands in a link: an ordinary cell, a wall, on the ground surface (wet), or dry. */
export const REACH = { plain: 0, wall: 1, wet: 2, dry: 3 } as const

/**
 * What readAt, inside/ and footing/ need: plain data and typed arrays only. Nodes and links are those of the net (exact path:
 * one link between breaks; general path: the final mesh). `before[i]` and `after[i]` are the flow just left and right of node
 * i, m²/d (at a bank both are the flow at the bank's inner side). Within link j the flow is linear in x from after[j] to before[j+1].
 */
export type Inner = {
  exact: boolean
  /** Whether the equations closed. */
  closed: boolean
  /** The section with the case's values in it. */
  section: Section
  ground: Ground
  net: Net
  h: Float64Array
  before: Float64Array
  after: Float64Array
  /** Node states (STATE in state.ts) and what each node's own balance leaves over, m²/d. */
  state: Uint8Array
  rest: Float64Array
  reach: Uint8Array
  /** Pools that nothing holds, shown empty: first and last node. */
  pools: { first: number; last: number }[]
}

/** T(h) at `share` of a panel's width without making a column, m²/d. */
export function panelTransmissivity(ground: Ground, panel: number, share: number, h: number): number {
  let t = 0
  let below = Number.NaN
  let k = 0
  for (let layer = ground.start[panel]!; layer < ground.start[panel + 1]!; layer++) {
    const z = ground.zl[layer]! + (ground.zr[layer]! - ground.zl[layer]!) * share
    if (!Number.isNaN(below)) {
      if (z >= h) break
      if (z > below) t += k * (z - below)
    }
    below = Number.isNaN(below) ? z : Math.max(below, z)
    k = ground.k[layer]!
  }
  return h > below ? t + k * (h - below) : t
}

/** T at the left (end = 0) or right (end = 1) end of link j, with the column of the link's own side, m²/d. */
export function endTransmissivity(ground: Ground, net: Net, j: number, end: 0 | 1, h: number): number {
  const panel = net.panel[j]!
  return panelTransmissivity(ground, panel, shareOf(ground, panel, net.x[j + end]!), h)
}

/** Head at `share` (0 … 1) of link j: the parabola of P(h) in an ordinary cell, the thickness straight in a thin one. */
export function headInLink(net: Net, j: number, share: number, hl: number, hr: number, wet: boolean): number {
  const bl = net.base[j]!
  const br = net.base[j + 1]!
  const drop = net.drop[j]!
  const straight = hl + (hr - hl) * share
  if (wet) return straight
  const upslope = drop >= 0 ? hl - bl : hr - br
  const downslope = drop >= 0 ? hr - br : hl - bl
  const size = Math.abs(drop)
  if (upslope < size || downslope < size) {
    const base = bl + (br - bl) * share
    return Math.max(base, straight)
  }
  const pl = potential(net.columns, j, hl)
  const pr = potential(net.columns, j, hr)
  const length = net.length[j]!
  const bulge = (net.w[j]! * length * length * share * (1 - share)) / 2
  if (bulge === 0 && hl === hr) return hl
  return headOfPotential(net.columns, j, pl + (pr - pl) * share + bulge)
}

/** Puts an answer's flows on the nodes and marks wet and dry links. */
export function makeInner(section: Section, ground: Ground, net: Net, answer: NetAnswer, exact: boolean): Inner {
  const { nodes, links } = net
  const { h, q, state } = answer
  const before = new Float64Array(nodes)
  const after = new Float64Array(nodes)
  const reach = new Uint8Array(links)
  const onSurface = (i: number) =>
    section.surfaceSeepage &&
    ((state[i] === STATE.upper && net.upper[i]! >= net.surface[i]!) ||
      (state[i] === STATE.held && Math.abs(h[i]! - net.surface[i]!) <= 1e-9 * (1 + Math.abs(h[i]!))))
  for (let j = 0; j < links; j++) {
    const flow = q[j]!
    if (net.panel[j]! < 0) {
      reach[j] = REACH.wall
      after[j] = flow
      before[j + 1] = flow
      continue
    }
    const half = (net.w[j]! * net.length[j]!) / 2
    const seeps = state[j] === STATE.upper || state[j + 1] === STATE.upper
    if (seeps && onSurface(j) && onSurface(j + 1)) {
      reach[j] = REACH.wet
      const slope = (net.surface[j + 1]! - net.surface[j]!) / net.length[j]!
      after[j] = -endTransmissivity(ground, net, j, 0, h[j]!) * slope
      before[j + 1] = -endTransmissivity(ground, net, j, 1, h[j + 1]!) * slope
      continue
    }
    const dryLeft = state[j] === STATE.dry
    const dryRight = state[j + 1] === STATE.dry
    if (h[j]! <= net.base[j]! && h[j + 1]! <= net.base[j + 1]!) reach[j] = REACH.dry
    after[j] = dryLeft && half < 0 ? flow : flow - half
    before[j + 1] = dryRight && half < 0 ? flow : flow + half
  }
  before[0] = after[0]!
  after[nodes - 1] = before[nodes - 1]!
  return {
    exact,
    closed: answer.converged,
    section,
    ground,
    net,
    h,
    before,
    after,
    state,
    rest: answer.rest,
    reach,
    pools: answer.pools,
  }
}

/** The link that holds x, never a wall; at a node the link to the right, or to the left with `side` 'left'. */
export function linkAt(net: Net, x: number, side: 'left' | 'right' = 'right'): number {
  let low = 0
  let high = net.links
  while (high - low > 1) {
    const mid = (low + high) >> 1
    const at = net.x[mid]!
    if (side === 'right' ? at <= x : at < x) low = mid
    else high = mid
  }
  if (net.panel[low]! < 0) return side === 'right' ? low + 1 : low - 1
  return low
}

/** Head and flow at x in link j. */
export function inLink(inner: Inner, j: number, x: number): { head: number; flow: number } {
  const { net, h } = inner
  const share = Math.min(1, Math.max(0, (x - net.x[j]!) / net.length[j]!))
  const head =
    share === 0
      ? h[j]!
      : share === 1
        ? h[j + 1]!
        : headInLink(net, j, share, h[j]!, h[j + 1]!, inner.reach[j] === REACH.wet)
  return { head, flow: inner.after[j]! + (inner.before[j + 1]! - inner.after[j]!) * share }
}
