// biome-ignore-all lint/style/noNonNullAssertion: the loops keep every index inside its array.
import type { Divide, DryReach } from '../types'
import { endTransmissivity, type Inner, inLink, REACH } from './inner'
import { sinkFlow } from './net'
import { STATE } from './state'

/** A reach where the water table is held down at the ground; nodes first … last. `rate` m²/d out of the ground. */
export type WetReach = { from: number; to: number; rate: number; first: number; last: number }

/**
 * Seepage reaches. Their ends lie where the water table leaves the ground with equal slope (METHODS §2a.12): on the dry side
 * q = q₀ + w·x, along the ground q = −T·(slope of the ground), and the end is where the two are equal. At a low point of the
 * ground they are not equal anywhere before it: a spring of no width.
 */
export function wetReaches(inner: Inner): WetReach[] {
  const { net, state, before, after, reach } = inner
  const wet = (i: number) => state[i] === STATE.upper && net.upper[i]! >= net.surface[i]!
  const reaches: WetReach[] = []
  let i = 0
  while (i < net.nodes) {
    if (!wet(i)) {
      i++
      continue
    }
    let first = i
    let last = i
    while (last + 1 < net.nodes && wet(last + 1) && net.panel[last]! >= 0) last++
    i = last + 1
    // Water that stands at the ground keeps what comes through its own bank or ditch; the rest of the reach seeps.
    const bankLeft = first > 0 && reach[first - 1] === REACH.wet && state[first - 1] === STATE.held
    const bankRight = last + 1 < net.nodes && reach[last] === REACH.wet && state[last + 1] === STATE.held
    if (bankLeft) first--
    if (bankRight) last++
    let rate = 0
    // Through a node, and along the cells between.
    for (let n = first; n <= last; n++) {
      if (state[n] === STATE.upper) {
        const inflow = n === 0 ? 0 : before[n]!
        const outflow = n === net.nodes - 1 ? 0 : after[n]!
        rate += inflow - outflow - sinkFlow(net, n, inner.h[n]!)
      }
      if (n < last) rate += after[n]! - before[n + 1]! + net.w[n]! * net.length[n]!
    }
    reaches.push({
      from: bankLeft ? net.x[first]! : endOf(inner, first, -1),
      to: bankRight ? net.x[last]! : endOf(inner, last, 1),
      rate,
      first,
      last,
    })
  }
  return reaches
}

/** Where the wet reach that has its last wet node at `node` truly ends, going `way`. */
export function endOf(inner: Inner, node: number, way: -1 | 1): number {
  const { net, ground, before, after, state } = inner
  const x = net.x[node]!
  const j = way < 0 ? node - 1 : node
  if (j < 0 || j >= net.links || net.panel[j]! < 0) return x
  const other = node + way
  if (state[other] === STATE.held) return x
  const slope = (net.surface[j + 1]! - net.surface[j]!) / net.length[j]!
  const along = (i: number) => -endTransmissivity(ground, net, j, i === j ? 0 : 1, net.surface[i]!) * slope
  const gapHere = (way < 0 ? before[node]! : after[node]!) - along(node)
  const gapThere = (way < 0 ? after[other]! : before[other]!) - along(other)
  if (gapHere * gapThere >= 0 || Math.abs(gapHere) <= 1e-12 * Math.abs(gapThere)) return x
  const share = gapHere / (gapHere - gapThere)
  return x + (net.x[other]! - x) * share
}

/** Reaches at least one link long with nothing saturated. */
export function dryReaches(inner: Inner): DryReach[] {
  const { net, h } = inner
  const reaches: DryReach[] = []
  const dry = (i: number) => h[i]! - net.base[i]! <= 1e-7
  for (let j = 0; j < net.links; j++) {
    if (net.panel[j]! < 0 || !dry(j) || !dry(j + 1)) continue
    const from = net.x[j]!
    const to = net.x[j + 1]!
    const last = reaches[reaches.length - 1]
    if (last && Math.abs(last.to - from) <= 1e-12 * (1 + Math.abs(from))) last.to = to
    else reaches.push({ from, to })
  }
  return reaches
}

/**
 * Divides and troughs: where q passes smoothly through 0 (METHODS §2a.2). A change of sign across a jump (feature, spring) is
 * neither. Where q = 0 over a stretch the stretch is the divide.
 */
export function dividesOf(inner: Inner): Divide[] {
  const { net, before, after, reach } = inner
  let most = 0
  for (let i = 0; i < net.nodes; i++) most = Math.max(most, Math.abs(before[i]!), Math.abs(after[i]!))
  const tiny = most * 1e-9
  const found: Divide[] = []
  let sign = 0
  let still: number | null = null
  const end = (to: number, next: number, j: number) => {
    if (still === null) return
    const long = to - still > 0
    const head = inLink(inner, j, to).head
    if (sign < 0 && next > 0) found.push({ kind: 'divide', from: still, to, head })
    else if (sign > 0 && next < 0) found.push({ kind: 'trough', from: still, to, head })
    else if (long && sign <= 0 && next >= 0 && reach[j] !== REACH.dry)
      found.push({ kind: 'divide', from: still, to, head })
    still = null
  }
  const signOf = (q: number) => (Math.abs(q) <= tiny ? 0 : Math.sign(q))
  let lastCell = 0
  for (let j = 0; j < net.links; j++) {
    if (net.panel[j]! < 0) continue
    lastCell = j
    const xl = net.x[j]!
    const xr = net.x[j + 1]!
    const ql = after[j]!
    const qr = before[j + 1]!
    if (j > 0 && Math.abs(before[j]! - ql) > tiny * 10) {
      // A jump: what was smooth ends here.
      if (still !== null && xl > still) end(xl, 0, j)
      still = null
      sign = 0
    }
    const a = signOf(ql)
    const b = signOf(qr)
    if (a === 0) {
      if (still === null) still = xl
    } else {
      if (still !== null) end(xl, a, j)
      else if (sign !== 0 && a !== sign)
        found.push({ kind: a > 0 ? 'divide' : 'trough', from: xl, to: xl, head: inLink(inner, j, xl).head })
      sign = a
    }
    if (a === 0 && b !== 0) {
      end(xl, b, j)
      sign = b
    } else if (a !== 0 && b !== 0 && a !== b) {
      const x = xl + ((xr - xl) * ql) / (ql - qr)
      found.push({ kind: b > 0 ? 'divide' : 'trough', from: x, to: x, head: inLink(inner, j, x).head })
      sign = b
    } else if (a !== 0 && b === 0) still = xr
  }
  const right = net.x[net.nodes - 1]!
  if (still !== null && right > still) end(right, 0, lastCell)
  return found
}
