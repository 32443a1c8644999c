import type { Plot, PlotPath } from '~/drawing'
import { anchorOf } from '../tools/moves'
import { vertexOf } from '../tools/paths'
import type { OverInks } from './overlay-inks'
import type { Over } from './overlay-types'
import { pathOf } from './painter'
import { toPixels } from './surface'

const isPath = (plot: Plot): plot is PlotPath => plot.kind === 'path'

/** A band along whatever the picked thing is drawn with; a ring round a picked vertex. */
export function outlinePicked(
  ctx: CanvasRenderingContext2D,
  { picture, state }: Over,
  picked: readonly string[],
  colour: string,
  dash: number[],
): void {
  const objects = new Set(picked.filter((path) => !vertexOf(path)))
  ctx.strokeStyle = colour
  ctx.lineJoin = 'round'
  ctx.lineCap = 'round'
  ctx.setLineDash(dash)
  if (objects.size > 0) {
    ctx.save()
    const { box } = picture.frame
    ctx.beginPath()
    ctx.rect(box.x, 0, box.width, box.y + box.height)
    ctx.clip()
    ctx.globalAlpha = 0.45
    ctx.lineWidth = 5
    for (const plot of picture.list.plots) if (isPath(plot) && objects.has(plot.of)) ctx.stroke(pathOf(plot.d))
    ctx.restore()
  }
  ctx.lineWidth = 2
  for (const path of picked) {
    const vertex = vertexOf(path) ? anchorOf(path, state.live, state.caseId) : null
    if (!vertex) continue
    const { x, y } = toPixels(picture, vertex)
    ctx.beginPath()
    ctx.arc(x, y, 8, 0, 2 * Math.PI)
    ctx.stroke()
  }
  ctx.setLineDash([])
}

export function paintPicked(ctx: CanvasRenderingContext2D, over: Over, inks: OverInks): void {
  if (over.state.picked.length > 0) outlinePicked(ctx, over, over.state.picked, inks.pick, [])
}

/** Squares at vertices, small rings where a new vertex can be pulled out, bars at ends and levels. Larger for fingers. */
export function paintHandles(ctx: CanvasRenderingContext2D, { picture, handles, touch }: Over, inks: OverInks): void {
  const half = touch ? 7 : 4.5
  ctx.setLineDash([])
  ctx.lineJoin = 'miter'
  for (const handle of handles) {
    const { x, y } = toPixels(picture, handle)
    ctx.beginPath()
    switch (handle.shape) {
      case 'vertex':
        ctx.rect(x - half, y - half, 2 * half, 2 * half)
        break
      case 'mid':
        ctx.arc(x, y, half * 0.62, 0, 2 * Math.PI)
        break
      case 'end':
        ctx.rect(x - half * 0.6, y - half * 1.6, half * 1.2, half * 3.2)
        break
      case 'level':
        ctx.rect(x - half * 1.6, y - half * 0.6, half * 3.2, half * 1.2)
        break
    }
    ctx.fillStyle = handle.picked ? inks.pick : inks.paper
    ctx.fill()
    ctx.strokeStyle = inks.pick
    ctx.lineWidth = handle.shape === 'mid' ? 1 : 1.5
    ctx.stroke()
  }
}
