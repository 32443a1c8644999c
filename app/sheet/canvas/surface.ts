import { show as showQuantity } from '../panels/fields/quantities'
import type { OpenSheet } from '../sheet-store'
import { freshId } from '../tools/fresh-id'
import { handleAt } from '../tools/handles'
import { insideBox } from '../tools/inside'
import { neat } from '../tools/moves'
import type { At, Draft, Handle, Hit, Snapped, Spot, Surface } from '../tools/types'
import { pickAt, snapTo } from './picking'
import type { Picture } from './picture'

const FOOT = 0.3048

/** What the surface needs of the mounted canvas. */
export type Ground = {
  sheet: OpenSheet
  picture(): Picture | null
  handles(): Handle[]
  show(draft: Draft | null): void
  pan(dx: number, dy: number): void
  askText(px: number, py: number, initial: string): Promise<string | null>
}

/** The spot in pixels on the section's scales. */
export function toPixels(picture: Picture, { x, z }: Spot): { x: number; y: number } {
  const { ax, bx, ay, by } = picture.frame
  return { x: ax + bx * x, y: ay + by * z }
}
export function toMetres(picture: Picture, px: number, py: number): Spot {
  const { ax, bx, ay, by } = picture.frame
  return { x: (px - ax) / bx, z: (py - ay) / by }
}

/** The largest 1, 2 or 5 times a power of ten not above a size: the finest step a pixel can show. */
export function stepBelow(size: number): number {
  const power = 10 ** Math.floor(Math.log10(size))
  const times = size / power
  return (times >= 5 ? 5 : times >= 2 ? 2 : 1) * power
}

export function createSurface(ground: Ground): Surface {
  const { sheet } = ground
  let counter = 0

  const scale = (): Spot => {
    const frame = ground.picture()?.frame
    return frame ? { x: 1 / frame.bx, z: 1 / Math.abs(frame.by) } : { x: 1, z: 0.1 }
  }
  function tidy({ x, z }: Spot): Spot {
    const unit = sheet.get().units === 'us' ? FOOT : 1
    const by = scale()
    const round = (value: number, size: number) => {
      const step = stepBelow(size / unit) * unit
      return neat(Math.round(value / step) * step)
    }
    return { x: round(x, by.x), z: round(z, by.z) }
  }

  return {
    sheet,
    scale,
    hit(at: At): Hit | null {
      const picture = ground.picture()
      if (!picture) return null
      const handle =
        sheet.get().may === 'write' ? handleAt(ground.handles(), at, (one) => toPixels(picture, one)) : null
      if (handle) return { path: handle.of, handle }
      const path = pickAt(picture, sheet.get(), at)
      return path === null ? null : { path }
    },
    inside: (box) => {
      const { live, caseId, showMarkup } = sheet.get()
      return insideBox(box, live, caseId, showMarkup)
    },
    snap(spot, { except = [], free = false }): Snapped {
      const picture = ground.picture()
      if (!picture || free || !sheet.get().snap) return { ...tidy(spot), to: null }
      return snapTo(picture, sheet.get(), spot, except) ?? { ...tidy(spot), to: null }
    },
    tidy,
    show: ground.show,
    askText(at, initial) {
      const picture = ground.picture()
      const { x, y } = picture ? toPixels(picture, at) : { x: 20, y: 20 }
      return ground.askText(x, y, initial)
    },
    pan: ground.pan,
    id: freshId,
    order() {
      counter += 1
      return `${Date.now().toString(36).padStart(9, '0')}${counter.toString(36).padStart(4, '0')}V`
    },
    today: () => new Date().toISOString().slice(0, 10),
    who: () => sheet.me()?.name ?? null,
    length: (metres) => showQuantity(metres, 'length', sheet.get().units),
  }
}
