import type { Plot } from '~/drawing'
import type { SheetState } from '../state'
import { vertexPath } from '../tools/paths'
import { snapSpot } from '../tools/snapping'
import type { At, Snapped, Spot } from '../tools/types'
import { gridOf } from './grid'
import { pathOf } from './painter'
import type { Picture } from './picture'

/** How near the pointer must be to a line, px. */
const REACH = { mouse: 6, pen: 8, touch: 16 } as const
/** Objects that can be picked, as the drawing names them. */
const PICKABLE = /^(left|right|ground|base|bodies|recharge|features|observations|limits|marks)\b/

let scratch: CanvasRenderingContext2D | null = null
/** A context nobody sees, to ask whether a point lies on a path as it is drawn. */
function measuring(): CanvasRenderingContext2D | null {
  scratch ??= document.createElement('canvas').getContext('2d')
  return scratch
}

/** The topmost thing that is drawn under the pointer: lines within reach before the areas they lie in. */
export function pickAt(picture: Picture, state: SheetState, at: At): string | null {
  const ctx = measuring()
  if (!ctx) return null
  const seen = drawnAt(ctx, picture.list.plots, at)
  let area: string | null = null
  ctx.lineWidth = REACH[at.kind] * 2
  for (let i = seen.length - 1; i >= 0; i--) {
    const plot = seen[i]
    if (!plot) continue
    const path = pickPath(plot.of, state)
    if (path === null) continue
    if (onLine(ctx, plot, at)) return path
    if (area === null && inArea(ctx, plot, at)) area = path
  }
  return area
}

type Drawn = Extract<Plot, { of: string }>

/** Plots of things that can be picked and are not clipped away at the pointer: what cannot be seen is not picked. */
function drawnAt(ctx: CanvasRenderingContext2D, plots: readonly Plot[], at: At): Drawn[] {
  const drawn: Drawn[] = []
  let hidden = 0
  let depth = 0
  for (const plot of plots) {
    if (plot.kind === 'clip-push') {
      depth += 1
      if (hidden === 0 && !ctx.isPointInPath(pathOf(plot.d), at.px, at.py)) hidden = depth
    } else if (plot.kind === 'clip-pop') {
      if (hidden === depth) hidden = 0
      depth -= 1
    } else if (hidden === 0 && 'of' in plot && PICKABLE.test(plot.of)) drawn.push(plot)
  }
  return drawn
}

function onLine(ctx: CanvasRenderingContext2D, plot: Drawn, at: At): boolean {
  if (plot.kind === 'path') return ctx.isPointInStroke(pathOf(plot.d), at.px, at.py)
  if (plot.kind !== 'text') return false
  const half = plot.size * 0.32 * plot.text.length
  const middle = plot.anchor === 'start' ? plot.x + half : plot.anchor === 'end' ? plot.x - half : plot.x
  return Math.abs(at.px - middle) <= half + 2 && at.py <= plot.y + 4 && at.py >= plot.y - plot.size - 2
}
function inArea(ctx: CanvasRenderingContext2D, plot: Drawn, at: At): boolean {
  // The ground and the base are lines to pick, not the whole soil above and below.
  if (/^(ground|base)\b/.test(plot.of)) return false
  if (plot.kind === 'hatch') return ctx.isPointInPath(pathOf(plot.clip), at.px, at.py, 'evenodd')
  if (plot.kind === 'path' && plot.ink.fill) return ctx.isPointInPath(pathOf(plot.d), at.px, at.py, plot.fillRule)
  return false
}

/** The drawing counts vertices ("ground.3"); what is picked is told by keys, which stay when others insert some. */
export function pickPath(of: string, { live }: SheetState): string | null {
  const [head = '', id, field, index] = of.split('.')
  if (head === 'ground' || head === 'base') {
    const key = id === undefined ? undefined : live.keys[head][Number(id)]
    return key === undefined ? head : vertexPath(head, key)
  }
  if (head === 'left' || head === 'right') return head
  if (id === undefined) return null
  if (head === 'bodies' && field === 'outline' && index !== undefined) {
    const key = live.keys.bodies[id]?.[Number(index)]
    return key === undefined ? `bodies.${id}` : vertexPath(`bodies.${id}`, key)
  }
  if (head === 'marks') {
    const mark = live.markup.marks.find((one) => one.id === id)
    const layer = live.markup.layers.find((one) => one.id === mark?.layer)
    if (!mark || layer?.locked || layer?.hidden) return null
  }
  return `${head}.${id}`
}

export function snapTo(picture: Picture, state: SheetState, spot: Spot, except: readonly string[]): Snapped | null {
  const { bx, by } = picture.frame
  return snapSpot(spot, {
    live: state.live,
    caseId: state.caseId,
    solution: state.solution,
    scale: { x: 1 / bx, z: 1 / Math.abs(by) },
    grid: state.grid ? gridOf(picture.frame, state.units) : { x: 0, z: 0 },
    except,
  })
}
