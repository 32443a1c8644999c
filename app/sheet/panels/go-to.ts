import type { Sheet } from '../state'
import { pickFor } from './paths'

/** Where something is wrong or interesting: pick what it is about, put the reading line there, bring it into view. */
export function goTo(sheet: Sheet, spot: { path?: string; place?: { x: number; to?: number } }) {
  const { live, view } = sheet.get()
  const pick = spot.path === undefined ? null : pickFor(spot.path, live)
  const x = spot.place ? (spot.place.to === undefined ? spot.place.x : (spot.place.x + spot.place.to) / 2) : null
  sheet.set({
    ...(pick ? { picked: [pick] } : {}),
    ...(x === null ? {} : { reading: x }),
    ...(x !== null && view && (x < view.x0 || x > view.x1) ? { view: shifted(view, x) } : {}),
  })
}

function shifted<T extends { x0: number; x1: number }>(view: T, x: number): T {
  const half = (view.x1 - view.x0) / 2
  return { ...view, x0: x - half, x1: x + half }
}
