import type { Solution } from '~/solver'

/** The numbers a list shows of a section: highest water table, m; flow to either bank, m²/d, negative when the bank loses. */
export type Readings = { highest: number | null; toLeft: number | null; toRight: number | null }

export const NO_READINGS: Readings = { highest: null, toLeft: null, toRight: null }

export function readingsOf(solution: Solution): Readings {
  if (solution.status === 'unsolved') return NO_READINGS
  const rate = (side: string) => solution.exchanges.find((exchange) => exchange.of === side)?.rate ?? 0
  return { highest: solution.highest.head, toLeft: rate('left'), toRight: rate('right') }
}

/** Readings as they were stored: JSON that MariaDB may give back as text. */
export function storedReadings(value: unknown): Readings {
  let read = value
  try {
    if (typeof value === 'string') read = JSON.parse(value)
  } catch {
    return NO_READINGS
  }
  if (typeof read !== 'object' || read === null) return NO_READINGS
  const found = new Map<string, unknown>(Object.entries(read))
  const number = (name: string) => {
    const one = found.get(name)
    return typeof one === 'number' ? one : null
  }
  return { highest: number('highest'), toLeft: number('toLeft'), toRight: number('toRight') }
}
