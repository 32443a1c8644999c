// biome-ignore-all lint/style/noNonNullAssertion: the loops keep every index inside its array.
import { type Net, sinkFlow } from './net'
import { type NetAnswer, STATE } from './state'

/**
 * Flows by continuity. Where ground conducts far better than what lies before it, its heads differ by less than a number can
 * show, and a flow worked out from them is rounding. But between two nodes that hold a level all gains and losses are known:
 * one good flow gives them all. The good one is the given flow of a closed end, else the link that conducts least.
 * `conducts[j]` is |dq/dh| of link j, m/d.
 */
export function closeFlows(net: Net, answer: NetAnswer, conducts: Float64Array): void {
  const { h, q, state } = answer
  const gain = (i: number) => net.supply[i]! - sinkFlow(net, i, h[i]!)
  const open = (i: number) => state[i] === STATE.free
  let first = 0
  while (first < net.links) {
    let last = first
    while (last + 1 < net.nodes - 1 && open(last + 1)) last++
    // Links first … last have only free nodes between them.
    const leftFree = first === 0 && open(0)
    const rightFree = last === net.links - 1 && open(net.nodes - 1)
    if (leftFree && !rightFree) {
      q[first] = gain(0)
      spread(q, gain, first, first, last)
    } else if (rightFree && !leftFree) {
      q[last] = -gain(net.nodes - 1)
      spread(q, gain, last, first, last)
    } else if (!leftFree && !rightFree) {
      let best = first
      for (let j = first + 1; j <= last; j++) if (conducts[j]! < conducts[best]!) best = j
      spread(q, gain, best, first, last)
    }
    first = last + 1
  }
}

/** From the flow of link `from`, those of links first … last. */
function spread(q: Float64Array, gain: (i: number) => number, from: number, first: number, last: number): void {
  for (let j = from + 1; j <= last; j++) q[j] = q[j - 1]! + gain(j)
  for (let j = from - 1; j >= first; j--) q[j] = q[j + 1]! - gain(j + 1)
}
