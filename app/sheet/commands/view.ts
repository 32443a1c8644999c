import type { SheetState, View } from '../state'
import type { Command, Desk } from './types'

const EXAGGERATIONS = [1, 2, 3, 4, 5, 8, 10, 15, 20, 30, 50, 100]
const ZOOM = 1.4

const seen = (state: SheetState): View | null => state.view ?? state.seen ?? null

/** About the middle of what is shown. */
function zoom({ sheet }: Desk, factor: number) {
  const view = seen(sheet.get())
  if (!view) return
  const middle = (view.x0 + view.x1) / 2
  const half = ((view.x1 - view.x0) / 2) * factor
  sheet.set({ view: { ...view, x0: middle - half, x1: middle + half }, following: null })
}
function exaggerate({ sheet }: Desk, way: 1 | -1) {
  const view = seen(sheet.get())
  if (!view) return
  const next =
    way > 0
      ? EXAGGERATIONS.find((times) => times > view.exaggeration * 1.01)
      : EXAGGERATIONS.findLast((times) => times < view.exaggeration * 0.99)
  if (next !== undefined) sheet.set({ view: { ...view, exaggeration: next }, following: null })
}

export const VIEWS: Command[] = [
  {
    id: 'fit',
    label: 'The whole strip',
    group: 'view',
    keys: ['0'],
    enabled: () => true,
    run: ({ sheet }) => sheet.set({ view: null, following: null }),
  },
  {
    id: 'closer',
    label: 'Closer',
    group: 'view',
    keys: ['+', '='],
    enabled: (state) => seen(state) !== null,
    run: (desk) => zoom(desk, 1 / ZOOM),
  },
  {
    id: 'farther',
    label: 'Farther away',
    group: 'view',
    keys: ['-'],
    enabled: (state) => seen(state) !== null,
    run: (desk) => zoom(desk, ZOOM),
  },
  {
    id: 'taller',
    label: 'More vertical exaggeration',
    group: 'view',
    keys: [']'],
    enabled: (state) => seen(state) !== null,
    run: (desk) => exaggerate(desk, 1),
  },
  {
    id: 'flatter',
    label: 'Less vertical exaggeration',
    group: 'view',
    keys: ['['],
    enabled: (state) => seen(state) !== null,
    run: (desk) => exaggerate(desk, -1),
  },
  {
    id: 'exaggeration-fits',
    label: 'Exaggeration that fits the sheet',
    group: 'view',
    keys: ['\\'],
    enabled: () => true,
    run: ({ sheet }) => sheet.set({ view: null, following: null }),
  },
]
