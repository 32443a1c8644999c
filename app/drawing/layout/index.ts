import type { Plot, PlotList } from '../plot'
import type { Layer, Scene, TextItem } from '../scene'
import type { Theme } from '../styles'
import { FOOT_HEIGHT, footOf } from './foot'
import { type Device, framesOf, type ShownView } from './frames'
import { plotItem } from './items'
import { placeTexts } from './labels'
import { deviceX, deviceY, fixed, pathOf } from './path'
import { rulers } from './rulers'

const SCREEN = 96 / 25.4
const ORDER: Layer[] = ['frame', 'ground', 'base', 'bodies', 'water', 'works', 'results', 'marks', 'mark-up']

export type Viewport = {
  width: number
  height: number
  view?: ShownView | null
  /** Device units per paper mm; a screen's 96 per inch unless told. */
  unit?: number
  /** Caution line and title block along the foot; on unless told. */
  foot?: boolean
  /** Rulers and captions; off for thumbnails. */
  rulers?: boolean
  /** Horizontal scale 1:n on paper. */
  scale?: number | null
  /** Kept clear around drawing and rulers, device units: a frame, a legend, a title block. */
  inset?: { left: number; top: number; right: number; bottom: number }
}

/**
 * The plot list of a scene in device units, y down: scales, exaggeration, sizes, dashes, hatches, culling and label collision
 * are settled here, once, for every painter. Deterministic: the same scene and viewport give the same list.
 */
export function layout(scene: Scene, viewport: Viewport, theme: Theme): PlotList {
  const { width, height, view = null, unit = SCREEN, foot = true, scale = null } = viewport
  const inset = viewport.inset ?? { left: 0, top: 0, right: 0, bottom: 0 }
  const ruled = viewport.rulers !== false
  const small = width / unit < 138
  const device: Device = {
    width,
    height,
    unit,
    gap: ruled ? 2 * unit : 0,
    area: {
      x: inset.left + (ruled ? (small ? 9.5 : 12.5) * unit : 0),
      y: inset.top + (ruled ? 2.5 * unit : 0),
      width: Math.max(width - inset.left - inset.right - (ruled ? (small ? 11.5 : 16) * unit : 0), 10),
      height: Math.max(
        height - inset.top - inset.bottom - (ruled ? 2.5 + 5.5 : 0) * unit - (foot ? FOOT_HEIGHT * unit : 0),
        10,
      ),
    },
  }
  const { frames, exaggeration } = framesOf(scene, device, view)
  const around = ruled ? rulers(scene, frames, device, theme) : { under: [], over: [] }
  const plots: Plot[] = [...around.under]
  const texts: TextItem[] = []
  const clips = new Map(scene.clips.map((clip) => [clip.id, clip]))

  for (const layer of ORDER) {
    for (const frame of frames) {
      const members = scene.items.filter((item) => item.layer === layer && item.panel === frame.id)
      if (members.length === 0) continue
      const { x, y, width: w, height: h } = frame.box
      const id = `${layer}-${frame.id}`
      plots.push({ kind: 'group-push', id, layer, label: layer })
      plots.push({ kind: 'clip-push', id, d: `M${fixed(x)} ${fixed(y)}H${fixed(x + w)}V${fixed(y + h)}H${fixed(x)}Z` })
      let inside: string | undefined
      for (const item of members) {
        if (item.kind === 'text') {
          texts.push(item)
          continue
        }
        if (item.clip !== inside) {
          if (inside) plots.push({ kind: 'clip-pop', id: inside })
          const clip = item.clip ? clips.get(item.clip) : undefined
          if (clip) plots.push({ kind: 'clip-push', id: clip.id, d: pathOf(frame, clip.ring, true) })
          inside = clip ? item.clip : undefined
        }
        plots.push(...plotItem(item, frame, device, theme))
      }
      if (inside) plots.push({ kind: 'clip-pop', id: inside })
      plots.push({ kind: 'clip-pop', id }, { kind: 'group-pop', id })
    }
  }
  plots.push(...around.over)
  if (ruled) plots.push(...placeTexts(texts, scene.items, frames, device, theme))
  if (foot) plots.push(...footOf(scene, device, theme, { scale, exaggeration }))
  return { width, height, plots, frames, scale, exaggeration, theme }
}
export type { ShownView }
export { deviceX, deviceY }
