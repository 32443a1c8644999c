import type { ToolName } from '../state'
import type { Command } from './types'

/** Tools that change nothing, for those who may only read. */
const READING: readonly ToolName[] = ['pick', 'hand']

export const TOOL_KEYS: { tool: ToolName; key: string; label: string }[] = [
  { tool: 'pick', key: 'V', label: 'Pick and move' },
  { tool: 'hand', key: 'H', label: 'Move the sheet' },
  { tool: 'ground', key: 'G', label: 'Draw the ground line' },
  { tool: 'base', key: 'B', label: 'Draw the base' },
  { tool: 'bank', key: 'K', label: 'Set the water at a bank' },
  { tool: 'body', key: 'O', label: 'Outline a body' },
  { tool: 'recharge', key: 'R', label: 'Recharge zone' },
  { tool: 'ditch', key: 'D', label: 'Ditch' },
  { tool: 'drain', key: 'A', label: 'Drain' },
  { tool: 'trench', key: 'T', label: 'Pumped trench' },
  { tool: 'wall', key: 'W', label: 'Cut-off wall' },
  { tool: 'observation', key: 'P', label: 'Observation' },
  { tool: 'limit', key: 'L', label: 'Limit' },
  { tool: 'note', key: 'N', label: 'Note' },
  { tool: 'dimension', key: 'M', label: 'Dimension' },
  { tool: 'pen', key: 'I', label: 'Pen' },
  { tool: 'highlight', key: 'U', label: 'Highlight' },
  { tool: 'eraser', key: 'E', label: 'Rub out marks' },
]

export const TOOL_COMMANDS: Command[] = TOOL_KEYS.map(({ tool, key, label }) => ({
  id: `tool-${tool}`,
  label,
  group: 'tool',
  keys: [key],
  on: (state) => state.tool === tool,
  enabled: (state) => state.may === 'write' || READING.includes(tool),
  run: ({ sheet }) => sheet.set({ tool }),
}))
