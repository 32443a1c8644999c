import { spotLine } from '../readout'
import { mayDraw } from '../start'
import type { State, Surface } from '../types'
import { spanning } from './spanning'
import { HINTS, type Span } from './spans'

export function idle(surface: Surface, span: Span): State {
  return {
    name: `${span}.idle`,
    cursor: 'crosshair',
    hint: HINTS[span],
    down: (at) => (mayDraw(surface) ? spanning(surface, span, at, () => idle(surface, span)) : undefined),
    move(at) {
      const snap = surface.snap(at, { free: at.alt })
      surface.show({ snap: snap.to === null ? null : snap, readout: { at, lines: [spotLine(surface, snap)] } })
      return undefined
    },
    exit: () => surface.show(null),
  }
}
