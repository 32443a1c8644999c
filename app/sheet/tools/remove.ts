import type { Edit, LineId, LiveSection } from '~/live'
import { lineOf, vertexOf } from './paths'

/** The edits that remove what is picked, and what is said about things that cannot go. */
export function removeEdits(paths: string[], live: LiveSection): { edits: Edit[]; says: string | null } {
  const edits: Edit[] = []
  const kept = new Set<string>()
  const vertices = new Map<LineId, string[]>()
  for (const path of paths) {
    const vertex = vertexOf(path)
    if (vertex) {
      // A body that goes as a whole takes its vertices along.
      if (!paths.includes(vertex.line)) vertices.set(vertex.line, [...(vertices.get(vertex.line) ?? []), vertex.key])
      continue
    }
    const [list, id] = path.split('.')
    if (list === 'left' || list === 'right') kept.add('A bank cannot be removed; the particulars make it no-flow.')
    else if (path === 'ground' || path === 'base')
      kept.add('Ground and base cannot be removed; pick vertices, or draw the line anew.')
    else if (id === undefined) continue
    else if (list === 'marks') edits.push({ do: 'remove-mark', id })
    else if (list === 'materials') {
      if (live.section.host === id || live.section.bodies.some((body) => body.material === id))
        kept.add('That material is in use; give the ground and the bodies another one first.')
      else edits.push({ do: 'remove', list, id })
    } else if (isList(list)) edits.push({ do: 'remove', list, id })
  }
  for (const [line, keys] of vertices) edits.push(...removeVertices(line, keys, live, kept))
  return { edits, says: kept.size > 0 ? [...kept].join(' ') : null }
}

const LISTS = ['bodies', 'recharge', 'features', 'observations', 'limits', 'cases'] as const
const isList = (name: string | undefined): name is (typeof LISTS)[number] => LISTS.some((list) => list === name)

function removeVertices(line: LineId, keys: string[], live: LiveSection, kept: Set<string>): Edit[] {
  const { keys: all, closed } = lineOf(live, line)
  if (closed) {
    if (all.length - keys.length < 3) return [{ do: 'remove', list: 'bodies', id: line.slice('bodies.'.length) }]
    return keys.map((key) => ({ do: 'remove-vertex', line, key }))
  }
  return keys.flatMap((key): Edit[] => {
    if (key === all[0] || key === all.at(-1)) {
      kept.add('The ends of ground and base stand at the banks and stay.')
      return []
    }
    return [{ do: 'remove-vertex', line, key }]
  })
}
