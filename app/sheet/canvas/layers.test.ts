import { describe, expect, it } from 'vitest'
import type { Layer, Plot } from '~/drawing'
import { samePlots, split } from './layers'

const path = (id: string, layer: Layer): Plot => ({
  kind: 'path',
  id,
  of: id,
  role: 'ground',
  layer,
  d: 'M0 0L1 1',
  ink: { stroke: '#000' },
})
const clip = (id: string): Plot => ({ kind: 'clip-push', id, d: 'M0 0H9V9Z' })
const unclip = (id: string): Plot => ({ kind: 'clip-pop', id })
const short = (plots: Plot[]) =>
  plots.map((plot) => (plot.kind === 'clip-push' ? `(${plot.id}` : plot.kind === 'clip-pop' ? `${plot.id})` : plot.id))

describe('split', () => {
  it('puts each plot on its canvas, inside the clips it stood in', () => {
    const list = [
      path('grid', 'frame'),
      clip('A'),
      path('ground', 'ground'),
      clip('B'),
      path('water', 'water'),
      unclip('B'),
      path('ground2', 'ground'),
      path('divide', 'results'),
      unclip('A'),
      path('note', 'mark-up'),
    ]
    const { still, moving } = split(list)
    expect(short(still)).toEqual(['grid', '(A', 'ground', 'ground2', 'A)'])
    expect(short(moving)).toEqual(['(A', '(B', 'water', 'B)', 'divide', 'A)', 'note'])
  })
})

describe('samePlots', () => {
  it('sees no change in equal plots and a change in different ones', () => {
    expect(samePlots([path('a', 'ground')], [path('a', 'ground')])).toBe(true)
    expect(samePlots([path('a', 'ground')], [{ ...path('a', 'ground'), d: 'M0 0L2 2' } as Plot])).toBe(false)
    expect(samePlots([path('a', 'ground')], [])).toBe(false)
  })
})
