import type { Surface } from './types'

/** True when a drawing tool may begin; otherwise says why not. */
export function mayDraw(surface: Surface): boolean {
  if (surface.sheet.get().may === 'write') return true
  surface.sheet.say('You are reading this section; drawing is for those who may edit it.', 'trouble')
  return false
}

/** After one thing is drawn, it is picked and the pick tool is in hand, unless Shift asks for another of the same. */
export function drawn(surface: Surface, picked: string[], again: boolean) {
  surface.sheet.set(again ? { picked } : { picked, tool: 'pick' })
}

/** A press that moves less than this is a click, px. */
export const SLOP = { mouse: 3, pen: 4, touch: 8 } as const

export const far = (a: { px: number; py: number }, b: { px: number; py: number; kind: keyof typeof SLOP }) =>
  Math.hypot(a.px - b.px, a.py - b.py) > SLOP[b.kind]
