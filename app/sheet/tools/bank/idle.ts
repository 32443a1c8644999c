import { spotLine } from '../readout'
import { mayDraw } from '../start'
import type { State, Surface } from '../types'
import { sideAt } from './place'
import { placing } from './placing'

export function idle(surface: Surface): State {
  return {
    name: 'bank.idle',
    cursor: 'crosshair',
    hint: 'Click at the edge of the water, at its level. The nearer bank goes there; no-flow and given inflow are in the particulars.',
    down: (at) => (mayDraw(surface) ? placing(surface, sideAt(surface, at.x), at, () => idle(surface)) : undefined),
    move(at) {
      const snap = surface.snap(at, { free: at.alt })
      surface.show({
        snap: snap.to === null ? null : snap,
        readout: { at, lines: [`${sideAt(surface, at.x)} bank`, spotLine(surface, snap)] },
      })
      return undefined
    },
    exit: () => surface.show(null),
  }
}
