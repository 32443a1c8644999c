import { FOOT, plainNumber, shapeOf } from '~/section'
import { textWidth } from '../fonts/measure'
import type { PanelFrame, Plot } from '../plot'
import type { Scene } from '../scene'
import { inkOf, type Theme } from '../styles'
import type { Device } from './frames'
import { fixed } from './path'

/** A step of 1, 2 or 5 times a power of ten that leaves at least `least` device units between lines. */
export function stepFor(perUnit: number, least: number): number {
  const raw = least / perUnit
  const power = 10 ** Math.floor(Math.log10(raw))
  return ([1, 2, 5, 10].find((times) => times * power >= raw * 0.999) ?? 10) * power
}

/** Rulers, grid and strip captions, in true units of the chosen set. */
export function rulers(
  scene: Scene,
  frames: PanelFrame[],
  device: Device,
  theme: Theme,
): { under: Plot[]; over: Plot[] } {
  const under: Plot[] = []
  const over: Plot[] = []
  const u = device.unit
  const size = 2.65 * u
  const grid = inkOf('grid', theme, u)
  const axis = inkOf('strip-frame', theme, u)
  const soft = inkOf('ruler', theme, u).fill ?? '#000'
  const strong = inkOf('text', theme, u).fill ?? '#000'
  const foot = scene.units === 'us' ? FOOT : 1
  const section = frames.find(({ id }) => id === 'section')
  const last = frames[frames.length - 1]
  if (!section || !last) return { under, over }
  const text = (
    id: string,
    x: number,
    y: number,
    value: string,
    anchor: 'start' | 'middle' | 'end',
    fill = soft,
    weight: 400 | 500 | 600 = 400,
  ): Plot => ({
    kind: 'text',
    id,
    of: 'frame',
    role: 'ruler',
    layer: 'frame',
    x,
    y,
    text: value,
    size,
    weight,
    family: 'sans',
    anchor,
    fill,
  })
  const rule = (id: string, d: string, ink = grid): Plot => ({
    kind: 'path',
    id,
    of: 'frame',
    role: 'grid',
    layer: 'frame',
    d,
    ink,
  })

  const { box } = section
  const stepX = stepFor(section.bx * foot, 22 * u)
  const fromX = (box.x - section.ax) / section.bx / foot
  const toX = (box.x + box.width - section.ax) / section.bx / foot
  const bottom = last.box.y + last.box.height
  let lines = ''
  for (let i = Math.ceil(fromX / stepX); i <= Math.floor(toX / stepX); i++) {
    const px = section.ax + section.bx * i * stepX * foot
    for (const frame of frames) lines += `M${fixed(px)} ${fixed(frame.box.y)}V${fixed(frame.box.y + frame.box.height)}`
    const label = plainNumber(i * stepX, 6)
    if (px + textWidth(label, size) / 2 < box.x + box.width - 4 * u)
      over.push(text(`x-${i}`, px, bottom + size * 1.25, label, 'middle'))
  }
  over.push(text('x-unit', box.x + box.width, bottom + size * 1.25, shapeOf('distance', scene.units).unit, 'end'))

  const stepZ = stepFor(Math.abs(section.by) * foot, 9 * u)
  const fromZ = (box.y + box.height - section.ay) / section.by / foot
  const toZ = (box.y - section.ay) / section.by / foot
  for (let i = Math.ceil(fromZ / stepZ); i <= Math.floor(toZ / stepZ); i++) {
    const py = section.ay + section.by * i * stepZ * foot
    lines += `M${fixed(box.x)} ${fixed(py)}H${fixed(box.x + box.width)}`
    if (py > box.y + size * 1.6 && py < box.y + box.height - size * 0.2)
      over.push(text(`z-${i}`, box.x - 1.6 * u, py + size * 0.35, plainNumber(i * stepZ, 6), 'end'))
  }
  if (scene.grid && lines) under.push(rule('grid', lines))
  over.push(text('z-unit', box.x - 1.6 * u, box.y + size * 0.9, shapeOf('elevation', scene.units).unit, 'end'))

  for (const panel of scene.panels) {
    if (panel.id === 'section') continue
    const frame = frames.find(({ id }) => id === panel.id)
    if (!frame) continue
    const { x, y, width, height } = frame.box
    over.push(
      rule(`${panel.id}-box`, `M${fixed(x)} ${fixed(y)}H${fixed(x + width)}V${fixed(y + height)}H${fixed(x)}Z`, axis),
    )
    over.push(text(`${panel.id}-title`, x + 2 * u, y + size * 1.2, panel.title ?? '', 'start', strong, 600))
    over.push(
      text(
        `${panel.id}-unit`,
        x + 2 * u + textWidth(`${panel.title}  `, size, 600),
        y + size * 1.2,
        panel.unit ?? '',
        'start',
      ),
    )
    // Values at the ends of the strip's own scale.
    const kind = panel.id === 'discharge' ? 'flow' : 'length'
    const shape = shapeOf(kind, scene.units)
    const step = stepFor(Math.abs(frame.by) / shape.times, 6.5 * u)
    const lo = ((y + height - frame.ay) / frame.by) * shape.times
    const hi = ((y - frame.ay) / frame.by) * shape.times
    for (let i = Math.ceil(lo / step); i <= Math.floor(hi / step); i++) {
      const py = frame.ay + frame.by * ((i * step) / shape.times)
      if (py < y + size * 0.7 || py > y + height - size * 0.1) continue
      const shown = panel.id === 'depth' ? -i * step : i * step
      over.push(text(`${panel.id}-${i}`, x - 1.6 * u, py + size * 0.35, plainNumber(shown === 0 ? 0 : shown, 3), 'end'))
    }
  }
  return { under, over }
}
