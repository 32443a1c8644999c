import { readAt } from '~/solver'
import { baseAt, type Context, groundAt } from './context'

/** Ditches, drains, trenches and cut-off walls: drawn symbols with their level or rate. */
export function composeWorks({ section, solution, items, say, z }: Context): void {
  const tall = z.max - z.min
  for (const feature of section.features) {
    const of = `features.${feature.id}`
    const common = { panel: 'section', layer: 'works', of } as const
    const { x } = feature
    const ground = groundAt(section, x)
    const base = baseAt(section, x)
    const name = feature.name ?? feature.kind
    const label = (text: string, at: number, dy = -1.4) =>
      items.push({
        ...common,
        layer: 'results',
        kind: 'text',
        id: `${feature.id}-text`,
        role: 'text',
        at: { x, z: at },
        shift: { dx: 0, dy },
        text,
        size: 2.5,
        weight: 500,
        anchor: 'middle',
        base: 'bottom',
        priority: 6,
      })
    if (feature.kind === 'ditch') {
      items.push({
        ...common,
        kind: 'path',
        id: `${feature.id}-shaft`,
        role: 'ditch',
        points: [
          { x, z: ground },
          { x, z: feature.level },
        ],
        closed: false,
      })
      items.push({
        ...common,
        kind: 'symbol',
        symbol: 'ditch',
        id: feature.id,
        role: 'ditch',
        at: { x, z: feature.level },
        label: name,
      })
      label(`${feature.name ? `${feature.name} ` : ''}${say(feature.level, 'elevation', false)}`, ground)
    } else if (feature.kind === 'drain') {
      items.push({
        ...common,
        kind: 'symbol',
        symbol: 'drain',
        id: feature.id,
        role: 'drain',
        at: { x, z: feature.level },
        label: name,
      })
      label(`${feature.name ? `${feature.name} ` : ''}${say(feature.level, 'elevation', false)}`, feature.level, -2.2)
    } else if (feature.kind === 'trench') {
      const head = solution.status === 'solved' ? readAt(solution, x).head : base
      items.push({
        ...common,
        kind: 'path',
        id: `${feature.id}-shaft`,
        role: 'trench',
        points: [
          { x, z: ground },
          { x, z: base + 0.15 * Math.max(head - base, 0) },
        ],
        closed: false,
      })
      items.push({
        ...common,
        kind: 'symbol',
        symbol: 'trench',
        id: feature.id,
        role: 'trench',
        at: { x, z: ground },
        label: name,
      })
      label(`${feature.name ? `${feature.name} ` : ''}${say(feature.rate, 'flow')}`, ground, -4.2)
    } else {
      // True width where it shows, a hair otherwise: layout keeps at least the stroke.
      const half = feature.thickness / 2
      items.push({
        ...common,
        kind: 'area',
        id: feature.id,
        role: 'wall',
        hatch: 'none',
        label: name,
        rings: [
          [
            { x: x - half, z: ground },
            { x: x + half, z: ground },
            { x: x + half, z: base - tall * 0.012 },
            { x: x - half, z: base - tall * 0.012 },
          ],
        ],
      })
      items.push({
        ...common,
        kind: 'path',
        id: `${feature.id}-line`,
        role: 'wall',
        points: [
          { x, z: ground },
          { x, z: base },
        ],
        closed: false,
      })
      label(feature.name ?? 'Wall', ground)
    }
  }
}
