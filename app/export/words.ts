import { CAUTION } from '~/drawing'
import { formatQuantity, type QuantityKind, type Section, type UnitSet } from '~/section'
import type { Solution } from '~/solver'

/** What the drawing says, in words: for whoever cannot see it. */
export function sayInWords(section: Section, solution: Solution, units: UnitSet): string {
  const say = (value: number, kind: QuantityKind) => formatQuantity(value, kind, units)
  const ends = (['left', 'right'] as const)
    .map((side) => {
      const bank = section[side]
      const name = bank.name ?? `${side} bank`
      if (bank.kind === 'water') return `${name}: stage ${say(bank.stage, 'elevation')}`
      return bank.kind === 'inflow' ? `${name}: inflow ${say(bank.rate, 'flow')}` : `${name}: no flow`
    })
    .join('; ')
  const strip = `Cross-section from ${say(section.left.x, 'distance')} to ${say(section.right.x, 'distance')}. ${ends}.`
  if (solution.status !== 'solved')
    return `${strip} No steady answer: ${solution.reason.map(({ message }) => message).join(' ')} ${CAUTION}`
  const { highest, divides } = solution
  const turns = divides.map(({ kind, from, to }) => ` A ${kind} at ${say((from + to) / 2, 'distance')}.`).join('')
  return `${strip} The water table is highest, ${say(highest.head, 'elevation')}, at ${say(highest.x, 'distance')}.${turns} ${CAUTION}`
}
