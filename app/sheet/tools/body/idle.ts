import { spotLine } from '../readout'
import { mayDraw } from '../start'
import type { State, Surface } from '../types'
import { outlining } from './outlining'

export function idle(surface: Surface): State {
  return {
    name: 'body.idle',
    cursor: 'crosshair',
    hint: 'Click round the body of other material, corner by corner.',
    down(at) {
      if (!mayDraw(surface)) return undefined
      const snap = surface.snap(at, { free: at.alt })
      const corner = snap.to === null ? surface.tidy(at) : { x: snap.x, z: snap.z }
      return outlining(surface, corner, () => idle(surface))
    },
    move(at) {
      const snap = surface.snap(at, { free: at.alt })
      surface.show({ snap: snap.to === null ? null : snap, readout: { at, lines: [spotLine(surface, snap)] } })
      return undefined
    },
    exit: () => surface.show(null),
  }
}
