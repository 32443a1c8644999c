import type { Command } from './types'

export const STEPS: Command[] = [
  {
    id: 'undo',
    label: 'Undo my last step',
    group: 'steps',
    keys: ['Mod+Z'],
    enabled: (state) => state.may === 'write' && state.canUndo,
    run: ({ sheet }) => sheet.undo(),
  },
  {
    id: 'redo',
    label: 'Redo',
    group: 'steps',
    keys: ['Mod+Shift+Z', 'Mod+Y'],
    enabled: (state) => state.may === 'write' && state.canRedo,
    run: ({ sheet }) => sheet.redo(),
  },
]
