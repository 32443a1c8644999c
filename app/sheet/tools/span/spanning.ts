import { spotLine, stretchLine } from '../readout'
import { drawn, far } from '../start'
import type { At, Spot, State, Surface } from '../types'
import { addSpan, pathOf, type Span } from './spans'

/** The first end is set, the second follows the pointer. */
export function spanning(surface: Surface, span: Span, from: At, back: () => State): State {
  const { sheet } = surface
  const id = surface.id(span.slice(0, 1))
  const place = (at: At): Spot => {
    const snap = surface.snap(at, { free: at.alt, except: [pathOf(span, id)] })
    return snap.to === null ? surface.tidy(at) : { x: snap.x, z: snap.z }
  }
  const first = place(from)
  function end(at: At): Spot {
    const spot = place(at)
    if (span !== 'dimension' || !at.shift) return spot
    return Math.abs(at.px - from.px) >= Math.abs(at.py - from.py)
      ? { x: spot.x, z: first.z }
      : { x: first.x, z: spot.z }
  }
  function show(at: At) {
    const spot = end(at)
    sheet.gesture.show(addSpan(surface, span, id, first, spot))
    const flat = span === 'dimension' ? spot : { x: spot.x, z: first.z }
    surface.show({
      line: span === 'recharge' ? undefined : [first, flat],
      readout: { at, lines: [spotLine(surface, spot), stretchLine(surface, first, flat)] },
    })
  }
  return {
    name: `${span}.spanning`,
    busy: true,
    cursor: 'crosshair',
    hint: 'Let go at the other end. Escape leaves it.',
    enter() {
      sheet.gesture.start()
      show(from)
    },
    move(at) {
      show(at)
      return undefined
    },
    up(at) {
      if (!far(from, at)) {
        sheet.gesture.cancel()
        sheet.say('Drag from one end to the other; a click alone has no length.')
        return back()
      }
      show(at)
      drawn(surface, [pathOf(span, id)], at.shift && span !== 'dimension')
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
