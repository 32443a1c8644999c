// biome-ignore-all lint/style/noNonNullAssertion: the loops keep every index inside its array.
import type { Problem } from '~/section'
import { transmissivity } from '../ground/columns'
import type { Balance, Exchange } from '../types'
import { type Inner, REACH } from './inner'
import { SINK, sinkFlow } from './net'
import type { WetReach } from './reaches'
import { labelOf } from './sense'
import { STATE } from './state'

/** Something asked for that does not come: the object, what is asked and what comes, m²/d, and where. */
export type Short = { of: string; asked: number; comes: number; x: number }

/** Flow out of the aquifer at the bank or feature of a node, m²/d; what a dry node cannot give is taken off. */
function outAt(inner: Inner, node: number): { rate: number; short: number } {
  const { net, h, state, rest, before, after } = inner
  const end = node === 0 || node === net.nodes - 1
  if (net.sink[node] !== SINK.none) {
    const asked = sinkFlow(net, node, h[node]!)
    const missing = state[node] === STATE.dry ? Math.max(0, Math.min(rest[node]!, asked)) : 0
    return { rate: asked - missing, short: missing }
  }
  if (state[node] === STATE.held || net.upper[node]! < net.surface[node]!) {
    if (!end) return { rate: before[node]! - after[node]!, short: 0 }
    return { rate: node === 0 ? -after[0]! : before[node]!, short: 0 }
  }
  return { rate: 0, short: 0 }
}

export function exchangesOf(
  inner: Inner,
  wet: WetReach[],
): { exchanges: Exchange[]; balance: Balance; short: Short[] } {
  const { section, net, h, after } = inner
  const exchanges: Exchange[] = []
  const short: Short[] = []
  let into = 0
  let out = 0
  const add = (exchange: Exchange) => {
    exchanges.push(exchange)
    if (exchange.of.startsWith('recharge.') ? exchange.rate >= 0 : exchange.rate < 0) into += Math.abs(exchange.rate)
    else out += Math.abs(exchange.rate)
  }
  for (const side of ['left', 'right'] as const) {
    const node = side === 'left' ? 0 : net.nodes - 1
    const bank = section[side]
    const { rate, short: missing } = outAt(inner, node)
    if (missing > 0 && bank.kind === 'inflow') short.push({ of: side, asked: -bank.rate, comes: rate, x: bank.x })
    const entry: Exchange = {
      of: side,
      label: labelOf(section, side),
      rate,
      head: h[node]!,
      x: bank.x,
      kind: bank.kind,
    }
    if (bank.kind === 'no-flow' || (bank.kind === 'water' && bank.conductance === 0)) entry.state = 'closed'
    else if (bank.kind === 'water' && bank.conductance !== null && h[node]! < net.sinkBed[node]!)
      entry.state = 'perched'
    else if (bank.kind === 'water' && h[node]! <= net.base[node]!) entry.state = 'dry'
    add(entry)
  }
  section.features.forEach((feature, index) => {
    const of = `features.${feature.id}`
    const node = net.featureNode[index]!
    const label = labelOf(section, of)
    const { x, kind } = feature
    if (node < 0) return
    if (feature.kind === 'wall') {
      exchanges.push({ of, label, rate: 0, x, kind, head: [h[node]!, h[node + 1]!], across: after[node]! })
      return
    }
    const { rate, short: missing } = outAt(inner, node)
    if (missing > 0 && feature.kind === 'trench') short.push({ of, asked: feature.rate, comes: rate, x: feature.x })
    const entry: Exchange = { of, label, rate, x, kind, head: h[node]! }
    if (h[node]! <= net.base[node]!) entry.state = 'dry'
    else if (feature.kind === 'drain' && rate <= 0) entry.state = 'idle'
    else if (feature.kind === 'ditch' && rate < 0) entry.state = 'feeding'
    add(entry)
  })
  wet.forEach((reach, index) => {
    add({ of: `seepage.${index}`, label: 'Seepage at the ground', rate: reach.rate, head: h[reach.first]! })
  })
  let recharge = 0
  for (const { id, rate } of rechargeOf(inner)) {
    recharge += rate
    add({ of: `recharge.${id}`, label: labelOf(section, `recharge.${id}`), rate })
  }
  const residual = out - into
  const total = Math.max(into, out)
  // Below a slope of 1e-12 flows are rounding.
  let carries = 0
  for (let j = 0; j < net.links; j++) carries = Math.max(carries, transmissivity(net.columns, j, h[j]!))
  const real = total > 1e-12 * carries
  return {
    exchanges,
    balance: { recharge, in: into, out, residual, relative: real ? Math.abs(residual) / total : 0 },
    short,
  }
}

/** Each zone's recharge, m²/d; a loss where the ground is dry is taken off in proportion. */
function rechargeOf(inner: Inner): { id: string; rate: number }[] {
  const { section, net } = inner
  const missing = unmetLoss(inner)
  const negative = section.recharge.filter(({ rate }) => rate < 0)
  return section.recharge.map(({ id, from, to, rate }) => {
    let total = rate * Math.max(0, Math.min(to, section.right.x) - Math.max(from, section.left.x))
    if (rate < 0 && missing.length > 0) {
      for (const { node, amount } of missing) {
        // Half cells of the node that lie in this zone, against those in all losing zones.
        const reach = (zone: { from: number; to: number }) => {
          const a = net.x[Math.max(0, node - 1)]!
          const b = net.x[Math.min(net.nodes - 1, node + 1)]!
          const lo = (a + net.x[node]!) / 2
          const hi = (b + net.x[node]!) / 2
          return Math.max(0, Math.min(zone.to, hi) - Math.max(zone.from, lo))
        }
        const all = negative.reduce((sum, zone) => sum - zone.rate * reach(zone), 0)
        if (all > 0) total += (amount * -rate * reach({ from, to })) / all
      }
    }
    return { id, rate: total }
  })
}

/** Losses to negative recharge that dry nodes cannot meet, m²/d. */
export function unmetLoss(inner: Inner): { node: number; amount: number }[] {
  const { net, state, rest } = inner
  const found: { node: number; amount: number }[] = []
  for (let i = 0; i < net.nodes; i++) {
    if (state[i] !== STATE.dry || rest[i]! <= 0) continue
    const asked = Math.max(0, sinkFlow(net, i, inner.h[i]!))
    const amount = rest[i]! - Math.min(rest[i]!, asked)
    if (amount > 0) found.push({ node: i, amount })
  }
  return found
}

/** Warnings that belong to exchanges: perched banks, losses that do not come. */
export function exchangeWarnings(inner: Inner, exchanges: Exchange[]): Problem[] {
  const { section, net, reach } = inner
  const warnings: Problem[] = []
  for (const { of, state } of exchanges) {
    if (state === 'perched' && (of === 'left' || of === 'right'))
      warnings.push({
        path: of,
        message: `${labelOf(section, of)}: the water table lies below the bed, so the water leaks down at a fixed rate and holds no level here.`,
        place: { x: section[of].x },
      })
  }
  const missing = unmetLoss(inner)
  const first = missing[0]
  const last = missing[missing.length - 1]
  if (first && last) {
    warnings.push({
      path: 'recharge',
      message:
        'Negative recharge asks for more than comes here: the ground is dry and the loss is cut to what there is.',
      place: { x: net.x[first.node]!, to: net.x[last.node]! },
    })
  }
  for (const pool of inner.pools) {
    warnings.push({
      path: 'base',
      message: 'This hollow is cut off and nothing feeds, drains or holds it: any level would do. It is shown dry.',
      place: { x: net.x[pool.first]!, to: net.x[pool.last]! },
    })
  }
  if (reach.every((r) => r === REACH.dry || r === REACH.wall))
    warnings.push({
      path: 'base',
      message: 'The whole strip is dry.',
      place: { x: section.left.x, to: section.right.x },
    })
  return warnings
}
