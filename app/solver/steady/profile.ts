// biome-ignore-all lint/style/noNonNullAssertion: the loops keep every index inside its array.

import { surfaceAt } from '../ground/ground'
import type { LimitCheck, Misfit, Profile, Solved } from '../types'
import { type Inner, inLink, linkAt, panelTransmissivity, REACH } from './inner'

/** Samples of the exact path over the whole strip, on top of its breaks. */
const SAMPLES = 160

/** The profile to draw: nodes, on the exact path with samples of the closed form between them; doubled where h or q jumps. */
export function profileOf(inner: Inner): Profile {
  const { net, ground, h, before, after, reach } = inner
  const x: number[] = []
  const head: number[] = []
  const flow: number[] = []
  const t: number[] = []
  const base: number[] = []
  const surface: number[] = []
  const whole = net.x[net.nodes - 1]! - net.x[0]!
  let most = 0
  for (let i = 0; i < net.nodes; i++) most = Math.max(most, Math.abs(before[i]!), Math.abs(after[i]!))
  const put = (j: number, share: number, at: number, hh: number, q: number) => {
    const panel = net.panel[j]!
    const xl = ground.x[panel]!
    const inPanel = Math.min(1, Math.max(0, (at - xl) / (ground.x[panel + 1]! - xl)))
    x.push(at)
    head.push(hh)
    flow.push(q)
    base.push(net.base[j]! + (net.base[j + 1]! - net.base[j]!) * share)
    surface.push(net.surface[j]! + (net.surface[j + 1]! - net.surface[j]!) * share)
    t.push(panelTransmissivity(ground, panel, inPanel, hh))
  }
  for (let j = 0; j < net.links; j++) {
    if (reach[j] === REACH.wall) continue
    const xl = net.x[j]!
    const jumps = j === 0 || reach[j - 1] === REACH.wall || Math.abs(after[j]! - before[j]!) > 1e-9 * most
    if (jumps) put(j, 0, xl, h[j]!, after[j]!)
    const parts = inner.exact ? Math.max(4, Math.round((SAMPLES * net.length[j]!) / whole)) : 1
    for (let i = 1; i < parts; i++) {
      // Closer together towards the ends, where the parabola is steepest.
      const share = 0.5 * (i / parts) + 0.25 * (1 - Math.cos((Math.PI * i) / parts))
      const at = xl + net.length[j]! * share
      const read = inLink(inner, j, at)
      put(j, share, at, read.head, read.flow)
    }
    put(j, 1, net.x[j + 1]!, h[j + 1]!, before[j + 1]!)
  }
  const saturated = Float64Array.from(head, (value, i) => Math.max(0, value - base[i]!))
  return {
    x: Float64Array.from(x),
    head: Float64Array.from(head),
    flow: Float64Array.from(flow),
    base: Float64Array.from(base),
    ground: Float64Array.from(surface),
    saturated,
    transmissivity: Float64Array.from(t),
  }
}

/** Extremes between nodes: where q passes through 0 the head has its top or bottom. */
export function turningPoints(inner: Inner): { x: number; head: number }[] {
  const { net, after, before, reach } = inner
  const points: { x: number; head: number }[] = []
  for (let j = 0; j < net.links; j++) {
    if (reach[j] !== REACH.plain) continue
    const ql = after[j]!
    const qr = before[j + 1]!
    if (ql * qr >= 0) continue
    const x = net.x[j]! + (net.length[j]! * ql) / (ql - qr)
    points.push({ x, head: inLink(inner, j, x).head })
  }
  return points
}

/** The highest water table, banks included; on a plateau its whole extent. Dry ground does not count unless all is dry. */
export function highestOf(inner: Inner, turns: { x: number; head: number }[]): Solved['highest'] {
  const { net, h } = inner
  let top = Number.NEGATIVE_INFINITY
  let low = Number.POSITIVE_INFINITY
  for (let i = 0; i < net.nodes; i++) {
    low = Math.min(low, h[i]!)
    if (h[i]! - net.base[i]! > 1e-7) top = Math.max(top, h[i]!)
  }
  for (const turn of turns) top = Math.max(top, turn.head)
  if (top === Number.NEGATIVE_INFINITY) for (const head of h) top = Math.max(top, head)
  const close = 1e-10 * Math.max(top - low, 1e-3 * Math.abs(top), 1e-6)
  let from = Number.NaN
  let to = Number.NaN
  for (let i = 0; i < net.nodes; i++) {
    const dry = h[i]! - net.base[i]! <= 1e-7 && h[i]! > top
    if (h[i]! < top - close || dry) {
      if (!Number.isNaN(from)) break
      continue
    }
    if (Number.isNaN(from)) from = net.x[i]!
    to = net.x[i]!
  }
  const turn = turns.find((one) => one.head >= top - close)
  if (turn && (Number.isNaN(from) || from === to)) return { x: turn.x, to: turn.x, head: turn.head }
  return { x: from, to, head: top }
}

/** Highest head between two x, with its place. */
function topBetween(inner: Inner, turns: { x: number; head: number }[], from: number, to: number) {
  const { net, h } = inner
  const best = { x: from, head: Number.NEGATIVE_INFINITY }
  const see = (x: number, head: number) => {
    if (head > best.head) {
      best.x = x
      best.head = head
    }
  }
  for (const [x, side] of [
    [from, 'right'],
    [to, 'left'],
  ] as const) {
    see(x, inLink(inner, linkAt(net, x, from < to ? side : 'right'), x).head)
  }
  let low = 0
  let high = net.nodes
  while (low < high) {
    const mid = (low + high) >> 1
    if (net.x[mid]! < from) low = mid + 1
    else high = mid
  }
  for (let i = low; i < net.nodes && net.x[i]! <= to; i++) see(net.x[i]!, h[i]!)
  for (const turn of turns) if (turn.x >= from && turn.x <= to) see(turn.x, turn.head)
  return best
}

export function limitsOf(inner: Inner, turns: { x: number; head: number }[]): LimitCheck[] {
  const { section } = inner
  return section.limits.flatMap((limit) => {
    const from = Math.max(section.left.x, Math.min(limit.from, limit.to))
    const to = Math.min(section.right.x, Math.max(limit.from, limit.to))
    if (!(from <= to)) return []
    const top = topBetween(inner, turns, from, to)
    const margin = limit.level - limit.clearance - top.head
    return [{ id: limit.id, name: limit.name || limit.id, margin, at: top.x, holds: margin >= 0 }]
  })
}

export function misfitsOf(inner: Inner): Misfit[] {
  const { section, net } = inner
  return section.observations
    .filter(({ x }) => x >= section.left.x && x <= section.right.x)
    .map(({ id, name, x, head, sd }) => {
      const computed = inLink(inner, linkAt(net, x), x).head
      return { id, name: name || id, x, observed: head, computed, residual: computed - head, sd: sd ?? null }
    })
}

/** The straight line between the banks' heads, and where the water table is farthest from it (signed: table − line), m. */
export function straightOf(inner: Inner, profile: Profile, turns: { x: number; head: number }[]): Solved['straight'] {
  const { net, h } = inner
  const left = h[0]!
  const right = h[net.nodes - 1]!
  const xl = net.x[0]!
  const slope = (right - left) / (net.x[net.nodes - 1]! - xl)
  let worst = 0
  let at = xl
  const see = (x: number, head: number) => {
    const off = head - (left + slope * (x - xl))
    if (Math.abs(off) > Math.abs(worst)) {
      worst = off
      at = x
    }
  }
  for (let i = 0; i < profile.x.length; i++) see(profile.x[i]!, profile.head[i]!)
  for (const turn of turns) see(turn.x, turn.head)
  return { left, right, worst, at }
}

/** Where the water table stands above the ground although seepage is off, as reaches. */
export function floodedReaches(inner: Inner, profile: Profile): { from: number; to: number }[] {
  const reaches: { from: number; to: number }[] = []
  for (let i = 0; i < profile.x.length; i++) {
    const x = profile.x[i]!
    const ground = surfaceAt(inner.ground, x)
    if (profile.head[i]! <= ground + 1e-6) continue
    const last = reaches[reaches.length - 1]
    if (last && last.to === profile.x[i - 1]) last.to = x
    else reaches.push({ from: x, to: x })
  }
  return reaches
}
