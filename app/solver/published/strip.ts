import type { Section } from '~/section'
import { readAt, type Solved, solveSteady } from '../index'
import { rain, sectionOf, water } from '../testing'

/** Solves a section that must have an answer. */
export function answerOf(section: Section): Solved {
  const solution = solveSteady(section)
  if (solution.status !== 'solved') throw new Error(solution.reason.map(({ message }) => message).join(' '))
  return solution
}

/** A strip over a level base at 0 between two waters, ground well above. Any one unit of length serves. */
export function strip(parts: {
  length: number
  k: number
  left: number
  right: number
  w?: number
  more?: Partial<Section>
}): Section {
  const { length, k, left, right, w = 0, more = {} } = parts
  const top = 10 * Math.max(left, right) + 10
  return sectionOf({
    left: water(0, left),
    right: water(length, right),
    ground: [
      [0, top],
      [length, top],
    ],
    base: [
      [0, 0],
      [length, 0],
    ],
    materials: [{ id: 'sand', k }],
    recharge: w === 0 ? [] : [rain(0, length, w)],
    ...more,
  })
}

export const outflow = (solution: Solved, of: string): number =>
  solution.exchanges.find((exchange) => exchange.of === of)?.rate ?? Number.NaN

/** x where the water table stands at a given head, by halving between two x. */
export function placeOfHead(solution: Solved, head: number, from: number, to: number): number {
  let a = from
  let b = to
  const falling = readAt(solution, a).head > readAt(solution, b).head
  for (let i = 0; i < 80; i++) {
    const mid = (a + b) / 2
    if (readAt(solution, mid).head > head === falling) a = mid
    else b = mid
  }
  return (a + b) / 2
}

/** The input at which a rising quantity reaches a wanted value, by halving: for examples that ask the question backwards. */
export function inputFor(quantity: (input: number) => number, wanted: number, low: number, high: number): number {
  let a = low
  let b = high
  const rising = quantity(low) < quantity(high)
  for (let i = 0; i < 80; i++) {
    const mid = (a + b) / 2
    if (quantity(mid) < wanted === rising) a = mid
    else b = mid
  }
  return (a + b) / 2
}
