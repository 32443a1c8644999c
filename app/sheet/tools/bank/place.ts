import type { Edit } from '~/live'
import type { WaterBank } from '~/section'
import { APART, endWithBank, neat } from '../moves'
import { shown } from '../paths'
import type { Spot, Surface } from '../types'

/** The bank a click is meant for: the nearer one. */
export function sideAt(surface: Surface, x: number): 'left' | 'right' {
  const { left, right } = surface.sheet.stored().section
  return x < (left.x + right.x) / 2 ? 'left' : 'right'
}

/** Water at this bank, its edge at the spot's x and its stage at the spot's level; the line ends go along. */
export function placeBank(surface: Surface, side: 'left' | 'right', spot: Spot): Edit[] {
  const { sheet } = surface
  const stored = sheet.stored()
  const section = shown(stored, sheet.get().caseId)
  const old = section[side]
  const inner = [...section.ground, ...section.base].map(([x]) => x).concat(section.features.map(({ x }) => x))
  const x = neat(
    side === 'left'
      ? Math.min(spot.x, Math.min(section.right.x, ...inner.filter((at) => at > old.x)) - APART)
      : Math.max(spot.x, Math.max(section.left.x, ...inner.filter((at) => at < old.x)) + APART),
  )
  const stage = neat(spot.z)
  const edits: Edit[] = []
  if (old.kind === 'water') {
    edits.push({ do: 'set', path: `${side}.stage`, value: stage })
    if (x !== old.x) edits.push({ do: 'set', path: `${side}.x`, value: x })
  } else {
    const bank: WaterBank = { kind: 'water', x, stage, conductance: null, bed: null }
    if (old.name !== undefined) bank.name = old.name
    edits.push({ do: 'set-bank', side, bank })
  }
  if (x !== old.x) for (const line of ['ground', 'base'] as const) edits.push(...endWithBank(stored, line, side, x))
  return edits
}
