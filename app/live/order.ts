const DIGITS = '0123456789ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz'
const BASE = DIGITS.length
const WORD = /^[0-9A-Za-z]{0,120}[1-9A-Za-z]$/

/**
 * Orders are fractions between 0 and 1 spelt in base 62 without trailing noughts, compared as text. There is room between any two
 * different ones, so people can insert at the same time without renumbering what the others see.
 */
export const isOrder = (value: unknown): value is string => typeof value === 'string' && WORD.test(value)

const digit = (word: string, i: number) => Math.max(0, DIGITS.indexOf(word.charAt(i) || '0'))

/** An order after `a` ('' = the very first) and before `b` (null = no end); needs a < b. */
export function between(a: string, b: string | null): string {
  if (b !== null) {
    let n = 0
    while (n < b.length && (a.charAt(n) || '0') === b.charAt(n)) n++
    if (n > 0) return b.slice(0, n) + between(a.slice(n), b.slice(n))
  }
  const low = digit(a, 0)
  const high = b === null ? BASE : digit(b, 0)
  if (high - low > 1) return DIGITS.charAt(b === null ? low + 1 : (low + high) >> 1)
  if (b !== null && b.length > 1) return b.charAt(0)
  return DIGITS.charAt(low) + between(a.slice(1), null)
}

/** As `between`, with a tail that depends on the newcomer: two people inserting at one spot seldom get the same order. */
export function orderFor(name: string, a: string, b: string | null): string {
  const middle = between(a, b)
  let hash = 0
  for (let i = 0; i < name.length; i++) hash = (Math.imul(hash, 31) + name.charCodeAt(i)) >>> 0
  const own = middle + DIGITS.charAt(hash % BASE) + DIGITS.charAt(1 + ((hash >>> 8) % (BASE - 1)))
  return b === null || own < b ? own : middle
}

/** `count` orders, evenly spread. */
export function spread(count: number): string[] {
  let width = 1
  while (BASE ** width <= count) width++
  return Array.from({ length: count }, (_, i) => {
    let rest = Math.floor(((i + 1) * BASE ** width) / (count + 1))
    let word = ''
    for (let k = 0; k < width; k++) {
      word = DIGITS.charAt(rest % BASE) + word
      rest = Math.floor(rest / BASE)
    }
    return word.replace(/0+$/, '')
  })
}

/** Compares by order, then by name, so that every replica lists alike whatever it holds. */
export function inOrder(a: { order: string; name: string }, b: { order: string; name: string }): number {
  return a.order < b.order ? -1 : a.order > b.order ? 1 : a.name < b.name ? -1 : a.name > b.name ? 1 : 0
}
