import type { ToolName } from '../state'

/** Our own drawn symbols, 24 × 24, stroked in the current ink. Each is a small picture of what the tool puts on the sheet. */
const TOOLS: Record<ToolName, string> = {
  pick: 'M9 4l4.2 15.2l3.4-5.8l6.4-1.2Z',
  hand: 'M7.5 13V7.2a1.4 1.4 0 0 1 2.8 0V11V5.2a1.4 1.4 0 0 1 2.8 0V11V6a1.4 1.4 0 0 1 2.8 0v6V8.6a1.4 1.4 0 0 1 2.7 0V15c0 3.4-2.2 5.6-5.4 5.6c-3 0-4.6-1.2-6-3.6l-2.6-4.4c-.8-1.5 1-2.6 2-1.4Z',
  ground: 'M2 15l7-6l6 3l7-5M4.5 17l-1.6 2.6M9 13.5l-1.6 2.6M14 15l-1.6 2.6M19 12.6l-1.6 2.6',
  base: 'M2 9l7 3l6-2l7 3M4 13.5l-2 3.5M9 15l-2 3.5M14.5 13.6l-2 3.5M20 15l-2 3.5',
  bank: 'M3 5v10h6l3 4h10M13 9h8M14.5 12h5M16 15h2',
  body: 'M3 16q2-11 9-10t10 6q-1 6-9 6t-10-2ZM7 13h4M13 11h4M11 15.5h5',
  recharge: 'M3 4h18M7 7v11m-2.8-4l2.8 4l2.8-4M17 7v11m-2.8-4l2.8 4l2.8-4',
  ditch: 'M2 7h5l3 11h4l3-11h5M8.4 12h7.2M9.6 14.8h4.8',
  drain:
    'M12 6.5a5.8 5.8 0 1 0 .01 0M6.6 14.2h10.8M1.6 12.3h3.2m-1.6-1.8l1.8 1.8l-1.8 1.8M22.4 12.3h-3.2m1.6-1.8l-1.8 1.8l1.8 1.8',
  trench: 'M6 3v17h12V3M9 15h6M12 12V3m-3 3.4L12 3l3 3.4',
  wall: 'M9.5 3h5v18h-5ZM9.5 8l5-3M9.5 13l5-3M9.5 18l5-3M3 10h4M17 14h4',
  observation: 'M12 3v18M8 14a4 4 0 1 0 8 0a4 4 0 1 0-8 0M9 3h6',
  limit: 'M3 7h18M3 7v4M21 7v4M12 10v9m-2.8-3l2.8 3l2.8-3',
  note: 'M3 5h18v12h-8l-5 4v-4H3ZM7 9h10M7 13h6',
  dimension: 'M3 6v12M21 6v12M3 12h18M6.5 9L3 12l3.5 3M17.5 9L21 12l-3.5 3',
  pen: 'M4 20l3-8L17 3l4 4L11 17ZM7 12l5 5',
  highlight: 'M5 16l8-10l5 4l-8 10H6.5ZM3 21h18',
  eraser: 'M4 15L13 5l7 6l-8 9H8ZM8.6 10l7 6',
}

export function ToolSymbol({ tool }: { tool: ToolName }) {
  return <Drawn path={TOOLS[tool]} />
}

/** Symbols of the shell's own buttons. */
const SHELL = {
  undo: 'M9 6L4 11l5 5M4 11h10a6 6 0 0 1 6 6v2',
  redo: 'M15 6l5 5l-5 5M20 11H10a6 6 0 0 0-6 6v2',
  fit: 'M3 8V4h4M21 8V4h-4M3 16v4h4M21 16v4h-4M7 14q5-6 10-1',
  closer: 'M10 4a6.5 6.5 0 1 0 .01 0M15 15l6 6M7 10.5h7M10.5 7v7',
  farther: 'M10 4a6.5 6.5 0 1 0 .01 0M15 15l6 6M7 10.5h7',
  snap: 'M5 4v8a7 7 0 0 0 14 0V4h-4v8a3 3 0 0 1-6 0V4ZM5 8h4M15 8h4',
  grid: 'M3 8h18M3 16h18M8 3v18M16 3v18',
  arrows: 'M3 9h12m-4-3.4L15 9l-4 3.4M9 17h12m-4-3.4l4 3.4l-4 3.4',
  lines: 'M3 6q9 1 18 12M3 12q6 0 11 7M10 4q7 2 11 7',
  markup: 'M4 17q4-12 8-4t8-6M4 21h16',
  drawing: 'M3 18h18M3 6l6-2l5 3l7-2M3 11q9-4 18 2',
  table: 'M3 5h18v14H3ZM3 10h18M3 14.5h18M9 5v14',
  download: 'M12 3v12m-4.4-4l4.4 4.4L16.4 11M4 20h16',
  more: 'M5 12h.01M12 12h.01M19 12h.01',
  add: 'M12 5v14M5 12h14',
  close: 'M6 6l12 12M18 6L6 18',
  share: 'M8 12h8M10 7H8a5 5 0 0 0 0 10h2M14 7h2a5 5 0 0 1 0 10h-2',
  remove: 'M5 7h14M10 7V4h4v3M7 7l1 13h8l1-13M10.5 11v5M13.5 11v5',
  twice: 'M8 8h12v12H8ZM4 16V4h12',
  eye: 'M2 12q10-13 20 0q-10 13-20 0ZM12 9a3 3 0 1 0 .01 0',
  shut: 'M2 11q10 9 20 0M6 15l-2 3M12 16.4V20M18 15l2 3',
  lock: 'M6 11h12v9H6ZM8.5 11V8a3.5 3.5 0 0 1 7 0v3',
  free: 'M6 11h12v9H6ZM8.5 11V7a3.5 3.5 0 0 1 6.8-1.2',
  caution: 'M12 3L2 20h20ZM12 9.5v5M12 17.3v.01',
  up: 'M6 15l6-6l6 6',
  down: 'M6 9l6 6l6-6',
  present: 'M3 4h18M5 4v10h14V4M12 14v4M8 21l4-3l4 3',
} as const
export type ShellSymbolName = keyof typeof SHELL

export function ShellSymbol({ name }: { name: ShellSymbolName }) {
  return <Drawn path={SHELL[name]} />
}

function Drawn({ path }: { path: string }) {
  return (
    <svg viewBox="0 0 24 24" width="22" height="22" aria-hidden="true" className="symbol">
      <path d={path} />
    </svg>
  )
}
