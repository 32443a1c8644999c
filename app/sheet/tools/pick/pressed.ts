import { panning } from '../hand/panning'
import { far } from '../start'
import type { At, Hit, State, Surface } from '../types'
import { dragging } from './dragging'
import { marquee } from './marquee'

/** The button is down and nothing has moved yet: a click or the start of a drag. */
export function pressed(surface: Surface, from: At, hit: Hit | null, back: () => State): State {
  const { sheet } = surface
  const { picked } = sheet.get()
  const already = hit !== null && picked.includes(hit.path)

  // Ends, levels and edge middles belong to something picked already; they are not things of their own.
  const thing = hit !== null && (hit.handle === undefined || hit.handle.shape === 'vertex')

  // Picked on the press, so that one stroke picks and drags; Shift adds.
  if (thing && !already) sheet.set({ picked: from.shift ? [...picked, hit.path] : [hit.path] })
  else if (!hit && !from.shift && picked.length > 0) sheet.set({ picked: [] })

  return {
    name: 'pick.pressed',
    busy: true,
    move(at) {
      if (!far(from, at)) return undefined
      // A finger on bare paper moves the sheet, as anywhere else on a phone; a marquee is for finer pointers.
      if (!hit) return from.kind === 'touch' ? panning(surface, from, back) : marquee(surface, from, at, back)
      if (sheet.get().may !== 'write') {
        sheet.say('You are reading this section; nothing can be moved from here.', 'trouble')
        return back()
      }
      return dragging(surface, from, at, hit, back)
    },
    up() {
      // A click on one of several picked things: with Shift it drops out, without it stays alone.
      if (thing && already) sheet.set({ picked: from.shift ? picked.filter((path) => path !== hit.path) : [hit.path] })
      return back()
    },
    cancel: back,
  }
}
