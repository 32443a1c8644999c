import type { Ink, Plot, PlotHatch, PlotPath, PlotText } from '~/drawing'
import { patternOf } from './hatch-cache'

/**
 * The canvas painter: walks a plot list and does what it says. The konva layers hand it their drawing context; nothing here
 * decides how anything looks. A new kind of plot makes `paint` fail to compile until it knows it.
 */
export function paint(ctx: CanvasRenderingContext2D, plots: readonly Plot[]): void {
  for (const plot of plots) {
    switch (plot.kind) {
      case 'path':
        paintPath(ctx, plot)
        break
      case 'text':
        paintText(ctx, plot)
        break
      case 'hatch':
        paintHatch(ctx, plot)
        break
      case 'clip-push':
        ctx.save()
        ctx.clip(pathOf(plot.d))
        break
      case 'clip-pop':
        ctx.restore()
        break
      case 'group-push':
      case 'group-pop':
        break
      default:
        unknown(plot)
    }
  }
}

function unknown(plot: never): never {
  throw new Error(`The painter does not know ${JSON.stringify(plot)}`)
}

/**
 * Parsed paths by their text. A drag changes a few of some hundred paths; the others are parsed once. Two generations: what
 * was not asked for during a whole generation is dropped.
 */
let young = new Map<string, Path2D>()
let old = new Map<string, Path2D>()
const GENERATION = 3000

export function pathOf(d: string): Path2D {
  let path = young.get(d)
  if (path) return path
  path = old.get(d) ?? new Path2D(d)
  if (young.size >= GENERATION) {
    old = young
    young = new Map()
  }
  young.set(d, path)
  return path
}

function stroke(ctx: CanvasRenderingContext2D, ink: Ink, path: Path2D) {
  if (!ink.stroke || ink.width === 0) return
  ctx.strokeStyle = ink.stroke
  ctx.lineWidth = ink.width ?? 1
  ctx.lineCap = ink.cap ?? 'butt'
  ctx.lineJoin = ink.join ?? 'miter'
  ctx.setLineDash(ink.dash ?? NO_DASH)
  ctx.stroke(path)
}
const NO_DASH: number[] = []

function paintPath(ctx: CanvasRenderingContext2D, { d, ink, fillRule }: PlotPath) {
  const path = pathOf(d)
  const before = ctx.globalAlpha
  if (ink.opacity !== undefined) ctx.globalAlpha = before * ink.opacity
  if (ink.fill) {
    ctx.fillStyle = ink.fill
    ctx.fill(path, fillRule ?? 'nonzero')
  }
  stroke(ctx, ink, path)
  ctx.globalAlpha = before
}

function paintHatch(ctx: CanvasRenderingContext2D, plot: PlotHatch) {
  const { clip, fill, ink, marks, dots } = plot
  const outline = pathOf(clip)
  const before = ctx.globalAlpha
  if (ink.opacity !== undefined) ctx.globalAlpha = before * ink.opacity
  if (fill) {
    ctx.fillStyle = fill
    ctx.fill(outline, 'evenodd')
  }
  if (marks || dots) {
    const draw = (on: CanvasRenderingContext2D) => {
      if (marks) stroke(on, ink, pathOf(marks))
      if (!dots) return
      on.fillStyle = ink.stroke ?? ink.fill ?? 'transparent'
      on.fill(pathOf(dots))
    }
    const pattern = patternOf(ctx, plot, draw)
    if (pattern) {
      ctx.fillStyle = pattern
      ctx.fill(outline, 'evenodd')
    } else {
      ctx.save()
      ctx.clip(outline, 'evenodd')
      draw(ctx)
      ctx.restore()
    }
  }
  ctx.globalAlpha = before
}

/** Work Sans is shipped with the app; DejaVu Sans has the signs it lacks. */
export const FAMILIES = {
  sans: '"Work Sans", "DejaVu Sans", sans-serif',
  symbols: '"DejaVu Sans", "Work Sans", sans-serif',
} as const
const ALIGN = { start: 'left', middle: 'center', end: 'right' } as const

function paintText(ctx: CanvasRenderingContext2D, plot: PlotText) {
  const { x, y, text, size, weight, family, anchor, fill, rotate, halo, haloColour } = plot
  ctx.font = `${weight} ${size}px ${FAMILIES[family]}`
  ctx.textAlign = ALIGN[anchor]
  ctx.textBaseline = 'alphabetic'
  if (rotate) {
    ctx.save()
    ctx.translate(x, y)
    ctx.rotate((rotate * Math.PI) / 180)
    write(ctx, text, 0, 0, fill, halo, haloColour)
    ctx.restore()
  } else write(ctx, text, x, y, fill, halo, haloColour)
}

function write(
  ctx: CanvasRenderingContext2D,
  text: string,
  x: number,
  y: number,
  fill: string,
  halo: number | undefined,
  haloColour: string | undefined,
) {
  if (halo && haloColour) {
    ctx.strokeStyle = haloColour
    ctx.lineWidth = halo * 2
    ctx.lineJoin = 'round'
    ctx.setLineDash(NO_DASH)
    ctx.strokeText(text, x, y)
  }
  ctx.fillStyle = fill
  ctx.fillText(text, x, y)
}
