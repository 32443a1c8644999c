import type { PanelFrame } from '~/drawing'
import type { Section } from '~/section'
import type { View } from '../state'

/** What the drawing shows as laid out: the section panel's box read back into metres. */
export function seenIn(frame: PanelFrame, exaggeration: number): View {
  const { box, ax, bx, ay, by } = frame
  return {
    x0: (box.x - ax) / bx,
    x1: (box.x + box.width - ax) / bx,
    zMid: (box.y + box.height / 2 - ay) / by,
    exaggeration,
  }
}

/** The scales that a view will have in a box: what a pointer moves by while the picture of it is still to be painted. */
export function scalesOf(view: View, box: PanelFrame['box']): Omit<PanelFrame, 'id'> {
  const bx = box.width / (view.x1 - view.x0)
  const by = -bx * view.exaggeration
  return { box, bx, ax: box.x - bx * view.x0, by, ay: box.y + box.height / 2 - by * view.zMid }
}
type Scales = Omit<PanelFrame, 'id'>

/** The paper moved by pixels under the window. */
export function panned(view: View, frame: Scales, dx: number, dy: number): View {
  return {
    ...view,
    x0: view.x0 - dx / frame.bx,
    x1: view.x1 - dx / frame.bx,
    zMid: view.zMid - dy / frame.by,
  }
}

/** Nearer (factor < 1) or farther; the spot under the pointer stays under it. */
export function zoomed(view: View, frame: Scales, factor: number, px: number, py: number): View {
  const x = (px - frame.ax) / frame.bx
  const z = (py - frame.ay) / frame.by
  return {
    ...view,
    x0: x + (view.x0 - x) * factor,
    x1: x + (view.x1 - x) * factor,
    zMid: z + (view.zMid - z) * factor,
  }
}

/** Narrowest stretch that can be shown, m; and how many times the strip at most. */
const NARROWEST = 0.5
const WIDEST = 20

/** A view that still shows some of the strip: nobody gets lost on blank paper. */
export function kept(view: View, section: Section): View {
  const left = section.left.x
  const length = Math.max(section.right.x - left, 1)
  const middle = (view.x0 + view.x1) / 2
  const width = Math.min(Math.max(view.x1 - view.x0, NARROWEST), length * WIDEST)
  const centre = Math.min(Math.max(middle, left - width * 0.4), left + length + width * 0.4)
  const heights = [...section.ground, ...section.base].map(([, z]) => z)
  const low = Math.min(...heights)
  const high = Math.max(...heights)
  const room = Math.max(high - low, 1)
  return {
    x0: centre - width / 2,
    x1: centre + width / 2,
    zMid: Math.min(Math.max(view.zMid, low - room), high + room),
    exaggeration: view.exaggeration,
  }
}

export const same = (a: View | null | undefined, b: View | null | undefined) =>
  a === b ||
  (!!a &&
    !!b &&
    Math.abs(a.x0 - b.x0) < 1e-9 &&
    Math.abs(a.x1 - b.x1) < 1e-9 &&
    Math.abs(a.zMid - b.zMid) < 1e-9 &&
    Math.abs(a.exaggeration - b.exaggeration) < 1e-9)
