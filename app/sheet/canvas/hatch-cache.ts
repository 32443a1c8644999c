import type { PlotHatch } from '~/drawing'

/**
 * Hatches as pictures. A hatch hangs on the ground, not on its outline, so while an outline is dragged its marks stay the same:
 * thousands of strokes are painted once and copied afterwards. Only what is asked for again is kept (a pan makes new marks with
 * every frame), and only so much.
 */
const MOST = 32
/** Largest picture kept, pixels: a hatch over a whole large screen. */
const LARGEST = 8_000_000
/** By the marks themselves: the drawing hands out the same text while they stay the same. */
const kept = new Map<string, { how: string; pattern: CanvasPattern | null; asked: number }>()

/** A fill that holds a hatch's marks where they stand, or null when it is cheaper, or safer, to draw them. */
export function patternOf(
  ctx: CanvasRenderingContext2D,
  plot: PlotHatch,
  draw: (ctx: CanvasRenderingContext2D) => void,
): CanvasPattern | null {
  const ratio = ctx.getTransform().a
  const key = plot.marks || plot.dots
  const how = `${ratio} ${plot.ink.stroke} ${plot.ink.width} ${plot.ink.fill}`
  const known = kept.get(key)
  const entry = known?.how === how ? known : { how, pattern: null, asked: 0 }
  entry.asked += 1
  if (entry.asked === 2) entry.pattern = make(ctx, plot, ratio, draw)
  // Asked for last, dropped last.
  kept.delete(key)
  kept.set(key, entry)
  if (kept.size > MOST) {
    const oldest = kept.keys().next().value
    if (oldest !== undefined) kept.delete(oldest)
  }
  return entry.pattern
}

function make(
  on: CanvasRenderingContext2D,
  plot: PlotHatch,
  ratio: number,
  draw: (ctx: CanvasRenderingContext2D) => void,
): CanvasPattern | null {
  const box = boxOf(`${plot.marks}${plot.dots}`)
  if (!box) return null
  const reach = 12 + (plot.ink.width ?? 1)
  // On whole device pixels, so that the copy is as sharp as the original.
  const x = Math.floor((box.x0 - reach) * ratio)
  const y = Math.floor((box.y0 - reach) * ratio)
  const width = Math.ceil((box.x1 + reach) * ratio) - x
  const height = Math.ceil((box.y1 + reach) * ratio) - y
  if (width * height > LARGEST) return null
  const canvas = document.createElement('canvas')
  canvas.width = width
  canvas.height = height
  const ctx = canvas.getContext('2d')
  if (!ctx) return null
  ctx.setTransform(ratio, 0, 0, ratio, -x, -y)
  draw(ctx)
  const pattern = on.createPattern(canvas, 'no-repeat')
  pattern?.setTransform(new DOMMatrix([1 / ratio, 0, 0, 1 / ratio, x / ratio, y / ratio]))
  return pattern
}

/** Box round all absolute points of a path text; what is drawn relative to them reaches a few pixels further. */
function boxOf(d: string): { x0: number; y0: number; x1: number; y1: number } | null {
  let box: { x0: number; y0: number; x1: number; y1: number } | null = null
  for (const [, a, b] of d.matchAll(/[ML](-?[\d.]+)[ ,](-?[\d.]+)/g)) {
    const [x, y] = [Number(a), Number(b)]
    box = box
      ? { x0: Math.min(box.x0, x), y0: Math.min(box.y0, y), x1: Math.max(box.x1, x), y1: Math.max(box.y1, y) }
      : { x0: x, y0: y, x1: x, y1: y }
  }
  return box
}
