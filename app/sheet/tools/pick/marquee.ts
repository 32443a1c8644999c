import type { At, State, Surface } from '../types'

/** A box pulled over bare paper: what lies wholly inside is picked; with Shift it is added. */
export function marquee(surface: Surface, from: At, first: At, back: () => State): State {
  const { sheet } = surface
  const before = from.shift ? sheet.get().picked : []
  const box = (at: At) => ({
    x0: Math.min(from.x, at.x),
    x1: Math.max(from.x, at.x),
    z0: Math.min(from.z, at.z),
    z1: Math.max(from.z, at.z),
  })
  function show(at: At) {
    const inside = surface.inside(box(at))
    const picked = [...new Set([...before, ...inside])]
    const now = sheet.get().picked
    if (picked.length !== now.length || picked.some((path, i) => path !== now[i])) sheet.set({ picked })
    surface.show({ marquee: box(at) })
  }
  return {
    name: 'pick.marquee',
    busy: true,
    cursor: 'crosshair',
    enter: () => show(first),
    move(at) {
      show(at)
      return undefined
    },
    up: back,
    cancel() {
      sheet.set({ picked: before })
      return back()
    },
    exit: () => surface.show(null),
  }
}
