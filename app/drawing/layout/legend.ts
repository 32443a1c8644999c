import { fitText } from '../fonts/measure'
import { hatchMarks } from '../hatch/marks'
import type { Plot, Rect } from '../plot'
import type { Role, Scene } from '../scene'
import { inkOf, palette, type Theme } from '../styles'
import { fixed } from './path'

/** Lines and fills worth a word, in the order they are explained; only those that the sheet shows are. */
const EXPLAINED: [Role, string, 'line' | 'fill'][] = [
  ['water-table', 'Water table (Dupuit)', 'line'],
  ['saturated', 'Saturated ground', 'fill'],
  ['open-water', 'Open water', 'fill'],
  ['base', 'Base, impermeable', 'line'],
  ['straight-line', 'Straight line between banks', 'line'],
  ['divide', 'Divide or trough', 'line'],
  ['flow-line', 'Flow line, equal tubes', 'line'],
  ['arrow', 'Flow, length by speed', 'line'],
  ['seepage', 'Seepage at the surface', 'line'],
  ['dry', 'Dry reach', 'line'],
  ['perched', 'Bed of a bank', 'line'],
  ['limit-holds', 'Limit kept', 'line'],
  ['limit-clear', 'Clearance below a limit', 'line'],
  ['limit-broken', 'Limit broken', 'line'],
  ['wall', 'Cut-off wall', 'line'],
  ['recharge-loss', 'Loss by evaporation', 'line'],
]

type Entry = { role: Role; text: string; kind: 'line' | 'fill' | 'hatch'; hatch?: Scene['legend'][number]['hatch'] }

export function legendEntries(scene: Scene): Entry[] {
  const shown = new Set(scene.items.map(({ role }) => role))
  return [
    ...scene.legend.map(({ role, hatch, text }): Entry => ({ role, text, kind: 'hatch', hatch })),
    ...EXPLAINED.filter(([role]) => shown.has(role)).map(
      ([role, text, kind]): Entry => ({ role, text: scene.keys[role] ?? text, kind }),
    ),
  ]
}

/** The legend in columns inside a box, device units: a swatch and a word each; what finds no room is left out from the end. */
export function legendOf(scene: Scene, box: Rect, unit: number, theme: Theme): Plot[] {
  const u = unit
  const row = 4.7 * u
  const size = 2.3 * u
  const rows = Math.max(1, Math.floor(box.height / row))
  const entries = legendEntries(scene)
  const columns = Math.max(1, Math.min(Math.ceil(entries.length / rows), Math.floor(box.width / (38 * u))))
  const wide = box.width / columns
  const plots: Plot[] = []
  for (const [i, entry] of entries.slice(0, rows * columns).entries()) {
    const x = box.x + Math.floor(i / rows) * wide
    const y = box.y + (i % rows) * row
    const swatch: Rect = { x, y, width: 7.5 * u, height: 3.4 * u }
    const base = { of: 'legend', role: entry.role, layer: 'frame' } as const
    const ink = inkOf(entry.role, theme, u)
    const rect = `M${fixed(x)} ${fixed(y)}h${fixed(swatch.width)}v${fixed(swatch.height)}h${fixed(-swatch.width)}Z`
    const id = `legend-${i}`
    const middle = y + swatch.height / 2
    if (entry.kind === 'hatch') {
      const { marks, dots } = hatchMarks(entry.hatch ?? 'none', swatch, u, { x: x + u, y: y + 0.9 * u })
      plots.push(
        {
          ...base,
          id,
          kind: 'hatch',
          hatch: entry.hatch ?? 'none',
          clip: rect,
          ...(ink.fill && { fill: ink.fill }),
          ink,
          marks,
          dots,
        },
        { ...base, id: `${id}-edge`, kind: 'path', d: rect, ink: { stroke: palette(theme).soft, width: 0.18 * u } },
      )
    } else if (entry.kind === 'fill')
      plots.push({ ...base, id, kind: 'path', d: rect, ink: { fill: ink.fill, opacity: ink.opacity } })
    else {
      const { fill: _, ...stroke } = ink
      plots.push({ ...base, id, kind: 'path', d: `M${fixed(x)} ${fixed(middle)}h${fixed(swatch.width)}`, ink: stroke })
      if (entry.role === 'arrow') {
        const tip = x + swatch.width
        plots.push({
          ...base,
          id: `${id}-tip`,
          kind: 'path',
          ink: { fill: stroke.stroke },
          d: `M${fixed(tip)} ${fixed(middle)}l${fixed(-1.9 * u)} ${fixed(-0.75 * u)}v${fixed(1.5 * u)}Z`,
        })
      }
    }
    plots.push({
      ...base,
      id: `${id}-text`,
      role: 'legend',
      kind: 'text',
      x: x + 9 * u,
      y: middle + size * 0.35,
      size,
      weight: 400,
      family: 'sans',
      text: fitText(entry.text, wide - 11 * u, size),
      anchor: 'start',
      fill: palette(theme).ink,
    })
  }
  return plots
}
