import type { Mark } from '~/live'
import { onLayer } from '../markup'
import { neat } from '../moves'
import type { At, State, Surface } from '../types'
import type { Nib } from './nib'

/** Points nearer than this on the screen add nothing, px. */
const STEP = 1.5
/** A stroke is cut into a new one beyond this, so that one message stays small. */
const MOST = 1500

/** The nib is down. The stroke goes to the others while it is drawn and becomes one mark when the nib is lifted. */
export function inking(surface: Surface, nib: Nib, from: At, back: () => State): State {
  const { sheet } = surface
  const id = surface.id('k')
  const order = surface.order()
  const points: Mark['points'] = []
  let last: At | null = null

  const mark = (layer: string): Mark => ({
    id,
    layer,
    kind: nib,
    points: [...points],
    ink: nib === 'pen' ? 'trouble' : 'recharge',
    width: nib === 'pen' ? 0.6 : 4,
    by: surface.who() ?? undefined,
    order,
  })
  function add(at: At) {
    if (last && Math.hypot(at.px - last.px, at.py - last.py) < STEP) return
    if (points.length >= MOST) return
    last = at
    const [x, z] = [neat(at.x), neat(at.z)]
    points.push(at.kind === 'pen' ? [x, z, Math.round(at.pressure * 100) / 100] : [x, z])
    sheet.gesture.show(onLayer(surface, mark))
  }
  return {
    name: `${nib}.inking`,
    busy: true,
    cursor: 'crosshair',
    enter() {
      sheet.gesture.start()
      add(from)
    },
    move(at) {
      add(at)
      return undefined
    },
    up(at) {
      add(at)
      sheet.gesture.finish()
      return back()
    },
    cancel() {
      sheet.gesture.cancel()
      return back()
    },
  }
}
