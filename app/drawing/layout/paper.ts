import { FOOT, plainNumber, shapeOf } from '~/section'
import { fitText, textWidth } from '../fonts/measure'
import type { Plot, PlotList, PlotText, Rect } from '../plot'
import type { Scene } from '../scene'
import { inkOf, palette, type Theme } from '../styles'
import { neatExaggeration } from './frames'
import { layout } from './index'
import { legendOf } from './legend'
import { fixed } from './path'
import { stepFor } from './rulers'

export type Paper = 'A4' | 'A3' | 'Letter' | 'Tabloid'
/** Landscape sizes, mm: ISO 216, ANSI/ASME Y14.1. */
export const PAPERS: Record<Paper, { width: number; height: number }> = {
  A4: { width: 297, height: 210 },
  A3: { width: 420, height: 297 },
  Letter: { width: 279.4, height: 215.9 },
  Tabloid: { width: 431.8, height: 279.4 },
}
/** Border after ISO 5457: 20 mm to file by on the left, 10 mm elsewhere. */
const EDGE = { left: 20, other: 10 }
const BAND = 38

/** The first scale of ISO 5455 (1, 2 or 5 times a power of ten) at which `metres` fit into `mm` of paper. */
export function scaleFor(metres: number, mm: number): number {
  const least = Math.max((metres * 1000) / mm, 1)
  const power = 10 ** Math.floor(Math.log10(least) + 1e-9)
  return ([1, 2, 5, 10].find((times) => times * power >= least * (1 - 1e-9)) ?? 10) * power
}

export type PaperOptions = {
  paper: Paper
  /** Horizontal scale 1:n; the first of ISO 5455 that shows the whole strip unless given. */
  scale?: number | null
  exaggeration?: number | null
  legend?: boolean
}

/**
 * The sheet on paper, millimetres, y down: the drawing true to a scale of ISO 5455, its exaggeration stated, frame, scale bar,
 * legend, caution line and a title block with the fields of ISO 7200. A given scale at which the strip is longer than the paper
 * shows its middle.
 */
export function layoutPaper(scene: Scene, options: PaperOptions, theme: Theme): PlotList {
  const { width, height } = PAPERS[options.paper]
  const edge: Rect = {
    x: EDGE.left,
    y: EDGE.other,
    width: width - EDGE.left - EDGE.other,
    height: height - 2 * EDGE.other,
  }
  const inset = { left: edge.x, top: edge.y, right: EDGE.other, bottom: EDGE.other + BAND }
  const viewport = { width, height, unit: 1, foot: false, inset } as const
  const box = layout({ ...scene, items: [] }, viewport, theme).frames.find(({ id }) => id === 'section')?.box ?? edge
  const scale = options.scale ?? scaleFor(scene.x.max - scene.x.min, box.width)
  const perMetre = 1000 / scale
  const range = scene.panels.find(({ id }) => id === 'section')?.range ?? { min: 0, max: 1 }
  const exaggeration = options.exaggeration ?? neatExaggeration(box.height / (range.max - range.min) / perMetre)
  const xMid = (scene.x.min + scene.x.max) / 2
  const half = box.width / perMetre / 2
  const view = { x0: xMid - half, x1: xMid + half, zMid: (range.min + range.max) / 2, exaggeration }
  const list = layout(scene, { ...viewport, view, scale }, theme)
  const top = edge.y + edge.height - BAND
  const block = Math.min(150, edge.width * 0.46)
  const right = edge.x + edge.width
  const pen = inkOf('frame', theme, 1)
  const line = (id: string, d: string, ink = pen): Plot => ({
    kind: 'path',
    id,
    of: 'frame',
    role: 'frame',
    layer: 'frame',
    d,
    ink,
  })
  const page: Plot = {
    kind: 'path',
    id: 'paper',
    of: 'frame',
    role: 'paper',
    layer: 'frame',
    d: `M0 0H${fixed(width)}V${fixed(height)}H0Z`,
    ink: { fill: palette(theme).sheet },
  }
  const left: Rect = { x: edge.x + 3, y: top + 9.2, width: edge.width - block - 6, height: BAND - 14 }
  const around: Plot[] = [
    line('border', `M${edge.x} ${edge.y}H${fixed(right)}V${fixed(edge.y + edge.height)}H${edge.x}Z`, {
      ...pen,
      width: 0.5,
    }),
    line('band', `M${edge.x} ${fixed(top)}H${fixed(right)}`),
    ...scaleBar(scene, perMetre, { x: left.x, y: top + 3.2 }, scale, exaggeration, theme),
    ...(options.legend === false ? [] : legendOf(scene, left, 1, theme)),
    text(
      'caution',
      scene.caution,
      left.x,
      edge.y + edge.height - 1.9,
      2.1,
      400,
      left.width,
      palette(theme).soft,
      'caution',
    ),
    ...titleBlock(
      scene,
      { x: right - block, y: top, width: block, height: BAND },
      options.paper,
      scale,
      exaggeration,
      theme,
    ),
  ]
  return { ...list, plots: [page, ...list.plots, ...around] }
}

function text(
  id: string,
  value: string,
  x: number,
  y: number,
  size: number,
  weight: 400 | 500 | 600,
  room: number,
  fill: string,
  of: 'caution' | 'title-block' | 'scale-bar' = 'title-block',
): PlotText {
  return {
    kind: 'text',
    id,
    of,
    role: of === 'caution' ? 'caution' : 'title-block',
    layer: 'frame',
    x,
    y,
    text: fitText(value, room, size, weight),
    size,
    weight,
    family: 'sans',
    anchor: 'start',
    fill,
  }
}

/** A bar of a round length in the sheet's units, in four parts, with the scale in words beside it. */
function scaleBar(
  scene: Scene,
  perMetre: number,
  at: { x: number; y: number },
  scale: number,
  exaggeration: number,
  theme: Theme,
): Plot[] {
  const unit = scene.units === 'us' ? FOOT : 1
  const step = stepFor(perMetre * unit, 9)
  const part = step * unit * perMetre
  const { ink } = palette(theme)
  const name = shapeOf('distance', scene.units).unit
  const plots: Plot[] = []
  for (let i = 0; i < 4; i++)
    plots.push({
      kind: 'path',
      id: `scale-bar-${i}`,
      of: 'scale-bar',
      role: 'frame',
      layer: 'frame',
      d: `M${fixed(at.x + i * part)} ${fixed(at.y)}h${fixed(part)}v1h${fixed(-part)}Z`,
      ink: { stroke: ink, width: 0.18, ...(i % 2 === 0 ? { fill: ink } : {}) },
    })
  for (const i of [0, 2, 4]) {
    const label = `${plainNumber(i * step, 6)}${i === 4 ? ` ${name}` : ''}`
    const shift = i === 0 ? 0 : textWidth(plainNumber(i * step, 6), 2.1) / 2
    plots.push(text(`scale-bar-text-${i}`, label, at.x + i * part - shift, at.y + 3.6, 2.1, 400, 30, ink, 'scale-bar'))
  }
  const says = `1:${scale} horizontal, 1:${Number((scale / exaggeration).toPrecision(3))} vertical (exaggerated ${Number(exaggeration.toPrecision(2))}×)`
  plots.push(text('scale-says', says, at.x + 4 * part + 12, at.y + 1.6, 2.3, 500, 90, ink, 'scale-bar'))
  return plots
}

type Cell = { id: string; label: string; value: string; share: number; size?: number; weight?: 400 | 500 | 600 }

/** ISO 7200: legal owner, title, number, revision, date, sheet, persons; a dash where nothing is known. */
function titleBlock(scene: Scene, box: Rect, paper: Paper, scale: number, exaggeration: number, theme: Theme): Plot[] {
  const { title } = scene
  const colours = palette(theme)
  const none = '–'
  const rows: { height: number; cells: Cell[] }[] = [
    {
      height: 12.5,
      cells: [
        {
          id: 'title',
          label: [title.practice, title.site].filter(Boolean).join(' · ') || 'Section',
          value: title.title || 'Untitled',
          share: 0.72,
          size: 3.6,
          weight: 600,
        },
        { id: 'case', label: 'Case', value: title.caseName, share: 0.28, weight: 500 },
      ],
    },
    {
      height: 8.5,
      cells: [
        { id: 'datum', label: 'Levels', value: title.datum || none, share: 0.4 },
        {
          id: 'scale',
          label: `Scale on ${paper}`,
          value: `1:${scale} · VE ${Number(exaggeration.toPrecision(2))}×`,
          share: 0.32,
        },
        { id: 'date', label: 'Date', value: title.date || none, share: 0.28 },
      ],
    },
    {
      height: 8.5,
      cells: [
        { id: 'prepared', label: 'Prepared', value: title.prepared || none, share: 0.33 },
        { id: 'checked', label: 'Checked', value: title.checked || none, share: 0.33 },
        { id: 'approved', label: 'Approved', value: title.approved || none, share: 0.34 },
      ],
    },
    {
      height: 8.5,
      cells: [
        { id: 'number', label: 'Number', value: title.number || none, share: 0.4 },
        { id: 'revision', label: 'Revision', value: title.revision, share: 0.4, weight: 600 },
        { id: 'page', label: 'Sheet', value: '1 of 1', share: 0.2 },
      ],
    },
  ]
  const pen = inkOf('title-block', theme, 1)
  const plots: Plot[] = []
  let y = box.y
  for (const row of rows) {
    let x = box.x
    for (const cell of row.cells) {
      const width = box.width * cell.share
      const size = cell.size ?? 2.5
      plots.push(
        {
          kind: 'path',
          id: `tb-${cell.id}`,
          of: 'title-block',
          role: 'title-block',
          layer: 'frame',
          ink: pen,
          d: `M${fixed(x)} ${fixed(y)}h${fixed(width)}v${fixed(row.height)}h${fixed(-width)}Z`,
        },
        text(`tb-${cell.id}-label`, cell.label, x + 1.5, y + 2.5, 1.8, 400, width - 3, colours.soft),
        text(
          `tb-${cell.id}-value`,
          cell.value,
          x + 1.5,
          y + row.height - 1.6,
          size,
          cell.weight ?? 400,
          width - 3,
          colours.ink,
        ),
      )
      x += width
    }
    y += row.height
  }
  return plots
}
