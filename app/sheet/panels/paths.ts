import type { LineId, ListName, LiveSection } from '~/live'
import type { Section } from '~/section'

const LISTS: readonly ListName[] = ['materials', 'bodies', 'recharge', 'features', 'observations', 'limits', 'cases']
const isList = (name: string): name is ListName => (LISTS as readonly string[]).includes(name)

/** What a path of the format, or a picked path, is about. */
export type Subject =
  | { kind: 'section' }
  | { kind: 'line'; line: 'ground' | 'base' }
  | { kind: 'vertex'; line: LineId; key: string }
  | { kind: 'bank'; side: 'left' | 'right' }
  | { kind: 'object'; list: ListName; id: string }
  | { kind: 'mark'; id: string }

/** Reads a picked path: "ground", "ground.v:KEY", "bodies.b1", "bodies.b1.v:KEY", "left", "features.d1", "marks.m1". */
export function subjectOf(path: string): Subject {
  const [head = '', id = '', tail = ''] = path.split('.')
  if (head === 'left' || head === 'right') return { kind: 'bank', side: head }
  if (head === 'ground' || head === 'base')
    return id.startsWith('v:') ? { kind: 'vertex', line: head, key: id.slice(2) } : { kind: 'line', line: head }
  if (head === 'bodies' && tail.startsWith('v:')) return { kind: 'vertex', line: `bodies.${id}`, key: tail.slice(2) }
  if (isList(head) && id) return { kind: 'object', list: head, id }
  if (head === 'marks' && id) return { kind: 'mark', id }
  return { kind: 'section' }
}

/** The picked path for a path of the format: positions become vertex keys, fields their object ("features.d1.level" → "features.d1"). */
export function pickFor(path: string, live: LiveSection): string | null {
  const [head = '', id = '', field = '', index = ''] = path.split('.')
  if (head === 'left' || head === 'right') return head
  if (head === 'ground' || head === 'base') {
    const key = live.keys[head][Number(id)]
    return id !== '' && key ? `${head}.v:${key}` : head
  }
  if (head === 'bodies' && id) {
    const key = field === 'outline' && index !== '' ? live.keys.bodies[id]?.[Number(index)] : undefined
    return key ? `bodies.${id}.v:${key}` : `bodies.${id}`
  }
  if (isList(head) && id) return `${head}.${id}`
  return null
}

/** Name of a thing for people: its own name, or what it is and where. */
export function nameOf(section: Section, path: string): string {
  const subject = subjectOf(path)
  switch (subject.kind) {
    case 'section':
      return 'Whole section'
    case 'line':
      return subject.line === 'ground' ? 'Ground line' : 'Base'
    case 'vertex':
      return subject.line === 'ground'
        ? 'Ground vertex'
        : subject.line === 'base'
          ? 'Base vertex'
          : `Vertex of ${nameOf(section, subject.line)}`
    case 'bank':
      return section[subject.side].name ?? (subject.side === 'left' ? 'Left bank' : 'Right bank')
    case 'mark':
      return 'Mark'
    case 'object': {
      const found = section[subject.list].find(({ id }) => id === subject.id)
      if (found?.name) return found.name
      return `${objectWord(section, subject.list, subject.id)} ${subject.id}`
    }
  }
}

const WORDS: Record<ListName, string> = {
  materials: 'Material',
  bodies: 'Body',
  recharge: 'Recharge',
  features: 'Feature',
  observations: 'Observation',
  limits: 'Limit',
  cases: 'Case',
}
const FEATURE_WORDS = { ditch: 'Ditch', drain: 'Drain', trench: 'Trench', wall: 'Wall' } as const

export function objectWord(section: Section, list: ListName, id: string): string {
  if (list !== 'features') return WORDS[list]
  const feature = section.features.find((one) => one.id === id)
  return feature ? FEATURE_WORDS[feature.kind] : WORDS.features
}
