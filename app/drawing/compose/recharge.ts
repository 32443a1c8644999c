import type { Context } from './context'

/** Height of one row of zones, as a share of the drawn height: room for arrows and a line of text. */
const ROW = 0.105

/** Recharge zones as brackets over the ground with arrows, down for gain and up for loss; stacked where zones overlap. */
export function composeRecharge({ section, items, z, say, left, right }: Context): void {
  const tall = z.max - z.min
  const rows: { to: number }[][] = []
  const length = right - left
  for (const zone of [...section.recharge].sort((a, b) => a.from - b.from)) {
    let row = rows.findIndex((taken) => taken.every(({ to }) => to <= zone.from + 1e-9))
    if (row < 0) row = rows.push([]) - 1
    rows[row]?.push({ to: zone.to })
    const level = z.max - tall * (0.085 + ROW * Math.min(row, 2))
    const loss = zone.rate < 0
    const of = `recharge.${zone.id}`
    const role = loss ? 'recharge-loss' : 'recharge'
    const common = { panel: 'section', of, layer: 'water' } as const
    const wide = zone.to - zone.from
    items.push({
      ...common,
      kind: 'path',
      id: `recharge-${zone.id}`,
      role,
      points: [
        { x: zone.from, z: level },
        { x: zone.to, z: level },
      ],
      closed: false,
      label: zone.name ?? 'Recharge',
    })
    for (const [i, x] of [zone.from, zone.to].entries())
      items.push({
        ...common,
        kind: 'path',
        id: `recharge-${zone.id}-end-${i}`,
        role,
        points: [
          { x, z: level },
          { x, z: level - tall * 0.02 },
        ],
        closed: false,
      })
    const count = Math.max(1, Math.min(9, Math.round((wide / length) * 12)))
    for (let i = 0; i < count && zone.rate !== 0; i++)
      items.push({
        ...common,
        kind: 'symbol',
        symbol: loss ? 'loss-arrow' : 'recharge-arrow',
        id: `recharge-${zone.id}-${i}`,
        role,
        at: { x: zone.from + ((i + 0.5) / count) * wide, z: level },
      })
    items.push({
      ...common,
      layer: 'results',
      kind: 'text',
      id: `recharge-${zone.id}-text`,
      role: 'text-recharge',
      at: { x: (zone.from + zone.to) / 2, z: level },
      shift: { dx: 0, dy: -1.1 },
      text: `${zone.name ? `${zone.name} · ` : ''}${say(zone.rate, 'recharge')}`,
      size: 2.5,
      weight: 500,
      anchor: 'middle',
      base: 'bottom',
      priority: 7,
    })
  }
}
