import type { OpenSheet } from '../sheet-store'
import type { SheetState } from '../state'

/** A key as pressed. `mod` is Ctrl, or Command on a Mac. */
export type KeyPress = { key: string; mod: boolean; shift: boolean; alt: boolean }

/** Where copied things go and come from; the page's clipboard, or a test's. */
export type Clipboard = { write(text: string): Promise<void>; read(): Promise<string> }

/** What a command may use. */
export type Desk = { sheet: OpenSheet; clipboard: Clipboard }

/**
 * Something that can be done, told once: keyboard, menus, the rail and the help list all read the same record. `keys` are
 * written "Mod+Shift+Z"; the first one is the one shown.
 */
export type Command = {
  id: string
  label: string
  group: 'steps' | 'edit' | 'view' | 'show' | 'case' | 'tool'
  keys: string[]
  /** Pressed state of a toggle or of the tool in hand. */
  on?(state: SheetState): boolean
  enabled(state: SheetState): boolean
  /** False when it does not apply after all, so that the key goes on to the browser. */
  run(desk: Desk): unknown
}
