import { describe, expect, it } from 'vitest'
import { matches, printKeys } from './keys'
import type { KeyPress } from './types'

const press = (key: string, how: Partial<KeyPress> = {}): KeyPress => ({
  key,
  mod: false,
  shift: false,
  alt: false,
  ...how,
})

describe('matches', () => {
  it('tells modifiers apart', () => {
    expect(matches('Mod+Z', press('z', { mod: true }))).toBe(true)
    expect(matches('Mod+Z', press('z'))).toBe(false)
    expect(matches('Mod+Z', press('Z', { mod: true, shift: true }))).toBe(false)
    expect(matches('Mod+Shift+Z', press('Z', { mod: true, shift: true }))).toBe(true)
    expect(matches('V', press('v'))).toBe(true)
    expect(matches('V', press('V', { shift: true }))).toBe(false)
    expect(matches('Alt+ArrowUp', press('ArrowUp', { alt: true }))).toBe(true)
  })

  it('takes signs with or without Shift, as keyboards differ', () => {
    expect(matches('+', press('+', { shift: true }))).toBe(true)
    expect(matches('+', press('+'))).toBe(true)
    expect(matches('=', press('='))).toBe(true)
    expect(matches('-', press('+'))).toBe(false)
  })
})

describe('printKeys', () => {
  it('writes keys as printed on the keyboard', () => {
    expect(printKeys('Mod+Shift+Z')).toBe('Ctrl Shift Z')
    expect(printKeys('Shift+ArrowLeft')).toBe('Shift ←')
    expect(printKeys('+')).toBe('+')
  })
})
