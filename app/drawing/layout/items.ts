import { getStroke } from 'perfect-freehand'
import { hatchMarks } from '../hatch/marks'
import type { PanelFrame, Plot, Rect } from '../plot'
import type { Item, TextItem } from '../scene'
import { inkOf, palette, type Theme } from '../styles'
import type { Device } from './frames'
import { deviceX, deviceY, fixed, pathOf, ticksOf } from './path'
import { drawSymbol } from './symbols'

/** One item of the scene in device units. Text is placed apart, when all of it is known. */
export function plotItem(item: Exclude<Item, TextItem>, frame: PanelFrame, device: Device, theme: Theme): Plot[] {
  const u = device.unit
  const base = {
    id: item.id,
    of: item.of,
    role: item.role,
    layer: item.layer,
    ...(item.label !== undefined && { label: item.label }),
  }
  const ink = inkOf(item.role, theme, u)
  switch (item.kind) {
    case 'path': {
      const { fill: _, ...stroke } = ink
      const plots: Plot[] = [{ ...base, kind: 'path', d: pathOf(frame, item.points, item.closed), ink: stroke }]
      if (item.ticks) {
        const d = ticksOf(frame, item.points, item.ticks, u, frame.box.x, frame.box.x + frame.box.width)
        if (d)
          plots.push({
            ...base,
            id: `${item.id}-ticks`,
            of: 'frame',
            kind: 'path',
            d,
            ink: { ...stroke, width: (stroke.width ?? 1) * 0.4 },
          })
      }
      return plots
    }
    case 'area': {
      const d = item.rings.map((ring) => pathOf(frame, ring, true)).join('')
      if (item.hatch === 'none') return [{ ...base, kind: 'path', d, ink, fillRule: 'evenodd' }]
      const box = seen(
        item.rings.flat().map(({ x, z }) => ({ x: deviceX(frame, x), y: deviceY(frame, z) })),
        frame.box,
        u,
      )
      const origin = { x: frame.ax, y: frame.ay }
      const { marks, dots } = box ? hatchMarks(item.hatch, box, u, origin) : { marks: '', dots: '' }
      return [
        { ...base, kind: 'hatch', hatch: item.hatch, clip: d, ...(ink.fill && { fill: ink.fill }), ink, marks, dots },
      ]
    }
    case 'symbol': {
      const x = deviceX(frame, item.at.x) + (item.shift?.dx ?? 0) * u
      const y = deviceY(frame, item.at.z) + (item.shift?.dy ?? 0) * u
      const dx = (item.direction?.x ?? 1) * frame.bx
      const dy = (item.direction?.z ?? 0) * frame.by
      const long = Math.hypot(dx, dy) || 1
      const drawn = drawSymbol(item.symbol, x, y, u, { x: dx / long, y: dy / long }, item.scale ?? 1)
      const plots: Plot[] = []
      const { fill, dash: _, ...stroke } = ink
      if (drawn.face)
        plots.push({ ...base, kind: 'path', d: drawn.face, ink: { ...stroke, fill: faceOf(item.role, theme) } })
      if (drawn.line) plots.push({ ...base, id: `${item.id}-line`, kind: 'path', d: drawn.line, ink: stroke })
      if (drawn.solid)
        plots.push({
          ...base,
          id: `${item.id}-solid`,
          kind: 'path',
          d: drawn.solid,
          ink: { fill: stroke.stroke ?? fill },
        })
      return plots
    }
    case 'ink': {
      const points = item.points.map(({ x, z, pressure }) => [deviceX(frame, x), deviceY(frame, z), pressure ?? 0.5])
      const outline = getStroke(points, {
        size: item.width * u * (item.highlight ? 1 : 1.6),
        thinning: item.highlight ? 0 : 0.5,
        simulatePressure: item.points.every(({ pressure }) => pressure === undefined),
        last: true,
      })
      const d = outline.map(([x = 0, y = 0], i) => `${i === 0 ? 'M' : 'L'}${fixed(x)} ${fixed(y)}`).join('')
      return d
        ? [
            {
              ...base,
              kind: 'path',
              d: `${d}Z`,
              ink: { fill: ink.fill ?? palette(theme).ink, ...(ink.opacity !== undefined && { opacity: ink.opacity }) },
            },
          ]
        : []
    }
    default:
      return item satisfies never
  }
}

const faceOf = (role: Item['role'], theme: Theme) => {
  const colours = palette(theme)
  return role === 'ditch' ? colours.openWater : role === 'problem' ? colours.troubleTint : colours.sheet
}

/** The part of a ring's box that can be seen, or null. */
function seen(points: { x: number; y: number }[], box: Rect, unit: number): Rect | null {
  const coarse = 6 * unit
  let [x0, x1, y0, y1] = [
    Number.POSITIVE_INFINITY,
    Number.NEGATIVE_INFINITY,
    Number.POSITIVE_INFINITY,
    Number.NEGATIVE_INFINITY,
  ]
  for (const { x, y } of points) {
    x0 = Math.min(x0, x)
    x1 = Math.max(x1, x)
    y0 = Math.min(y0, y)
    y1 = Math.max(y1, y)
  }
  const x = Math.max(x0, box.x)
  const y = Math.max(y0, box.y)
  const width = Math.min(x1, box.x + box.width) - x
  const height = Math.min(y1, box.y + box.height) - y
  if (!(width > 0 && height > 0)) return null
  // Rounded outwards, so that a small move leaves the same box and with it the same marks.
  const left = Math.max(box.x, Math.floor(x / coarse) * coarse)
  const top = Math.max(box.y, Math.floor(y / coarse) * coarse)
  const right = Math.min(box.x + box.width, Math.ceil((x + width) / coarse) * coarse)
  const bottom = Math.min(box.y + box.height, Math.ceil((y + height) / coarse) * coarse)
  return { x: left, y: top, width: right - left, height: bottom - top }
}
