import type { Ink, Layer, Plot } from '~/drawing'

/** Two canvases under the overlay: what a change of the answer leaves alone, and what it redraws. */
export type Bucket = 'still' | 'moving'
const STILL: ReadonlySet<Layer> = new Set<Layer>(['frame', 'ground', 'base', 'bodies'])

/**
 * The plot list in two, each with the clips its plots stand in. The order within each stays; the still one lies underneath, as
 * its layers do in the list.
 */
export function split(plots: readonly Plot[]): Record<Bucket, Plot[]> {
  const out: Record<Bucket, Plot[]> = { still: [], moving: [] }
  const open: (Plot & { kind: 'clip-push' })[] = []
  const inside: Record<Bucket, string[]> = { still: [], moving: [] }

  function enter(bucket: Bucket) {
    const list = out[bucket]
    const has = inside[bucket]
    let common = 0
    while (common < has.length && has[common] === open[common]?.id) common++
    while (has.length > common) list.push({ kind: 'clip-pop', id: has.pop() ?? '' })
    for (const clip of open.slice(common)) {
      list.push(clip)
      has.push(clip.id)
    }
  }
  for (const plot of plots) {
    if (plot.kind === 'clip-push') open.push(plot)
    else if (plot.kind === 'clip-pop') open.pop()
    else if (plot.kind === 'group-push' || plot.kind === 'group-pop') continue
    else {
      const bucket = STILL.has(plot.layer) ? 'still' : 'moving'
      enter(bucket)
      out[bucket].push(plot)
    }
  }
  open.length = 0
  enter('still')
  enter('moving')
  return out
}

/** Would two lists paint the same? Stops at the first difference, so that telling costs far less than painting. */
export function samePlots(a: readonly Plot[], b: readonly Plot[]): boolean {
  return a.length === b.length && a.every((plot, i) => samePlot(plot, b[i]))
}

function samePlot(a: Plot, b: Plot | undefined): boolean {
  if (a === b) return true
  if (!b) return false
  switch (a.kind) {
    case 'path':
      return b.kind === 'path' && a.d === b.d && a.fillRule === b.fillRule && sameInk(a.ink, b.ink)
    case 'hatch':
      return (
        b.kind === 'hatch' &&
        a.clip === b.clip &&
        a.marks === b.marks &&
        a.dots === b.dots &&
        a.fill === b.fill &&
        sameInk(a.ink, b.ink)
      )
    case 'text':
      return (
        b.kind === 'text' &&
        a.text === b.text &&
        a.x === b.x &&
        a.y === b.y &&
        a.size === b.size &&
        a.weight === b.weight &&
        a.family === b.family &&
        a.anchor === b.anchor &&
        a.fill === b.fill &&
        a.rotate === b.rotate &&
        a.halo === b.halo &&
        a.haloColour === b.haloColour
      )
    case 'clip-push':
      return b.kind === 'clip-push' && a.d === b.d
    case 'clip-pop':
    case 'group-push':
    case 'group-pop':
      return b.kind === a.kind
    default:
      return a satisfies never
  }
}
const sameInk = (a: Ink, b: Ink) =>
  a.stroke === b.stroke &&
  a.width === b.width &&
  a.fill === b.fill &&
  a.opacity === b.opacity &&
  a.cap === b.cap &&
  a.join === b.join &&
  (a.dash === b.dash || a.dash?.join() === b.dash?.join())
