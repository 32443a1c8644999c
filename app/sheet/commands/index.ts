import type { SheetState } from '../state'
import { CASES } from './cases'
import { EDITS } from './edit'
import { matches, printKeys } from './keys'
import { NUDGES } from './nudge'
import { SHOWS } from './show'
import { STEPS } from './steps'
import { TOOL_COMMANDS } from './tools'
import type { Command, KeyPress } from './types'
import { VIEWS } from './view'

export { printKeys } from './keys'
export type { Clipboard, Command, Desk, KeyPress } from './types'

/** Everything that can be done by key, menu or rail. */
export const COMMANDS: readonly Command[] = [
  ...STEPS,
  ...EDITS,
  ...NUDGES,
  ...VIEWS,
  ...SHOWS,
  ...CASES,
  ...TOOL_COMMANDS,
]

/** The command a key press asks for, if it can be done now. */
export const commandFor = (press: KeyPress, state: SheetState): Command | null =>
  COMMANDS.find((command) => command.keys.some((keys) => matches(keys, press)) && command.enabled(state)) ?? null

export const commandById = (id: string): Command | null => COMMANDS.find((command) => command.id === id) ?? null

const GROUPS: { group: Command['group']; title: string }[] = [
  { group: 'tool', title: 'Tools' },
  { group: 'steps', title: 'Steps' },
  { group: 'edit', title: 'What is picked' },
  { group: 'view', title: 'View' },
  { group: 'show', title: 'Shown' },
  { group: 'case', title: 'Cases' },
]

/** What only the hand can do, for the end of the list. */
const BY_HAND = [
  { keys: 'Space and drag', label: 'Move the sheet with any tool' },
  { keys: 'Wheel', label: 'Move the sheet; with Ctrl nearer and farther' },
  { keys: 'Two fingers', label: 'Move, nearer and farther' },
  { keys: 'Double click', label: 'New vertex on an edge; change a note' },
  { keys: 'Alt while dragging', label: 'Free of the grid' },
  { keys: 'Shift while dragging', label: 'Straight along or up' },
  { keys: 'Esc', label: 'Leave what is being done; back to picking' },
]

/** The help list, made from the commands, so that it cannot tell of keys that do nothing. */
export function keyHelp(may: 'write' | 'read'): { title: string; rows: { keys: string; label: string }[] }[] {
  const forReaders = new Set(['view', 'show', 'case'])
  const listed = GROUPS.map(({ group, title }) => ({
    title,
    rows: COMMANDS.filter(
      (command) =>
        command.group === group &&
        command.keys.length > 0 &&
        (may === 'write' || forReaders.has(group) || command.id === 'tool-pick' || command.id === 'tool-hand') &&
        !(may === 'read' && (command.id === 'toggle-snap' || command.id === 'leave-out')),
    ).map((command) => ({ keys: command.keys.map(printKeys).join(' or '), label: command.label })),
  }))
  return [...listed, { title: 'By hand', rows: BY_HAND }].filter(({ rows }) => rows.length > 0)
}
