import type { LineId, LiveSection, VertexKey } from '~/live'
import type { Point } from '~/section'

/** Points and keys of the ground, the base or an outline; empty when it is gone. */
export function lineIn(live: LiveSection, line: LineId): { points: Point[]; keys: VertexKey[] } {
  if (line === 'ground' || line === 'base') return { points: live.section[line], keys: live.keys[line] }
  const id = line.slice('bodies.'.length)
  return {
    points: live.section.bodies.find((body) => body.id === id)?.outline ?? [],
    keys: live.keys.bodies[id] ?? [],
  }
}
