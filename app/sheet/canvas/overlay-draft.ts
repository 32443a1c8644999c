import type { OverInks } from './overlay-inks'
import type { Over } from './overlay-types'
import { toPixels } from './surface'

const FONT = '500 12px "Work Sans", "DejaVu Sans", sans-serif'
const LINE = 16

/** The line being set, the marquee, the snap mark and the slip with the numbers at the pointer. */
export function paintDraft(ctx: CanvasRenderingContext2D, { draft, picture }: Over, inks: OverInks): void {
  if (!draft) return
  if (draft.marquee) {
    const a = toPixels(picture, { x: draft.marquee.x0, z: draft.marquee.z1 })
    const b = toPixels(picture, { x: draft.marquee.x1, z: draft.marquee.z0 })
    ctx.globalAlpha = 0.1
    ctx.fillStyle = inks.pick
    ctx.fillRect(a.x, a.y, b.x - a.x, b.y - a.y)
    ctx.globalAlpha = 1
    ctx.strokeStyle = inks.pick
    ctx.lineWidth = 1
    ctx.setLineDash([4, 3])
    ctx.strokeRect(a.x + 0.5, a.y + 0.5, b.x - a.x, b.y - a.y)
    ctx.setLineDash([])
  }
  if (draft.line && draft.line.length > 0) {
    const points = draft.line.map((spot) => toPixels(picture, spot))
    ctx.beginPath()
    points.forEach(({ x, y }, i) => {
      if (i === 0) ctx.moveTo(x, y)
      else ctx.lineTo(x, y)
    })
    if (draft.closed) {
      ctx.save()
      ctx.globalAlpha = 0.12
      ctx.fillStyle = inks.pick
      ctx.fill()
      ctx.restore()
      ctx.closePath()
    }
    ctx.strokeStyle = inks.pick
    ctx.lineWidth = 1.5
    ctx.setLineDash([])
    ctx.stroke()
    for (const { x, y } of points) {
      ctx.beginPath()
      ctx.arc(x, y, 3, 0, 2 * Math.PI)
      ctx.fillStyle = inks.paper
      ctx.fill()
      ctx.stroke()
    }
  }
  if (draft.snap) paintSnap(ctx, toPixels(picture, draft.snap), draft.snap.to, inks)
  if (draft.readout) {
    const { x, y } = toPixels(picture, draft.readout.at)
    paintSlip(ctx, draft.readout.lines, x, y, picture.list, inks.slip, inks.slipText)
  }
}

/** A small cross in a ring where the pointer has caught, with the word for what it caught. */
function paintSnap(
  ctx: CanvasRenderingContext2D,
  { x, y }: { x: number; y: number },
  to: string | null,
  inks: OverInks,
) {
  ctx.strokeStyle = inks.snap
  ctx.lineWidth = 1.5
  ctx.setLineDash([])
  ctx.beginPath()
  ctx.arc(x, y, 6, 0, 2 * Math.PI)
  ctx.moveTo(x - 10, y)
  ctx.lineTo(x + 10, y)
  ctx.moveTo(x, y - 10)
  ctx.lineTo(x, y + 10)
  ctx.stroke()
  if (to === null || to === 'grid') return
  ctx.font = FONT
  ctx.textAlign = 'right'
  ctx.textBaseline = 'alphabetic'
  ctx.lineWidth = 4
  ctx.lineJoin = 'round'
  ctx.strokeStyle = inks.paper
  ctx.strokeText(to, x - 12, y - 8)
  ctx.fillStyle = inks.snap
  ctx.fillText(to, x - 12, y - 8)
}

/** A slip of lines beside a spot; kept on the sheet, and clear of the pointer. */
export function paintSlip(
  ctx: CanvasRenderingContext2D,
  lines: string[],
  x: number,
  y: number,
  within: { width: number; height: number },
  ground: string,
  text: string,
): void {
  ctx.font = FONT
  const width = Math.max(...lines.map((line) => ctx.measureText(line).width)) + 14
  const height = lines.length * LINE + 8
  const left = x + 16 + width > within.width ? x - 16 - width : x + 16
  const top = Math.max(
    4,
    Math.min(within.height - height - 4, y + 14 + height > within.height ? y - 14 - height : y + 14),
  )
  ctx.fillStyle = ground
  ctx.beginPath()
  ctx.roundRect(left, top, width, height, 3)
  ctx.fill()
  ctx.fillStyle = text
  ctx.textAlign = 'left'
  ctx.textBaseline = 'middle'
  lines.forEach((line, i) => {
    ctx.fillText(line, left + 7, top + 4 + LINE * (i + 0.5) + 0.5)
  })
}
