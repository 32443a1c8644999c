import { spotLine } from '../readout'
import { mayDraw } from '../start'
import type { State, Surface } from '../types'
import { drawing } from './drawing'

const NAMES = { ground: 'ground line', base: 'base' } as const

/** Ground or base: waits for the first point of the stretch to be drawn anew. */
export function idle(surface: Surface, line: 'ground' | 'base'): State {
  return {
    name: `${line}.idle`,
    cursor: 'crosshair',
    hint: `Click along the ${NAMES[line]}, from left to right or back. The stretch you draw replaces the old one.`,
    down(at) {
      if (!mayDraw(surface)) return undefined
      const spot = surface.snap(at, { free: at.alt })
      return drawing(surface, line, spot.to === null ? surface.tidy(at) : spot, () => idle(surface, line))
    },
    move(at) {
      const snap = surface.snap(at, { free: at.alt })
      surface.show({ snap: snap.to === null ? null : snap, readout: { at, lines: [spotLine(surface, snap)] } })
      return undefined
    },
    exit: () => surface.show(null),
  }
}
