// biome-ignore-all lint/style/noNonNullAssertion: the loops keep every index inside its array.
import { baseAt, surfaceAt } from '../ground/ground'
import type { Reading, Solution, Solved } from '../types'
import { type Inner, inLink, linkAt } from './inner'

/** Head on the straight line between the banks' heads at x, m. */
export const straightAt = (
  solution: Pick<Solved, 'left' | 'right'>,
  ends: { left: number; right: number },
  x: number,
) => ends.left + ((ends.right - ends.left) * (x - solution.left)) / (solution.right - solution.left)

/** First and last node at exactly x, when there is one (a wall has two). */
function nodesAt(inner: Inner, x: number): [number, number] | null {
  const { net } = inner
  let low = 0
  let high = net.nodes - 1
  while (low < high) {
    const mid = (low + high) >> 1
    if (net.x[mid]! < x) low = mid + 1
    else high = mid
  }
  if (net.x[low] !== x) return null
  return [low, low + 1 < net.nodes && net.x[low + 1] === x ? low + 1 : low]
}

/**
 * The water table at x (m). Exact path: the closed form. General path: the parabola of the cell, of the mesh's own order.
 * Head, ground, base, depth (ground − head) and straight line in m; flow in m²/d, positive to the right. Where head or flow
 * jumps (a wall, a feature, a spring) `left` and `right` give both sides and the plain values are the right-hand ones (at the
 * right bank the left-hand ones). x beyond the strip reads the nearer bank. An unsolved answer reads NaN for head and flow.
 */
export function readAt(solution: Solution, x: number): Reading {
  if (solution.status !== 'solved') {
    const none = Number.NaN
    return { x, head: none, flow: none, saturated: none, ground: none, base: none, depth: none, straight: none }
  }
  const { inner } = solution
  const at = Math.min(solution.right, Math.max(solution.left, Number.isNaN(x) ? solution.left : x))
  const nodes = nodesAt(inner, at)
  const base = baseAt(inner.ground, at)
  const ground = surfaceAt(inner.ground, at)
  let head: number
  let flow: number
  let sides: Pick<Reading, 'left' | 'right'> = {}
  if (nodes) {
    const [a, b] = nodes
    head = inner.h[b]!
    flow = inner.after[b]!
    const jump = Math.abs(inner.after[b]! - inner.before[a]!)
    if (a !== b || jump > 1e-9 * (Math.abs(inner.after[b]!) + Math.abs(inner.before[a]!)))
      sides = {
        left: { head: inner.h[a]!, flow: inner.before[a]! },
        right: { head: inner.h[b]!, flow: inner.after[b]! },
      }
  } else ({ head, flow } = inLink(inner, linkAt(inner.net, at), at))
  return {
    x: at,
    head,
    flow,
    saturated: Math.max(0, head - base),
    ground,
    base,
    depth: ground - head,
    straight: straightAt(solution, solution.straight, at),
    ...sides,
  }
}
