import type { Layer, Plot } from '~/drawing'

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

/** Would two lists paint the same? Plots keep their identity where nothing changed; otherwise their members are compared. */
export function samePlots(a: readonly Plot[], b: readonly Plot[]): boolean {
  return a.length === b.length && a.every((plot, i) => samePlot(plot, b[i]))
}
function samePlot(a: Plot, b: Plot | undefined): boolean {
  if (a === b) return true
  if (!b || a.kind !== b.kind) return false
  const left = Object.entries(a)
  const right: Record<string, unknown> = { ...b }
  return left.every(([key, value]) => {
    const other = right[key]
    return Object.is(value, other) || (key === 'ink' && JSON.stringify(value) === JSON.stringify(other))
  })
}
