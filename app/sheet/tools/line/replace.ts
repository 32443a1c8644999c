import type { Edit, LiveSection } from '~/live'
import { APART, neat } from '../moves'
import { lineOf } from '../paths'
import type { Spot } from '../types'

/**
 * The edits that put a drawn stretch in place of the old one between its ends. Vertices at the banks stay (the line must span
 * the strip) and take the drawn height where the stretch reaches them; points beyond the banks are brought in to them.
 */
export function replaceStretch(
  live: LiveSection,
  line: 'ground' | 'base',
  drawn: Spot[],
  newKey: () => string,
): Edit[] {
  const { points, keys } = lineOf(live, line)
  const first = points[0]
  const last = points.at(-1)
  if (!first || !last || drawn.length === 0) return []
  const left = first[0]
  const right = last[0]
  const stretch = [...drawn].sort((a, b) => a.x - b.x)
  const from = stretch[0]?.x ?? left
  const to = stretch.at(-1)?.x ?? right
  const edits: Edit[] = []
  points.forEach(([x], at) => {
    const key = keys[at]
    if (key === undefined || at === 0 || at === points.length - 1) return
    if (x > from - APART && x < to + APART) edits.push({ do: 'remove-vertex', line, key })
  })
  const ends: [number, string | undefined][] = [
    [left, keys[0]],
    [right, keys.at(-1)],
  ]
  let before = Number.NEGATIVE_INFINITY
  for (const { x, z } of stretch) {
    const end = ends.find(([at]) => Math.abs(x - at) < APART || (at === left ? x < left : x > right))
    if (end?.[1] !== undefined) edits.push({ do: 'move-vertex', line, key: end[1], to: [end[0], neat(z)] })
    else if (x - before >= APART) {
      edits.push({ do: 'insert-vertex', line, key: newKey(), at: [neat(x), neat(z)], after: null })
      before = x
    }
  }
  return edits
}
