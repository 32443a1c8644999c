import type { KeyPress } from './types'

/** "Mod+Shift+Z" against a key press. Letters go by the key's meaning, so other keyboard layouts work too. */
export function matches(keys: string, press: KeyPress): boolean {
  const parts = keys.split('+').filter((part) => part !== '')
  // "Mod++" is the plus key.
  const key = keys.endsWith('+') ? '+' : (parts.at(-1) ?? '')
  const has = (name: string) => parts.slice(0, keys.endsWith('+') ? undefined : -1).includes(name)
  if (has('Mod') !== press.mod || has('Alt') !== press.alt) return false
  // Signs such as + and ? need Shift on many keyboards; only letters and named keys tell it apart.
  const sign = key.length === 1 && !/[a-z0-9]/i.test(key)
  if (!sign && has('Shift') !== press.shift) return false
  return key.toLowerCase() === press.key.toLowerCase()
}

const MAC = /Mac|iPhone|iPad/
const isMac = () => typeof navigator !== 'undefined' && MAC.test(navigator.platform)

const NAMES: Record<string, string> = {
  ArrowLeft: '←',
  ArrowRight: '→',
  ArrowUp: '↑',
  ArrowDown: '↓',
  Escape: 'Esc',
  ' ': 'Space',
}
/** As printed on the keyboard: "Ctrl Shift Z". */
export function printKeys(keys: string): string {
  const sign = keys.endsWith('+')
  const parts = keys.split('+').filter((part) => part !== '')
  if (sign) parts.push('+')
  return parts.map((part) => (part === 'Mod' ? (isMac() ? '⌘' : 'Ctrl') : (NAMES[part] ?? part))).join(' ')
}
