import { spotLine } from '../readout'
import { drawn } from '../start'
import type { At, State, Surface } from '../types'
import { placeBank } from './place'

export function placing(surface: Surface, side: 'left' | 'right', from: At, back: () => State): State {
  const { sheet } = surface
  function show(at: At) {
    const snap = surface.snap(at, { free: at.alt, except: [side] })
    const spot = snap.to === null ? surface.tidy(at) : { x: snap.x, z: snap.z }
    sheet.gesture.show(placeBank(surface, side, spot))
    surface.show({ readout: { at, lines: [`${side} bank`, spotLine(surface, spot)] } })
  }
  return {
    name: 'bank.placing',
    busy: true,
    cursor: 'crosshair',
    enter() {
      sheet.gesture.start()
      show(from)
    },
    move(at) {
      show(at)
      return undefined
    },
    up(at) {
      show(at)
      drawn(surface, [side], false)
      sheet.gesture.finish()
      return back()
    },
    cancel() {
      sheet.gesture.cancel()
      return back()
    },
    exit: () => surface.show(null),
  }
}
