import { mayDraw } from '../start'
import type { State, Surface } from '../types'
import { rubbing } from './rubbing'

/** Rubs out marks of the mark-up only, never the model. */
export function idle(surface: Surface): State {
  return {
    name: 'eraser.idle',
    cursor: 'cell',
    hint: 'Drag over marks to rub them out. The model is not touched.',
    down: (at) => (mayDraw(surface) ? rubbing(surface, at, () => idle(surface)) : undefined),
  }
}
