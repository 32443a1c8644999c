import type { Section } from '../types'
import { empty } from './empty'
import { lakeAndSea } from './lake-and-sea'
import { riverAndCanal } from './river-and-canal'
import { twoDitches } from './two-ditches'
import { valleySide } from './valley-side'

const DRAWINGS = {
  empty,
  'river-and-canal': riverAndCanal,
  'two-ditches': twoDitches,
  'valley-side': valleySide,
  'lake-and-sea': lakeAndSea,
} satisfies Record<string, Section>

export type StartingDrawing = keyof typeof DRAWINGS

/** What a new section may start from, with the words of the form that offers them. */
export const STARTING_DRAWINGS: readonly { name: StartingDrawing; label: string; says: string }[] = [
  { name: 'empty', label: 'Empty strip', says: 'Level ground over a level base between two waters; draw the rest.' },
  { name: 'river-and-canal', label: 'River and canal', says: 'Two stages, rain between them: a mound with a divide.' },
  { name: 'two-ditches', label: 'Two ditches', says: 'A drained field: silted ditches, a tile drain, a root zone.' },
  {
    name: 'valley-side',
    label: 'Valley side with no flow',
    says: 'Rock behind, a falling base, a stream at the foot.',
  },
  { name: 'lake-and-sea', label: 'Lake and sea', says: 'A bar of dunes with layers, a ditch and a cut-off wall.' },
]

export const isStartingDrawing = (name: unknown): name is StartingDrawing =>
  typeof name === 'string' && Object.hasOwn(DRAWINGS, name)

/** A fresh copy of a starting drawing: a valid section that may be changed freely. */
export const startingDrawing = (name: StartingDrawing): Section => structuredClone(DRAWINGS[name])
export const emptySection = (): Section => startingDrawing('empty')
