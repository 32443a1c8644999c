import type { LineId, LiveSection } from '~/live'
import { isLine, lineOf, ownerOf, shown, vertexOf, vertexPath } from './paths'
import type { Handle } from './types'

/** Lines whose handles show: a picked line or body, or one of whose vertices is picked. */
const linesOf = (picked: string[]): LineId[] => [
  ...new Set(picked.map((path) => vertexOf(path)?.line ?? path).filter(isLine)),
]

/**
 * The handles of what is picked, in metres: every vertex, the middle of every edge (pulls a new vertex out), the ends of
 * recharge zones and limits, the stage of a bank. `top` is the height at which recharge zones are drawn.
 */
export function handlesOf(picked: string[], live: LiveSection, caseId: string | null, top: number): Handle[] {
  const section = shown(live, caseId)
  const handles: Handle[] = []
  for (const line of linesOf(picked)) {
    const { points, keys, closed } = lineOf(live, line)
    points.forEach(([x, z], i) => {
      const key = keys[i]
      if (key === undefined) return
      const of = vertexPath(line, key)
      handles.push({ of, x, z, shape: 'vertex', picked: picked.includes(of) })
      const next = points[i + 1] ?? (closed ? points[0] : undefined)
      if (next) handles.push({ of: line, x: (x + next[0]) / 2, z: (z + next[1]) / 2, shape: 'mid', after: key })
    })
  }
  for (const path of new Set(picked.map(ownerOf))) {
    const [list, id] = path.split('.')
    if (list === 'left' || list === 'right') {
      const bank = section[list]
      if (bank.kind === 'water') handles.push({ of: `${list}.stage`, x: bank.x, z: bank.stage, shape: 'level' })
    } else if (list === 'recharge') {
      const zone = section.recharge.find((one) => one.id === id)
      if (zone)
        for (const end of ['from', 'to'] as const)
          handles.push({ of: `${path}.${end}`, x: zone[end], z: top, shape: 'end' })
    } else if (list === 'limits') {
      const limit = section.limits.find((one) => one.id === id)
      if (limit)
        for (const end of ['from', 'to'] as const)
          handles.push({ of: `${path}.${end}`, x: limit[end], z: limit.level, shape: 'end' })
    }
  }
  return handles
}

/** Half the side of the square in which a handle is caught, px: larger than its mark, and large enough for a finger. */
export const CATCH = { mouse: 8, pen: 12, touch: 22 } as const

/** The handle under the pointer: vertices before edge middles, the nearer before the farther. */
export function handleAt(
  handles: Handle[],
  at: { px: number; py: number; kind: keyof typeof CATCH },
  toPixels: (handle: Handle) => { x: number; y: number },
): Handle | null {
  let best: { handle: Handle; far: number } | null = null
  for (const handle of handles) {
    const { x, y } = toPixels(handle)
    const reach = CATCH[at.kind] * (handle.shape === 'mid' ? 0.75 : 1)
    const far = Math.hypot(x - at.px, y - at.py)
    if (far > reach) continue
    const weight = far + (handle.shape === 'mid' ? CATCH[at.kind] : 0)
    if (!best || weight < best.far) best = { handle, far: weight }
  }
  return best?.handle ?? null
}
