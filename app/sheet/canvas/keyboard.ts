import { commandFor } from '../commands'
import type { Desk, KeyPress } from '../commands/types'
import type { Machine } from '../tools/machine'

/** Fields, lists and dialogs keep their own keys. */
const OWN_KEYS =
  'input, textarea, select, [contenteditable=""], [contenteditable="true"], [role="dialog"], [role="listbox"], [role="menu"], [role="grid"], [role="slider"]'
const ownsKeys = (target: EventTarget | null) => target instanceof Element && target.closest(OWN_KEYS) !== null
/** Buttons and links act on Space and Enter themselves. */
const acts = (target: EventTarget | null) =>
  target instanceof Element && target.closest('button, a, summary, [role="button"]') !== null

export const pressOf = (event: KeyboardEvent): KeyPress => ({
  key: event.key,
  mod: event.ctrlKey || event.metaKey,
  shift: event.shiftKey,
  alt: event.altKey,
})

export type Keyboard = { spaceHeld(): boolean; stop(): void }

/** Keys for the whole page while the sheet is open: first the tool at work, then the commands. */
export function listenToKeys(
  machine: () => Machine,
  desk: Desk,
  on: { space(held: boolean): void; clip: ClipKeys },
): Keyboard {
  let space = false
  const setSpace = (held: boolean) => {
    if (space === held) return
    space = held
    on.space(held)
  }

  function down(event: KeyboardEvent) {
    if (event.defaultPrevented || event.isComposing || ownsKeys(event.target)) return
    if (event.key === ' ' && !acts(event.target)) {
      event.preventDefault()
      setSpace(true)
      return
    }
    const press = pressOf(event)
    if (event.key === 'Escape') {
      if (machine().cancel()) event.preventDefault()
      else if (desk.sheet.get().tool !== 'pick') desk.sheet.set({ tool: 'pick' })
      else if (desk.sheet.get().picked.length > 0) desk.sheet.set({ picked: [] })
      else if (desk.sheet.get().presenting) desk.sheet.set({ presenting: false })
      return
    }
    if (!press.mod && !(acts(event.target) && event.key === 'Enter') && machine().key(press)) {
      event.preventDefault()
      return
    }
    // Copy, cut and paste come as events of their own, which may use the clipboard without asking.
    if (press.mod && !press.alt && ['c', 'x', 'v'].includes(press.key.toLowerCase())) return
    const command = commandFor(press, desk.sheet.get())
    if (!command) return
    if (command.run(desk) !== false) event.preventDefault()
  }
  const up = (event: KeyboardEvent) => {
    if (event.key === ' ') setSpace(false)
  }
  const away = () => setSpace(false)
  const clip = (name: keyof ClipKeys) => (event: ClipboardEvent) => {
    if (event.defaultPrevented || ownsKeys(event.target) || !event.clipboardData) return
    if (window.getSelection()?.toString() && name !== 'paste') return
    if (on.clip[name](event.clipboardData)) event.preventDefault()
  }
  const [copy, cut, paste] = [clip('copy'), clip('cut'), clip('paste')]
  window.addEventListener('keydown', down)
  window.addEventListener('keyup', up)
  window.addEventListener('blur', away)
  document.addEventListener('copy', copy)
  document.addEventListener('cut', cut)
  document.addEventListener('paste', paste)
  return {
    spaceHeld: () => space,
    stop() {
      window.removeEventListener('keydown', down)
      window.removeEventListener('keyup', up)
      window.removeEventListener('blur', away)
      document.removeEventListener('copy', copy)
      document.removeEventListener('cut', cut)
      document.removeEventListener('paste', paste)
    },
  }
}

/** Each answers whether it took or gave something. */
export type ClipKeys = {
  copy(data: DataTransfer): boolean
  cut(data: DataTransfer): boolean
  paste(data: DataTransfer): boolean
}
