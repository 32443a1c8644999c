import type { PanelFrame } from '~/drawing'
import type { Reading } from '~/solver'
import { show } from '../panels/fields/quantities'
import type { OverInks } from './overlay-inks'
import type { Over } from './overlay-types'

const FONT = '600 11px "Work Sans", "DejaVu Sans", sans-serif'

/** The reading line through the drawing and every strip, with the number it meets in each. */
export function paintReading(ctx: CanvasRenderingContext2D, { picture, state }: Over, inks: OverInks): void {
  const { reading, read, units } = state
  if (reading === null) return
  const { frames, width } = picture.list
  const x = picture.frame.ax + picture.frame.bx * reading
  const panels = frames.filter((frame) => frame.id !== 'sheet')
  const first = panels[0]
  const last = panels.at(-1)
  if (!first || !last || x < picture.frame.box.x || x > picture.frame.box.x + picture.frame.box.width) return

  ctx.strokeStyle = inks.ink
  ctx.lineWidth = 1
  ctx.globalAlpha = 0.75
  ctx.setLineDash([])
  ctx.beginPath()
  for (const { box } of panels) {
    ctx.moveTo(Math.round(x) + 0.5, box.y)
    ctx.lineTo(Math.round(x) + 0.5, box.y + box.height)
  }
  ctx.stroke()
  ctx.globalAlpha = 1

  if (read) {
    for (const frame of panels) {
      const value = valueIn(frame.id, read)
      if (value === null) continue
      const y = frame.ay + frame.by * value
      if (y < frame.box.y - 1 || y > frame.box.y + frame.box.height + 1) continue
      ring(ctx, x, y, inks)
      label(ctx, textIn(frame, read, units), x + 8, y, width, inks)
    }
  }
  label(ctx, show(reading, 'distance', units), x, last.box.y + last.box.height + 9, width, inks, 'middle')
}

function valueIn(panel: string, read: Reading): number | null {
  if (panel === 'section') return read.head
  if (panel === 'discharge') return read.flow
  // Plotted downwards, as the drawing does.
  if (panel === 'depth') return -read.depth
  return null
}
function textIn(frame: PanelFrame, read: Reading, units: 'si' | 'us'): string {
  if (frame.id === 'discharge') return show(read.flow, 'flow', units)
  return show(frame.id === 'depth' ? read.depth : read.head, 'elevation', units)
}

function ring(ctx: CanvasRenderingContext2D, x: number, y: number, inks: OverInks) {
  ctx.beginPath()
  ctx.arc(x, y, 3.5, 0, 2 * Math.PI)
  ctx.fillStyle = inks.paper
  ctx.fill()
  ctx.strokeStyle = inks.ink
  ctx.lineWidth = 1.5
  ctx.stroke()
}

/** Dark slip with a number; left of the spot where the sheet ends on the right. */
function label(
  ctx: CanvasRenderingContext2D,
  text: string,
  x: number,
  y: number,
  within: number,
  inks: OverInks,
  anchor: 'start' | 'middle' = 'start',
) {
  ctx.font = FONT
  const width = ctx.measureText(text).width + 12
  const wanted = anchor === 'middle' ? x - width / 2 : x + width > within - 4 ? x - 16 - width : x
  const left = Math.max(2, Math.min(within - width - 2, wanted))
  ctx.fillStyle = inks.slip
  ctx.beginPath()
  ctx.roundRect(left, y - 8.5, width, 17, 2)
  ctx.fill()
  ctx.fillStyle = inks.slipText
  ctx.textAlign = 'left'
  ctx.textBaseline = 'middle'
  ctx.fillText(text, left + 6, y + 0.5)
}
