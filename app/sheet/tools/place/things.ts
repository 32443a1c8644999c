import type { Edit } from '~/live'
import { APART, neat } from '../moves'
import { shown } from '../paths'
import type { Spot, Surface } from '../types'

export type Thing = 'ditch' | 'drain' | 'trench' | 'wall' | 'observation'

export const HINTS: Record<Thing, string> = {
  ditch: 'Click at the ditch, at its water level. A ditch holds the head both ways.',
  drain: 'Click at the drain, at its level. A drain only takes water.',
  trench: 'Click at the pumped trench; its rate goes in the particulars.',
  wall: 'Click where the cut-off wall stands; it reaches down to the base.',
  observation: 'Click at the gauge, at the head that was observed.',
}

/** Starting values a person is expected to change; the particulars show them at once. */
export function addThing(surface: Surface, thing: Thing, id: string, spot: Spot): Edit[] {
  const { sheet } = surface
  const section = shown(sheet.stored(), sheet.get().caseId)
  const x = neat(Math.min(section.right.x - APART, Math.max(section.left.x + APART, spot.x)))
  const z = neat(spot.z)
  switch (thing) {
    case 'ditch':
    case 'drain':
      return [{ do: 'add', list: 'features', object: { id, kind: thing, x, level: z, conductance: null } }]
    case 'trench':
      return [{ do: 'add', list: 'features', object: { id, kind: 'trench', x, rate: 0.1 } }]
    case 'wall':
      return [{ do: 'add', list: 'features', object: { id, kind: 'wall', x, thickness: 0.6, k: 0.001 } }]
    case 'observation':
      return [
        {
          do: 'add',
          list: 'observations',
          object: { id, name: `P-${section.observations.length + 1}`, x, head: z, date: surface.today() },
        },
      ]
  }
}
export const pathOf = (thing: Thing, id: string) => `${thing === 'observation' ? 'observations' : 'features'}.${id}`
