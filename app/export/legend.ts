import { hatchMarks, inkOf, type Plot, palette, type Scene, type Theme, textWidth } from '~/drawing'

const BOX = 7
const ROW = 6.5

/** Swatches of the materials with their hatch and conductivity, and of the lines that need a word, mm. */
export function legendOf(
  scene: Scene,
  theme: Theme,
  width: number,
): { height: number; plots: (top: number) => Plot[] } {
  const colours = palette(theme)
  const entries = [
    ...scene.legend.map((entry) => ({ kind: 'hatch' as const, ...entry })),
    { kind: 'line' as const, role: 'water-table' as const, text: 'Water table' },
    { kind: 'line' as const, role: 'straight-line' as const, text: 'Straight line between the banks' },
    { kind: 'line' as const, role: 'divide' as const, text: 'Divide' },
  ]
  const size = 2.65
  const places: { x: number; row: number }[] = []
  let x = 2
  let row = 0
  for (const { text } of entries) {
    const long = BOX + 1.5 + textWidth(text, size) + 6
    if (x + long > width && x > 2) {
      x = 2
      row++
    }
    places.push({ x, row })
    x += long
  }
  return {
    height: (row + 1) * ROW + 1,
    plots: (top) =>
      entries.flatMap((entry, i): Plot[] => {
        const place = places[i] ?? { x: 2, row: 0 }
        const y = top + 1 + place.row * ROW
        const box = { x: place.x, y, width: BOX, height: 4.6 }
        const d = `M${box.x} ${box.y}h${box.width}v${box.height}h${-box.width}Z`
        const base = { id: `legend-${i}`, of: 'legend', layer: 'frame' as const, role: entry.role }
        const ink = inkOf(entry.role, theme, 1)
        const text: Plot = {
          ...base,
          id: `legend-${i}-text`,
          kind: 'text',
          x: place.x + BOX + 1.5,
          y: y + 3.3,
          text: entry.text,
          size,
          weight: 400,
          family: 'sans',
          anchor: 'start',
          fill: colours.ink,
        }
        if (entry.kind === 'line') {
          const { fill: _, ...stroke } = ink
          return [{ ...base, kind: 'path', d: `M${box.x} ${y + 2.3}h${BOX}`, ink: stroke }, text]
        }
        const { marks, dots } = hatchMarks(entry.hatch ?? 'sand', box, 1, box)
        return [
          {
            ...base,
            kind: 'hatch',
            hatch: entry.hatch ?? 'sand',
            clip: d,
            ...(ink.fill && { fill: ink.fill }),
            ink,
            marks,
            dots,
          },
          { ...base, id: `legend-${i}-rim`, kind: 'path', d, ink: { stroke: colours.bodyEdge, width: 0.18 } },
          text,
        ]
      }),
  }
}
