import type { Edit } from '~/live'
import { onLayer } from '../markup'
import { neat } from '../moves'
import { shown } from '../paths'
import type { Spot, Surface } from '../types'

export type Span = 'recharge' | 'limit' | 'dimension'

export const HINTS: Record<Span, string> = {
  recharge: 'Drag along the ground from one end of the recharge zone to the other.',
  limit: 'Drag along the level that the water must stay below.',
  dimension: 'Drag from one end of the dimension to the other.',
}

/** 250 mm a year, in m/d: a starting value for a temperate field; the particulars show it at once. */
const RECHARGE = 0.25 / 365.25

/** The edits that add the thing between two spots; none while it has no length. */
export function addSpan(surface: Surface, span: Span, id: string, a: Spot, b: Spot): Edit[] {
  const { sheet } = surface
  const section = shown(sheet.stored(), sheet.get().caseId)
  const from = neat(Math.min(a.x, b.x))
  const to = neat(Math.max(a.x, b.x))
  if (to - from < 1e-6 && span !== 'dimension') return []
  switch (span) {
    case 'recharge': {
      const rate = section.recharge.at(-1)?.rate ?? RECHARGE
      return [{ do: 'add', list: 'recharge', object: { id, from, to, rate } }]
    }
    case 'limit':
      return [{ do: 'add', list: 'limits', object: { id, name: 'Limit', from, to, level: neat(a.z), clearance: 0.5 } }]
    case 'dimension':
      if (Math.hypot(b.x - a.x, b.z - a.z) < 1e-6) return []
      return onLayer(surface, (layer) => ({
        id,
        layer,
        kind: 'dimension',
        points: [
          [neat(a.x), neat(a.z)],
          [neat(b.x), neat(b.z)],
        ],
        ink: 'ink',
        width: 0.25,
        by: surface.who() ?? undefined,
        order: surface.order(),
      }))
  }
}
export const pathOf = (span: Span, id: string) =>
  `${span === 'recharge' ? 'recharge' : span === 'limit' ? 'limits' : 'marks'}.${id}`
