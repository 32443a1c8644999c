import type { UnitSet } from '../state'
import { moveEdits } from '../tools/moves'
import type { Command, Desk } from './types'

const FOOT = 0.3048
/** One press along x and up z, in the units on show: a section is many times longer than high. */
const STEP: Record<UnitSet, { x: number; z: number }> = { si: { x: 1, z: 0.1 }, us: { x: 5 * FOOT, z: 0.5 * FOOT } }

const ARROWS = { ArrowLeft: [-1, 0], ArrowRight: [1, 0], ArrowUp: [0, 1], ArrowDown: [0, -1] } as const
const SIZES = [
  { prefix: '', times: 1, word: '' },
  { prefix: 'Shift+', times: 10, word: ' ten times as far' },
  { prefix: 'Alt+', times: 0.1, word: ' finely' },
] as const
const WAYS = { ArrowLeft: 'left', ArrowRight: 'right', ArrowUp: 'up', ArrowDown: 'down' } as const

function nudge({ sheet }: Desk, way: readonly [number, number], times: number) {
  const { picked, caseId, units } = sheet.get()
  const step = STEP[units]
  const by = { x: way[0] * step.x * times, z: way[1] * step.z * times }
  sheet.edit(moveEdits(picked, sheet.stored(), caseId, by), `nudge ${picked.join(' ')}`)
}

/** Presses in quick succession are one step to undo. */
export const NUDGES: Command[] = SIZES.flatMap(({ prefix, times, word }) =>
  (Object.keys(ARROWS) as (keyof typeof ARROWS)[]).map((key) => ({
    id: `nudge-${WAYS[key]}${word.replaceAll(' ', '-')}`,
    label: `Nudge ${WAYS[key]}${word}`,
    group: 'edit' as const,
    keys: [`${prefix}${key}`],
    enabled: (state) => state.may === 'write' && state.picked.length > 0,
    run: (desk: Desk) => nudge(desk, ARROWS[key], times),
  })),
)
