import type { LineId, LiveSection, VertexKey } from '~/live'
import { applyCase, type Point, type Section } from '~/section'

/** A vertex's path, "ground.v:KEY"; null for anything else. */
export function vertexOf(path: string): { line: LineId; key: VertexKey } | null {
  const at = path.indexOf('.v:')
  return at < 0 ? null : { line: path.slice(0, at) as LineId, key: path.slice(at + 3) }
}
export const vertexPath = (line: LineId, key: VertexKey) => `${line}.v:${key}`

/** Points and keys of a line or outline, empty when it is gone. */
export function lineOf(live: LiveSection, line: LineId): { points: Point[]; keys: VertexKey[]; closed: boolean } {
  if (line === 'ground' || line === 'base') return { points: live.section[line], keys: live.keys[line], closed: false }
  const id = line.slice('bodies.'.length)
  return {
    points: live.section.bodies.find((body) => body.id === id)?.outline ?? [],
    keys: live.keys.bodies[id] ?? [],
    closed: true,
  }
}
export const isLine = (path: string): path is LineId =>
  path === 'ground' || path === 'base' || /^bodies\.[^.]+$/.test(path)

/** The object a path belongs to: "bodies.b1.v:K" → "bodies.b1", "recharge.r1.from" → "recharge.r1", "left.stage" → "left". */
export function ownerOf(path: string): string {
  const vertex = vertexOf(path)
  if (vertex) return vertex.line
  const [head, id] = path.split('.')
  if (head === 'left' || head === 'right' || head === 'ground' || head === 'base' || id === undefined)
    return head ?? path
  return `${head}.${id}`
}

/** The section as it stands in the case shown: what the pointer sees and what a drag of a value starts from. */
export const shown = (live: LiveSection, caseId: string | null): Section =>
  caseId === null ? live.section : applyCase(live.section, caseId)
