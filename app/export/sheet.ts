import { CAUTION, type ComposeView, compose, layout, type PlotList, palette, type Theme } from '~/drawing'
import { applyCase, formatQuantity, type Section, type UnitSet } from '~/section'
import type { Solution } from '~/solver'
import { base64 } from './base64'
import { legendOf } from './legend'
import { paintSvg } from './svg'

/** Landscape papers, mm: ISO 216 and ANSI. */
export const PAPERS = {
  A4: { width: 297, height: 210 },
  A3: { width: 420, height: 297 },
  Letter: { width: 279.4, height: 215.9 },
  Tabloid: { width: 431.8, height: 279.4 },
} as const
export type Paper = keyof typeof PAPERS

export type SheetOptions = {
  section: Section
  solution: Solution
  caseId?: string | null
  caseName?: string
  site?: string
  practice?: string
  revision?: string
  prepared?: string
  paper?: Paper
  /** Horizontal scale 1:n; the largest usual one that fits unless told. */
  scale?: number
  units?: UnitSet
  theme?: Theme
  /** Work Sans as woff2 bytes to embed; null or missing: the family is only named. */
  fonts?: { regular: Uint8Array; semibold: Uint8Array } | null
  live?: ComposeView['live']
  markup?: boolean
}

/** Reduction scales of ISO 5455 (1, 2, 5 times powers of ten). */
const SCALES = [
  10, 20, 50, 100, 200, 500, 1000, 2000, 5000, 10_000, 20_000, 50_000, 100_000, 200_000, 500_000, 1_000_000,
]
const MARGIN = 10
/** Rulers and rim inside the frame, mm; as layout leaves them. */
const SIDE = 16

/** The smallest usual n for which a length, m, fits on a width, mm. */
export const fittingScale = (metres: number, millimetres: number): number =>
  SCALES.find((n) => (metres * 1000) / n <= millimetres) ?? Math.ceil((metres * 1000) / millimetres)

/**
 * The sheet on paper, true to scale: width and height in mm, x at 1:scale, exaggeration stated in the title block.
 * @throws RangeError when the paper is unknown or the scale is no positive number.
 */
export function sheetSvg(options: SheetOptions): string {
  const paper = PAPERS[options.paper ?? 'A4']
  if (!paper) throw new RangeError(`paper: ${String(options.paper)} is not one of ${Object.keys(PAPERS).join(', ')}`)
  const section = options.caseId ? applyCase(options.section, options.caseId) : options.section
  const theme = options.theme ?? 'print'
  const scene = compose(section, options.solution, {
    units: options.units,
    live: options.live,
    markup: options.markup,
    title: {
      caseName: options.caseName ?? 'As drawn',
      revision: options.revision ?? 'draft',
      ...(options.site && { site: options.site }),
      ...(options.practice && { practice: options.practice }),
      ...(options.prepared && { prepared: options.prepared }),
    },
  })
  const inner = { width: paper.width - 2 * MARGIN, height: paper.height - 2 * MARGIN }
  const legend = legendOf(scene, theme, inner.width)
  const usable = inner.width - SIDE
  const long = scene.x.max - scene.x.min
  const scale = options.scale ?? fittingScale(long, usable)
  if (!(scale > 0)) throw new RangeError(`scale: ${scale} is no positive number`)
  const shown = (usable * scale) / 1000
  const middle = (scene.x.min + scene.x.max) / 2
  const box = { width: inner.width, height: inner.height - legend.height }
  // Heights first as they fit, then the same exaggeration with the true x scale.
  const fit = layout(scene, { ...box, unit: 1, scale }, theme)
  const z = scene.panels[0]?.range ?? { min: 0, max: 1 }
  const perMetre = 1000 / scale
  const room = fit.frames[0]?.box.height ?? box.height
  const exaggeration = neat(room / (z.max - z.min) / perMetre)
  const view = { x0: middle - shown / 2, x1: middle + shown / 2, zMid: (z.min + z.max) / 2, exaggeration }
  const list = layout(scene, { ...box, unit: 1, view, scale }, theme)
  const sheet: PlotList = {
    ...list,
    plots: [...list.plots, ...legend.plots(box.height), ...scaleBar(list, scale, theme, options.units ?? 'si')],
  }
  const framed = paintSvg(sheet, {
    title: `${section.title} · ${scene.title.caseName}`,
    description: inWords(section, options.solution, options.units ?? 'si'),
    fontCss: options.fonts ? fontCss(options.fonts) : null,
    size: { width: `${inner.width}mm`, height: `${inner.height}mm` },
  })
  return wrap(framed, paper, inner, palette(theme).sheet, palette(theme).ink)
}

const neat = (fits: number): number =>
  [...[1, 2, 5, 10, 20, 50, 100, 200, 500]].reverse().find((step) => step <= fits) ?? Number(fits.toPrecision(2))

/** Puts the drawing on its paper: margins and the frame line. */
function wrap(
  svg: string,
  paper: { width: number; height: number },
  inner: { width: number; height: number },
  fill: string,
  stroke: string,
): string {
  return svg
    .replace(
      / width="[^"]*" height="[^"]*" viewBox="[^"]*"/,
      ` width="${paper.width}mm" height="${paper.height}mm" viewBox="${-MARGIN} ${-MARGIN} ${paper.width} ${paper.height}"`,
    )
    .replace(
      '</defs>',
      `</defs><rect x="${-MARGIN}" y="${-MARGIN}" width="${paper.width}" height="${paper.height}" fill="${fill}"/><rect width="${inner.width}" height="${inner.height}" fill="none" stroke="${stroke}" stroke-width="0.5"/>`,
    )
}

/** A bar of a round length at the sheet's x scale, with its length in words. */
function scaleBar(list: PlotList, scale: number, theme: Theme, units: UnitSet): PlotList['plots'] {
  const frame = list.frames[0]
  if (!frame) return []
  const foot = units === 'us' ? 0.3048 : 1
  const steps = SCALES.map((n) => n / 10)
  const metres = ([...steps].reverse().find((step) => (step * foot * 1000) / scale <= 45) ?? 1) * foot
  const long = (metres * 1000) / scale
  const x = frame.box.x + 3
  const y = frame.box.y + frame.box.height - 4
  const { ink } = palette(theme)
  return [
    {
      kind: 'path',
      id: 'scale-bar',
      of: 'scale-bar',
      role: 'frame',
      layer: 'frame',
      d: `M${x} ${y - 1.2}V${y}H${Math.round((x + long) * 1000) / 1000}V${y - 1.2}`,
      ink: { stroke: ink, width: 0.3 },
    },
    {
      kind: 'text',
      id: 'scale-bar-text',
      of: 'scale-bar',
      role: 'text',
      layer: 'frame',
      x: x + long / 2,
      y: y - 1.6,
      text: formatQuantity(metres, 'distance', units),
      size: 2.65,
      weight: 500,
      family: 'sans',
      anchor: 'middle',
      fill: ink,
      halo: 0.7,
      haloColour: palette(theme).sheet,
    },
  ]
}

function fontCss({ regular, semibold }: { regular: Uint8Array; semibold: Uint8Array }): string {
  const face = (bytes: Uint8Array, weight: string) =>
    `@font-face{font-family:'Work Sans';font-weight:${weight};src:url(data:font/woff2;base64,${base64(bytes)}) format('woff2')}`
  return face(regular, '400') + face(semibold, '500 600')
}

/** What the drawing says, in words: for whoever cannot see it. */
export function inWords(section: Section, solution: Solution, units: UnitSet): string {
  const say = (value: number, kind: Parameters<typeof formatQuantity>[1]) => formatQuantity(value, kind, units)
  const ends = (['left', 'right'] as const)
    .map((side) => {
      const bank = section[side]
      const name = bank.name ?? `${side} bank`
      return bank.kind === 'water'
        ? `${name}: stage ${say(bank.stage, 'elevation')}`
        : bank.kind === 'inflow'
          ? `${name}: inflow ${say(bank.rate, 'flow')}`
          : `${name}: no flow`
    })
    .join('; ')
  const answer =
    solution.status === 'solved'
      ? `Highest water table ${say(solution.highest.head, 'elevation')} at ${say(solution.highest.x, 'distance')}. ${solution.divides.map((d) => `${d.kind} at ${say((d.from + d.to) / 2, 'distance')}`).join(', ')}`
      : `No steady answer: ${solution.reason.map(({ message }) => message).join(' ')}`
  return `Cross-section between two waters. ${ends}. ${answer}. ${CAUTION}`
}
