import { hatchOf } from '../hatch/kind'
import type { Item } from '../scene'
import { type Context, spots } from './context'

/** Soil of the host between ground and base, the ground line with its strokes, the base with its hatch. */
export function composeGround({ section, items, clips, x, z, materialName }: Context): void {
  const ground = spots(section.ground)
  const base = spots(section.base)
  const strip = [...ground, ...[...base].reverse()]
  clips.push({ id: 'strip', panel: 'section', ring: strip })

  const first = base[0] ?? { x: 0, z: 0 }
  const last = base[base.length - 1] ?? first
  const deep = z.min - (z.max - z.min) * 4
  const outer = [{ x: x.min, z: first.z }, ...base, { x: x.max, z: last.z }]
  const common = { panel: 'section' } as const
  const list: Item[] = [
    {
      ...common,
      kind: 'area',
      id: 'soil',
      of: `materials.${section.host}`,
      role: 'soil',
      layer: 'ground',
      rings: [strip],
      hatch: hatchOf(materialName(section.host)),
      label: materialName(section.host),
    },
    {
      ...common,
      kind: 'area',
      id: 'base-fill',
      of: 'base',
      role: 'base-fill',
      layer: 'base',
      rings: [[...outer, { x: x.max, z: deep }, { x: x.min, z: deep }]],
      hatch: 'base',
    },
    {
      ...common,
      kind: 'path',
      id: 'base',
      of: 'base',
      role: 'base',
      layer: 'base',
      points: outer,
      closed: false,
      label: 'Base of the aquifer',
    },
    {
      ...common,
      kind: 'path',
      id: 'ground',
      of: 'ground',
      role: 'ground',
      layer: 'ground',
      points: ground,
      closed: false,
      ticks: 'below',
      label: 'Ground line',
    },
  ]
  items.push(...list)
}

/** Bodies of other material, each clipped to the strip, with its name and conductivity. */
export function composeBodies({ section, items, materialName, say }: Context): void {
  const top = Math.max(...section.ground.map(([, z]) => z))
  const low = Math.min(...section.base.map(([, z]) => z))
  for (const body of section.bodies) {
    const name = materialName(body.material)
    const ring = spots(body.outline)
    const of = `bodies.${body.id}`
    const at = { panel: 'section', layer: 'bodies', of, clip: 'strip' } as const
    items.push(
      {
        ...at,
        kind: 'area',
        id: `body-${body.id}`,
        role: 'body',
        rings: [ring],
        hatch: hatchOf(name),
        label: body.name ?? name,
      },
      { ...at, kind: 'path', id: `body-edge-${body.id}`, role: 'body-edge', points: ring, closed: true },
    )
    const k = section.materials.find(({ id }) => id === body.material)?.k
    const xs = ring.map((spot) => Math.min(section.right.x, Math.max(section.left.x, spot.x)))
    const zs = ring.map((spot) => Math.min(top, Math.max(low, spot.z)))
    items.push({
      panel: 'section',
      layer: 'results',
      kind: 'text',
      id: `body-name-${body.id}`,
      of,
      role: 'text',
      at: { x: (Math.min(...xs) + Math.max(...xs)) / 2, z: (Math.min(...zs) + Math.max(...zs)) / 2 },
      text: `${body.name ?? name}${k === undefined ? '' : ` · ${say(k, 'conductivity')}`}`,
      size: 2.5,
      weight: 500,
      anchor: 'middle',
      base: 'middle',
      priority: 3,
    })
  }
}
