import { spotLine } from '../readout'
import { mayDraw } from '../start'
import type { State, Surface } from '../types'
import { placing } from './placing'
import { HINTS, type Thing } from './things'

export function idle(surface: Surface, thing: Thing): State {
  return {
    name: `${thing}.idle`,
    cursor: 'crosshair',
    hint: HINTS[thing],
    down: (at) => (mayDraw(surface) ? placing(surface, thing, at, () => idle(surface, thing)) : undefined),
    move(at) {
      const snap = surface.snap(at, { free: at.alt })
      surface.show({ snap: snap.to === null ? null : snap, readout: { at, lines: [spotLine(surface, snap)] } })
      return undefined
    },
    exit: () => surface.show(null),
  }
}
