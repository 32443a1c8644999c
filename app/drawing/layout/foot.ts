import { fitText, textWidth, wrapText } from '../fonts/measure'
import type { Plot } from '../plot'
import type { Scene } from '../scene'
import { inkOf, type Theme } from '../styles'
import type { Device } from './frames'
import { fixed } from './path'

export const FOOT_HEIGHT = 8.5

/** Caution line and title block along the foot of the sheet, as on a drawing; fields after ISO 7200 as far as they are known. */
export function footOf(
  scene: Scene,
  device: Device,
  theme: Theme,
  scales: { scale: number | null; exaggeration: number },
): Plot[] {
  const u = device.unit
  const { title } = scene
  const size = 2.65 * u
  const y = device.height - FOOT_HEIGHT * u
  const h = 7 * u
  const plots: Plot[] = []
  const ve = `VE ${Number(scales.exaggeration.toPrecision(2))}×`
  const cells = [
    { text: [title.site, title.title].filter(Boolean).join(' · ') || 'Untitled', weight: 600 as const },
    { text: title.caseName, weight: 400 as const },
    { text: scales.scale ? `1:${scales.scale} · ${ve}` : ve, weight: 400 as const },
    { text: title.prepared ? `prep. ${title.prepared}` : `${title.revision}`, weight: 400 as const },
    ...(title.prepared
      ? [
          { text: title.checked ? `check ${title.checked}` : 'check —', weight: 400 as const },
          { text: title.revision, weight: 600 as const },
        ]
      : []),
  ]
  const widest = device.width * 0.62
  let right = device.width - 1.5 * u
  const ink = inkOf('title-block', theme, u)
  const fill = inkOf('text', theme, u).fill ?? '#000'
  let used = 0
  for (let i = cells.length - 1; i >= 0; i--) {
    const cell = cells[i]
    if (!cell) continue
    const room = i === 0 ? Math.max(widest - used, 20 * u) : 34 * u
    const text = fitText(cell.text, room, size, cell.weight)
    const width = textWidth(text, size, cell.weight) + 5 * u
    if (used + width > device.width * 0.94) continue
    used += width
    plots.push(
      {
        kind: 'path',
        id: `cell-${i}`,
        of: 'title-block',
        role: 'title-block',
        layer: 'frame',
        d: `M${fixed(right - width)} ${fixed(y)}H${fixed(right)}V${fixed(y + h)}H${fixed(right - width)}Z`,
        ink,
      },
      {
        kind: 'text',
        id: `cell-text-${i}`,
        of: 'title-block',
        role: 'title-block',
        layer: 'frame',
        x: right - width + 2.5 * u,
        y: y + h / 2 + size * 0.35,
        text,
        size,
        weight: cell.weight,
        family: 'sans',
        anchor: 'start',
        fill,
      },
    )
    right -= width
  }
  // The caution is never cut: what does not fit on one line stands on two or three, smaller.
  const small = [0.92, 0.8, 0.68]
    .map((times) => ({ size: size * times, lines: wrapText(scene.caution, right - 4 * u, size * times) }))
    .find(({ lines, size: letter }) => lines.length * letter * 1.2 <= h)
  small?.lines.forEach((text, i) => {
    const middle = (i - (small.lines.length - 1) / 2) * small.size * 1.2
    plots.push({
      kind: 'text',
      id: i === 0 ? 'caution' : `caution-${i}`,
      of: 'caution',
      role: 'caution',
      layer: 'frame',
      x: 2 * u,
      y: y + h / 2 + small.size * 0.35 + middle,
      text,
      size: small.size,
      weight: 400,
      family: 'sans',
      anchor: 'start',
      fill: inkOf('caution', theme, u).fill ?? fill,
    })
  })
  return plots
}
