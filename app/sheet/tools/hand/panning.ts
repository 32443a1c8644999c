import type { At, State, Surface } from '../types'

export function panning(surface: Surface, from: At, back: () => State): State {
  let last = from
  return {
    name: 'hand.panning',
    busy: true,
    cursor: 'grabbing',
    move(at) {
      surface.pan(at.px - last.px, at.py - last.py)
      last = at
      return undefined
    },
    up: back,
    cancel: back,
  }
}
