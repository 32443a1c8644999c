import { mayDraw } from '../start'
import type { State, Surface } from '../types'
import { writing } from './writing'

export function idle(surface: Surface): State {
  return {
    name: 'note.idle',
    cursor: 'text',
    hint: 'Click where the note belongs and write it.',
    up: (at) => (mayDraw(surface) ? writing(surface, at, () => idle(surface)) : undefined),
  }
}
