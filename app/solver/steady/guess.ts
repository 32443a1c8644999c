// biome-ignore-all lint/style/noNonNullAssertion: the loops keep every index inside its array.
import type { Section } from '~/section'
import { type Net, SINK } from './net'

/** Height that matters in a section, m: from its lowest base to its highest ground or level. */
export function reachOf(section: Section): number {
  let low = Number.POSITIVE_INFINITY
  let high = Number.NEGATIVE_INFINITY
  for (const [, z] of section.base) low = Math.min(low, z)
  for (const [, z] of section.ground) high = Math.max(high, z)
  for (const bank of [section.left, section.right]) if (bank.kind === 'water') high = Math.max(high, bank.stage)
  for (const feature of section.features) {
    if (feature.kind === 'ditch' || feature.kind === 'drain') high = Math.max(high, feature.level)
  }
  return Math.max(high - low, 1e-3)
}

/**
 * First heads: straight lines between the levels that hold the water, lifted off the base, so that Newton comes down from
 * above where the true water is thin (from below it would first jump).
 */
export function firstHeads(net: Net, reach: number): Float64Array {
  const at: number[] = []
  for (let i = 0; i < net.nodes; i++) {
    if (!Number.isNaN(net.held[i]!) || net.sink[i] === SINK.water || net.sink[i] === SINK.drain) at.push(i)
    else if (net.upper[i]! < net.surface[i]!) at.push(i)
  }
  const levelOf = (i: number): number => {
    if (!Number.isNaN(net.held[i]!)) return net.held[i]!
    if (net.sink[i] !== SINK.none) return Math.max(net.sinkLevel[i]!, net.base[i]!)
    return net.upper[i]!
  }
  const h = new Float64Array(net.nodes)
  let next = 0
  for (let i = 0; i < net.nodes; i++) {
    while (next < at.length && at[next]! < i) next++
    const b = at[Math.min(next, at.length - 1)]
    const a = next > 0 ? at[next - 1] : b
    let level = (net.base[i]! + net.surface[i]!) / 2
    if (a !== undefined && b !== undefined) {
      const wide = net.x[b]! - net.x[a]!
      const share = wide > 0 ? Math.min(1, Math.max(0, (net.x[i]! - net.x[a]!) / wide)) : 0
      level = levelOf(a) + (levelOf(b) - levelOf(a)) * share
    }
    h[i] = Math.max(level, net.base[i]! + 0.05 * reach)
  }
  return h
}
