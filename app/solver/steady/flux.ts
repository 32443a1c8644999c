// biome-ignore-all lint/style/noNonNullAssertion: the loops keep every index inside its array.
import { potential, transmissivity } from '../ground/columns'
import type { Net } from './net'

/**
 * Flow through a link, m²/d, positive to the right, with its slopes in the two heads.
 *
 * With P(h) = ∫ T dh of the column at mid length, q = (P(h_left) − P(h_right)) / length. For one material this is the
 * mid-point scheme T(x_mid, mean head)·Δh/Δx, exact at the nodes over a level base; in level layers it is Girinskii's.
 * Where the water is thinner than half the drop of the base along the link, the column at mid length no longer knows how
 * much stands upslope: there the upslope node's own thickness s carries the flow, q = P(base_mid + drop)·2s/drop / length
 * (for one material K·s·drop/length: flow at normal depth, upstream weighted). Both pieces meet with equal value and, for
 * one material, equal slope; q never falls with the upslope head nor rises with the downslope head, so the strip has one
 * answer and a saturated thickness never goes below 0.
 */
export const flux = { q: 0, left: 0, right: 0 }

export function linkFlux(net: Net, j: number, hl: number, hr: number): void {
  const { columns } = net
  const drop = net.drop[j]!
  const length = net.length[j]!
  const top = columns.start[j + 1]! - 1
  const zTop = columns.z[top]!
  // The usual case first: both heads in the top layer, and enough water upslope.
  if (hl > zTop && hr > zTop && Math.abs(drop) <= 2 * (drop > 0 ? hl - net.base[j]! : hr - net.base[j + 1]!)) {
    const k = columns.k[top]! / length
    const t = columns.t[top]! / length
    const dl = hl - zTop
    const dr = hr - zTop
    flux.q = (t + (k * (dl + dr)) / 2) * (hl - hr)
    flux.left = t + k * dl
    flux.right = -(t + k * dr)
    return
  }
  if (drop >= 0) {
    side(net, j, hl, hl - net.base[j]!, drop, true)
    const into = flux.q
    const slope = flux.left
    side(net, j, hr, 0, drop, false)
    flux.q = (into - flux.q) / length
    flux.right = -flux.left / length
    flux.left = slope / length
  } else {
    side(net, j, hr, hr - net.base[j + 1]!, -drop, true)
    const into = flux.q
    const slope = flux.left
    side(net, j, hl, 0, -drop, false)
    flux.q = (flux.q - into) / length
    flux.left = flux.left / length
    flux.right = -slope / length
  }
}

/** One side's share of the flow through a link (times its length) into flux.q, and its slope into flux.left. */
function side(net: Net, j: number, h: number, s: number, drop: number, upslope: boolean): void {
  if (upslope && s < drop / 2) {
    const full = potential(net.columns, j, net.columns.z[net.columns.start[j]!]! + drop)
    const rate = (2 * full) / drop
    // Rain on the upper half of the link passes the middle too; it would only be missed where the water is thin.
    const w = net.w[j]!
    const rain = w > 0 ? Math.min((w * net.length[j]! * net.length[j]!) / 2, full) : 0
    flux.q = s > 0 ? rate * s + rain * (1 - (2 * s) / drop) : rain
    flux.left = rate - (2 * rain) / drop
    return
  }
  flux.q = potential(net.columns, j, h)
  flux.left = transmissivity(net.columns, j, h)
}
