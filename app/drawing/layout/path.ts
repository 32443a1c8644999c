import type { PanelFrame } from '../plot'
import type { World } from '../scene'

/** Two decimals: a fiftieth of a millimetre on paper, less than a pixel on a screen. */
export const fixed = (value: number) => String(Math.round(value * 100) / 100)

/** How far outside its panel a point may lie before it is drawn at the rim: canvas and SVG lose precision far out. */
const FAR = 20_000
const rim = (value: number) => (value > FAR ? FAR : Math.max(value, -FAR))

export const deviceX = (frame: PanelFrame, x: number) => frame.ax + frame.bx * x
export const deviceY = (frame: PanelFrame, z: number) => frame.ay + frame.by * z

export function pathOf(frame: PanelFrame, points: readonly World[], closed: boolean): string {
  let d = ''
  for (const [i, { x, z }] of points.entries())
    d += `${i === 0 ? 'M' : 'L'}${fixed(rim(deviceX(frame, x)))} ${fixed(rim(deviceY(frame, z)))}`
  return closed && d ? `${d}Z` : d
}

/** Slanted strokes along a line, on the side away from the open. */
export function ticksOf(
  frame: PanelFrame,
  points: readonly World[],
  side: 'below' | 'left' | 'right',
  unit: number,
  from: number,
  to: number,
): string {
  const step = 3.2 * unit
  let d = ''
  if (side === 'below') {
    for (let i = 1; i < points.length; i++) {
      const a = points[i - 1]
      const b = points[i]
      if (!a || !b) continue
      const x1 = deviceX(frame, a.x)
      const x2 = deviceX(frame, b.x)
      if (x2 < from || x1 > to || x2 <= x1) continue
      const y1 = deviceY(frame, a.z)
      const y2 = deviceY(frame, b.z)
      // Hung on the paper's own origin, so that strokes do not crawl when a vertex moves.
      for (
        let x = Math.max(Math.ceil((x1 - frame.ax) / step) * step + frame.ax, from - step);
        x < Math.min(x2, to);
        x += step
      ) {
        if (x < x1) continue
        const y = y1 + ((x - x1) / (x2 - x1)) * (y2 - y1)
        d += `M${fixed(x)} ${fixed(y)}l${fixed(-1.3 * unit)} ${fixed(1.9 * unit)}`
      }
    }
    return d
  }
  const [a, b] = points
  if (!a || !b) return d
  const x = deviceX(frame, a.x)
  const out = side === 'left' ? -1 : 1
  const low = Math.max(deviceY(frame, a.z), frame.box.y)
  const high = Math.min(deviceY(frame, b.z), frame.box.y + frame.box.height)
  for (let y = low; y < high; y += step * 0.8)
    d += `M${fixed(x)} ${fixed(y)}l${fixed(out * 1.8 * unit)} ${fixed(1.3 * unit)}`
  return d
}
