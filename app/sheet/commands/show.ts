import type { SheetState } from '../state'
import type { Command } from './types'

const toggle = (
  key: 'snap' | 'grid' | 'showArrows' | 'showFlowLines' | 'showMarkup' | 'presenting',
  label: string,
  keys: string[],
  enabled: (state: SheetState) => boolean = () => true,
): Command => ({
  id: `toggle-${key}`,
  label,
  group: 'show',
  keys,
  on: (state) => state[key],
  enabled,
  run: ({ sheet }) => sheet.set({ [key]: !sheet.get()[key] }),
})

export const SHOWS: Command[] = [
  toggle('snap', 'Snap to grid, vertices and lines', ['S'], (state) => state.may === 'write'),
  toggle('grid', 'Grid', ['Shift+G']),
  toggle('showArrows', 'Flow arrows', ['F']),
  toggle('showFlowLines', 'Flow lines', ['Shift+F']),
  toggle('showMarkup', 'Mark-up', ['Shift+M']),
  toggle('presenting', 'Present: others may follow', ['Shift+P']),
  {
    id: 'toggle-theme',
    label: 'Paper or night',
    group: 'show',
    keys: ['Shift+N'],
    on: (state) => state.theme === 'dark',
    enabled: () => true,
    run: ({ sheet }) => sheet.set({ theme: sheet.get().theme === 'dark' ? 'light' : 'dark' }),
  },
  {
    id: 'toggle-units',
    label: 'Metres or feet',
    group: 'show',
    keys: ['Shift+U'],
    on: (state) => state.units === 'us',
    enabled: () => true,
    run: ({ sheet }) => sheet.set({ units: sheet.get().units === 'us' ? 'si' : 'us' }),
  },
  {
    id: 'toggle-wheel',
    label: 'Wheel zooms instead of moving the sheet',
    group: 'show',
    keys: ['Shift+W'],
    on: (state) => state.wheel === 'zoom',
    enabled: () => true,
    run: ({ sheet }) => sheet.set({ wheel: sheet.get().wheel === 'zoom' ? 'pan' : 'zoom' }),
  },
]
