import type { State, Surface } from '../types'
import { panning } from './panning'

export const idle = (surface: Surface): State => ({
  name: 'hand.idle',
  cursor: 'grab',
  hint: 'Drag the sheet. With any other tool, hold Space or use two fingers.',
  down: (at) => panning(surface, at, () => idle(surface)),
})
