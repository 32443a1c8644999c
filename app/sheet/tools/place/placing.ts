import { spotLine } from '../readout'
import { drawn } from '../start'
import type { At, State, Surface } from '../types'
import { addThing, pathOf, type Thing } from './things'

/** The button is down: the thing is there and moves with the pointer until it is let go, water table and all. */
export function placing(surface: Surface, thing: Thing, from: At, back: () => State): State {
  const { sheet } = surface
  const id = surface.id(thing.slice(0, 1))
  function show(at: At) {
    const snap = surface.snap(at, { free: at.alt, except: [pathOf(thing, id)] })
    const spot = snap.to === null ? surface.tidy(at) : { x: snap.x, z: snap.z }
    sheet.gesture.show(addThing(surface, thing, id, spot))
    surface.show({ snap: snap.to === null ? null : snap, readout: { at, lines: [spotLine(surface, spot)] } })
  }
  return {
    name: `${thing}.placing`,
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
      drawn(surface, [pathOf(thing, id)], at.shift)
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
