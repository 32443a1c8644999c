import type { ToolName } from '../state'

export type ToolEntry = { tool: ToolName; label: string; key: string; does: string }

/** The rail, in groups: move about; the ground itself; what brings and takes water; what is watched; mark-up. */
export const TOOL_GROUPS: ToolEntry[][] = [
  [
    { tool: 'pick', label: 'pick', key: 'V', does: 'Pick, drag and nudge what is on the sheet' },
    { tool: 'hand', label: 'hand', key: 'H', does: 'Move the sheet under the hand' },
  ],
  [
    { tool: 'ground', label: 'ground', key: 'G', does: 'Add vertices to the ground line' },
    { tool: 'base', label: 'base', key: 'B', does: 'Add vertices to the base' },
    { tool: 'bank', label: 'bank', key: 'K', does: 'Set the water or the closed end of a side' },
    { tool: 'body', label: 'body', key: 'O', does: 'Outline a body of another material' },
  ],
  [
    { tool: 'recharge', label: 'recharge', key: 'R', does: 'Drag out a recharge zone' },
    { tool: 'ditch', label: 'ditch', key: 'D', does: 'Place a ditch: it holds its level both ways' },
    { tool: 'drain', label: 'drain', key: 'A', does: 'Place a drain: it takes water above its level' },
    { tool: 'trench', label: 'trench', key: 'T', does: 'Place a pumped trench' },
    { tool: 'wall', label: 'wall', key: 'W', does: 'Place a cut-off wall' },
  ],
  [
    { tool: 'observation', label: 'observe', key: 'P', does: 'Place an observed head' },
    { tool: 'limit', label: 'limit', key: 'L', does: 'Drag out a level the water must stay below' },
  ],
  [
    { tool: 'note', label: 'note', key: 'N', does: 'Write a note on the mark-up' },
    { tool: 'dimension', label: 'measure', key: 'M', does: 'Drag out a dimension' },
    { tool: 'pen', label: 'pen', key: 'I', does: 'Draw freely on the mark-up' },
    { tool: 'highlight', label: 'wash', key: 'U', does: 'Lay a wash over a place' },
    { tool: 'eraser', label: 'rub out', key: 'E', does: 'Rub out marks of the mark-up' },
  ],
]

/** Tools that change nothing, for those who may only read. */
export const READING_TOOLS: ReadonlySet<ToolName> = new Set<ToolName>(['pick', 'hand'])
/** Tools that write on a mark-up layer. */
export const MARKING_TOOLS: ReadonlySet<ToolName> = new Set<ToolName>([
  'note',
  'dimension',
  'pen',
  'highlight',
  'eraser',
])
