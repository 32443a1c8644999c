import { APART } from '../moves'
import { spotLine, stretchLine } from '../readout'
import { drawn as done } from '../start'
import type { At, Spot, State, Surface } from '../types'
import { replaceStretch } from './replace'

/** Points are being set. Enter or a double click puts the stretch in place, Backspace takes the last point back. */
export function drawing(surface: Surface, line: 'ground' | 'base', first: Spot, back: () => State): State {
  const { sheet } = surface
  const points: Spot[] = [first]
  // The same keys for the preview and for the stretch that is written.
  const keys: string[] = []
  const keyAt = (i: number) => {
    while (keys.length <= i) keys.push(surface.id('v'))
    return keys[i] ?? ''
  }

  /** A line has one height at each x: the next point must go on the way the stretch has set out. */
  function next(at: At): Spot {
    const snap = surface.snap(at, { free: at.alt, except: [line] })
    const spot = snap.to === null ? surface.tidy(at) : { x: snap.x, z: snap.z }
    const last = points.at(-1) ?? spot
    const way = points.length > 1 ? Math.sign(last.x - (points[0]?.x ?? last.x)) : Math.sign(spot.x - last.x) || 1
    const x = way >= 0 ? Math.max(spot.x, last.x + APART) : Math.min(spot.x, last.x - APART)
    return { x, z: spot.z }
  }
  function show(to?: Spot) {
    const all = to ? [...points, to] : points
    sheet.gesture.show((stored) => {
      let n = 0
      return replaceStretch(stored, line, all, () => keyAt(n++))
    })
    const last = points.at(-1)
    surface.show({
      line: all,
      readout: to && last ? { at: to, lines: [spotLine(surface, to), stretchLine(surface, last, to)] } : undefined,
    })
  }
  function finish(): State {
    show()
    sheet.gesture.finish()
    done(surface, [line], false)
    return back()
  }

  return {
    name: `${line}.drawing`,
    cursor: 'crosshair',
    hint: 'Click for the next point. Enter or a double click ends the stretch, Backspace takes a point back, Escape leaves it.',
    enter() {
      sheet.gesture.start()
      show()
    },
    move(at) {
      show(next(at))
      return undefined
    },
    down(at) {
      points.push(next(at))
      show()
      return undefined
    },
    double: () => finish(),
    key({ key }) {
      if (key === 'Enter') return finish()
      if (key !== 'Backspace') return undefined
      points.pop()
      if (points.length === 0) {
        sheet.gesture.cancel()
        return back()
      }
      show()
      return this
    },
    cancel() {
      sheet.gesture.cancel()
      return back()
    },
    exit: () => surface.show(null),
  }
}
