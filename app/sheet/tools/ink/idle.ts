import { mayDraw } from '../start'
import type { State, Surface } from '../types'
import { inking } from './inking'
import type { Nib } from './nib'

export function idle(surface: Surface, nib: Nib): State {
  return {
    name: `${nib}.idle`,
    cursor: 'crosshair',
    hint:
      nib === 'pen'
        ? 'Draw on the mark-up layer; the model stays as it is.'
        : 'Draw over what matters; highlights lie on the mark-up layer.',
    down: (at) => (mayDraw(surface) ? inking(surface, nib, at, () => idle(surface, nib)) : undefined),
  }
}
