// biome-ignore-all lint/style/noNonNullAssertion: the loops keep every index inside its array.
import type { Section } from '~/section'
import { type Ground, isLevel } from '../ground/ground'
import { firstHeads, reachOf } from './guess'
import { headInLink, type Inner, makeInner, REACH } from './inner'
import { coarsest } from './mesh'
import { buildNet } from './net'
import { solveNet } from './newton'
import { STATE } from './state'

/**
 * The exact path (METHODS §2): over a level base, in bands uniform in K or in level layers, with recharge constant between
 * breaks, P(h) = ∫ T dh is a parabola between breaks, q linear. So the chain with one link between breaks is no
 * approximation: its node balances are the closed form, and its unknowns are the few heads at the breaks.
 */
export function exactReason(section: Section, ground: Ground): string | null {
  if (!isLevel(ground)) return null
  let layered = false
  let banded = false
  for (let p = 0; p + 1 < ground.start.length; p++) {
    if (ground.start[p + 1]! - ground.start[p]! > 1) layered = true
    if (ground.k[ground.start[p]!] !== ground.k[0]) banded = true
  }
  const inside = section.materials.length > 1 && section.bodies.length > 0
  if (layered) return 'solved exactly: flat base, level layers'
  if (banded && inside) return 'solved exactly: flat base, vertical bands'
  return 'solved exactly: flat base, one material'
}

/**
 * Solves on the exact path. `why` says what on the drawing's water table forbids it (seepage, dry reach), then the general
 * path must be taken.
 */
export function solveExact(section: Section, ground: Ground): { inner: Inner } | { why: string } {
  const net = buildNet(section, ground, coarsest(ground))
  const reach = reachOf(section)
  const answer = solveNet(net, firstHeads(net, reach), reach)
  if (!answer.converged) return { why: 'the closed form did not close' }
  for (let i = 0; i < net.nodes; i++) {
    if (answer.state[i] === STATE.upper && net.upper[i]! >= net.surface[i]!) return { why: 'the ground is wet' }
    if (answer.state[i] === STATE.dry && net.sink[i] === 0) return { why: 'a reach is dry' }
  }
  const inner = makeInner(section, ground, net, answer, true)
  for (let j = 0; j < net.links; j++) {
    if (inner.reach[j] === REACH.wall) continue
    if (net.w[j]! < 0 && driesInside(inner, j)) return { why: 'a reach is dry' }
    if (section.surfaceSeepage && net.w[j]! >= 0 && wetInside(inner, j)) return { why: 'the ground is wet' }
    if (section.surfaceSeepage && net.w[j]! < 0 && wetInside(inner, j)) return { why: 'the ground is wet' }
  }
  return { inner }
}

/** Whether a losing link's parabola would pass below the base. */
function driesInside({ net, h, after, before }: Inner, j: number): boolean {
  const length = net.length[j]!
  const ql = after[j]!
  const qr = before[j + 1]!
  if (!(ql > 0 && qr < 0)) return h[j]! <= net.base[j]! && h[j + 1]! <= net.base[j + 1]!
  const share = ql / (ql - qr)
  const head = headInLink(net, j, share, h[j]!, h[j + 1]!, false)
  return head <= net.base[j]! + 1e-12 * length
}

/** Whether the water table rises above the ground between a link's ends; the ground is straight there. */
function wetInside({ net, h }: Inner, j: number): boolean {
  const gl = net.surface[j]!
  const gr = net.surface[j + 1]!
  const room = (share: number) => headInLink(net, j, share, h[j]!, h[j + 1]!, false) - (gl + (gr - gl) * share)
  let best = -Number.MAX_VALUE
  let at = 0
  for (let i = 0; i <= 16; i++) {
    const value = room(i / 16)
    if (value > best) {
      best = value
      at = i / 16
    }
  }
  let step = 1 / 16
  for (let k = 0; k < 12; k++) {
    step /= 2
    for (const share of [at - step, at + step]) {
      if (share <= 0 || share >= 1) continue
      const value = room(share)
      if (value > best) {
        best = value
        at = share
      }
    }
  }
  return best > 1e-9
}
