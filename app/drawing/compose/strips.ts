import { shapeOf } from '~/section'
import type { Panel } from '../scene'
import type { Context } from './context'

/** The narrow strips below the drawing, on the same x: discharge and depth to water. */
export function composeStrips({ samples, items, units, left, right }: Context): Panel[] {
  const flows = samples.map(({ flow }) => flow).filter(Number.isFinite)
  const depths = samples.map(({ ground, head }) => ground - head).filter(Number.isFinite)
  const most = Math.max(...flows, 0)
  const least = Math.min(...flows, 0)
  const span = most - least || 1
  const deep = Math.max(...depths, 0)
  const shallow = Math.min(...depths, 0)
  const reach = deep - shallow || 1
  const panels: Panel[] = [
    {
      id: 'discharge',
      title: 'Discharge',
      unit: `${shapeOf('flow', units).unit} per ${units === 'us' ? 'foot' : 'metre'} of bank`,
      range: { min: least - span * 0.1, max: most + span * 0.34 },
      share: 0.19,
    },
    // Depth grows downwards, as it does in the ground: plotted as minus depth.
    {
      id: 'depth',
      title: 'Depth to water',
      unit: `${shapeOf('length', units).unit} below ground`,
      range: { min: -deep - reach * 0.12, max: -shallow + reach * 0.34 },
      share: 0.17,
    },
  ]
  const zero = [
    { x: left, z: 0 },
    { x: right, z: 0 },
  ]
  for (const { id } of panels)
    items.push({
      kind: 'path',
      id: `${id}-zero`,
      of: `result.${id}`,
      role: 'strip-zero',
      layer: 'results',
      panel: id,
      points: zero,
      closed: false,
    })
  if (flows.length > 1) {
    const line = samples.map(({ x, flow }) => ({ x, z: flow }))
    items.push(
      {
        kind: 'area',
        id: 'discharge-fill',
        of: 'result.discharge',
        role: 'strip-fill',
        layer: 'results',
        panel: 'discharge',
        rings: [[{ x: left, z: 0 }, ...line, { x: right, z: 0 }]],
        hatch: 'none',
      },
      {
        kind: 'path',
        id: 'discharge-line',
        of: 'result.discharge',
        role: 'strip-line',
        layer: 'results',
        panel: 'discharge',
        points: line,
        closed: false,
        label: 'Discharge',
      },
      {
        kind: 'path',
        id: 'depth-line',
        of: 'result.depth',
        role: 'strip-line',
        layer: 'results',
        panel: 'depth',
        points: samples.map(({ x, ground, head }) => ({ x, z: head - ground })),
        closed: false,
        label: 'Depth to water',
      },
    )
  }
  return panels
}
