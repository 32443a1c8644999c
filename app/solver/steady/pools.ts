// biome-ignore-all lint/style/noNonNullAssertion: the loops keep every index inside its array.
import { type Net, SINK } from './net'
import { type NetAnswer, STATE } from './state'

/**
 * Water cut off behind dry ground with nothing that feeds, drains or holds it: any level would do (METHODS §2a.11). Such pools
 * are emptied, so that the answer does not depend on where Newton began, and reported as the nodes first … last.
 */
export function emptyStillPools(net: Net, answer: NetAnswer, tiny: number): { first: number; last: number }[] {
  const { h, q, state } = answer
  const pools: { first: number; last: number }[] = []
  const wet = (i: number) => h[i]! > net.base[i]!
  let i = 0
  while (i < net.nodes) {
    if (!wet(i)) {
      i++
      continue
    }
    const first = i
    let held = false
    let moving = false
    for (; i < net.nodes && wet(i); i++) {
      if (state[i] !== STATE.free || net.sink[i] === SINK.water || net.sinkG[i] !== 0 || net.supply[i] !== 0)
        held = true
      if (i > first && Math.abs(q[i - 1]!) > tiny) moving = true
    }
    const last = i - 1
    if (first > 0 && Math.abs(q[first - 1]!) > tiny) moving = true
    if (last < net.links && Math.abs(q[last]!) > tiny) moving = true
    if (held || moving) continue
    for (let n = first; n <= last; n++) {
      h[n] = net.base[n]!
      state[n] = STATE.dry
    }
    for (let j = Math.max(0, first - 1); j <= Math.min(last, net.links - 1); j++) q[j] = 0
    pools.push({ first, last })
  }
  return pools
}
