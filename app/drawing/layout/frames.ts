import type { PanelFrame, Rect } from '../plot'
import type { Scene } from '../scene'

/** What part of the section is shown; as the sheet keeps it. */
export type ShownView = { x0: number; x1: number; zMid: number; exaggeration: number }

export type Device = {
  width: number
  height: number
  /** Device units per paper millimetre: 96/25.4 on a screen, 1 on paper in mm. */
  unit: number
  /** Box left for the panels, inside rulers and title block. */
  area: Rect
  gap: number
}

// Even figures that people read off a title block; fine enough that the drawing fills its place.
const STEPS = [
  0.05, 0.1, 0.2, 0.5, 1, 1.5, 2, 2.5, 3, 4, 5, 6, 8, 10, 12, 15, 20, 25, 30, 40, 50, 60, 80, 100, 150, 200, 300, 500,
  1000,
]
/** The largest usual exaggeration (1, 2, 5 …) not above the one that just fits. */
export function neatExaggeration(fits: number): number {
  const found = [...STEPS].reverse().find((step) => step <= fits)
  return found ?? Math.max(fits, 1e-3)
}

/** Boxes and scales of all panels: one x scale, heights by share; the section's own by the view or so that it fits. */
export function framesOf(
  scene: Scene,
  device: Device,
  view: ShownView | null,
): { frames: PanelFrame[]; exaggeration: number } {
  const { area, gap } = device
  const x0 = view?.x0 ?? scene.x.min
  const x1 = view?.x1 ?? scene.x.max
  const bx = area.width / (x1 - x0)
  const ax = area.x - bx * x0
  const room = area.height - gap * (scene.panels.length - 1)
  const frames: PanelFrame[] = []
  let exaggeration = 1
  let y = area.y
  for (const panel of scene.panels) {
    const box: Rect = { x: area.x, y, width: area.width, height: room * panel.share }
    y += box.height + gap
    const { min, max } = panel.range
    if (panel.id === 'section') {
      exaggeration = view?.exaggeration ?? neatExaggeration(box.height / (max - min) / bx)
      const by = -bx * exaggeration
      const zMid = view?.zMid ?? (min + max) / 2
      frames.push({ id: panel.id, box, ax, bx, ay: box.y + box.height / 2 - by * zMid, by })
    } else {
      const by = -box.height / (max - min || 1)
      frames.push({ id: panel.id, box, ax, bx, ay: box.y - by * max, by })
    }
  }
  return { frames, exaggeration }
}
