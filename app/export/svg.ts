import type { Ink, Plot, PlotList } from '~/drawing'
import { clean, escapeXml } from './xml'

export type SvgOptions = {
  /** Unit of the root's width and height; the viewBox is always in device units. */
  size?: { width: string; height: string } | null
  title: string
  description: string
  language?: string
  /** CSS with @font-face rules holding the font as data, or null: the family is only named. */
  fontCss?: string | null
  /** Ids get this in front, so that several drawings can stand in one page. */
  prefix?: string
  background?: string | null
  className?: string
}

const FAMILY = `'Work Sans','DejaVu Sans',sans-serif`

function inkText(ink: Ink): string {
  let text = ink.fill ? ` fill="${ink.fill}"` : ' fill="none"'
  if (ink.stroke && ink.width !== 0) {
    text += ` stroke="${ink.stroke}" stroke-width="${round(ink.width ?? 1)}"`
    if (ink.dash) text += ` stroke-dasharray="${ink.dash.map(round).join(' ')}"`
    if (ink.cap && ink.cap !== 'butt') text += ` stroke-linecap="${ink.cap}"`
    if (ink.join && ink.join !== 'miter') text += ` stroke-linejoin="${ink.join}"`
  }
  if (ink.opacity !== undefined) text += ` opacity="${ink.opacity}"`
  return text
}
const round = (value: number) => Math.round(value * 1000) / 1000

/**
 * The SVG painter: a plot list as a self-contained SVG text. No script, no reference to anything outside, valid XML whatever
 * people typed, layers as named groups. Numbers are rounded, so the same drawing gives the same bytes.
 */
export function paintSvg(list: PlotList, options: SvgOptions): string {
  const prefix = options.prefix ?? 'd'
  const defs: string[] = []
  const body: string[] = []
  let clips = 0
  const clipId = (d: string) => {
    const id = `${prefix}-c${clips++}`
    defs.push(`<clipPath id="${id}"><path d="${d}" clip-rule="evenodd"/></clipPath>`)
    return id
  }
  for (const plot of list.plots) body.push(paint(plot, clipId))

  const size =
    options.size === null
      ? ''
      : ` width="${options.size?.width ?? list.width}" height="${options.size?.height ?? list.height}"`
  const style = options.fontCss ? `<style>${options.fontCss}</style>` : ''
  const back = options.background
    ? `<rect width="${round(list.width)}" height="${round(list.height)}" fill="${options.background}"/>`
    : ''
  return (
    `<svg xmlns="http://www.w3.org/2000/svg"${size} viewBox="0 0 ${round(list.width)} ${round(list.height)}" lang="${options.language ?? 'en'}"` +
    ` role="img" aria-labelledby="${prefix}-title ${prefix}-desc" font-family="${FAMILY}"${options.className ? ` class="${options.className}"` : ''}>` +
    `<title id="${prefix}-title">${escapeXml(options.title)}</title><desc id="${prefix}-desc">${escapeXml(options.description)}</desc>` +
    `${style}<defs>${defs.join('')}</defs>${back}${body.join('')}</svg>`
  )
}

function paint(plot: Plot, clipId: (d: string) => string): string {
  switch (plot.kind) {
    case 'path':
      return `<path data-of="${escapeXml(plot.of)}" d="${plot.d}"${plot.fillRule === 'evenodd' ? ' fill-rule="evenodd"' : ''}${inkText(plot.ink)}/>`
    case 'text': {
      const weight = plot.weight === 400 ? '' : ` font-weight="${plot.weight}"`
      const halo = plot.halo
        ? ` paint-order="stroke" stroke="${plot.haloColour}" stroke-width="${round(plot.halo * 2)}" stroke-linejoin="round"`
        : ''
      const turn = plot.rotate ? ` transform="rotate(${round(plot.rotate)} ${round(plot.x)} ${round(plot.y)})"` : ''
      const anchor = plot.anchor === 'start' ? '' : ` text-anchor="${plot.anchor}"`
      return `<text x="${round(plot.x)}" y="${round(plot.y)}" font-size="${round(plot.size)}"${weight}${anchor} fill="${plot.fill}"${halo}${turn}>${escapeXml(clean(plot.text))}</text>`
    }
    case 'hatch': {
      const stroke = plot.ink.stroke ?? plot.ink.fill ?? '#000'
      const fill = plot.fill
        ? `<path d="${plot.clip}" fill="${plot.fill}" fill-rule="evenodd"${plot.ink.opacity === undefined ? '' : ` opacity="${plot.ink.opacity}"`}/>`
        : ''
      if (!plot.marks && !plot.dots) return fill
      const marks = plot.marks
        ? `<path d="${plot.marks}" fill="none" stroke="${stroke}" stroke-width="${round(plot.ink.width ?? 0.8)}"/>`
        : ''
      const dots = plot.dots ? `<path d="${plot.dots}" fill="${stroke}"/>` : ''
      return `<g data-of="${escapeXml(plot.of)}">${fill}<g clip-path="url(#${clipId(plot.clip)})">${marks}${dots}</g></g>`
    }
    case 'clip-push':
      return `<g clip-path="url(#${clipId(plot.d)})">`
    case 'clip-pop':
      return '</g>'
    case 'group-push':
      return `<g data-layer="${plot.layer}" aria-label="${escapeXml(plot.label)}">`
    case 'group-pop':
      return '</g>'
    default:
      return plot satisfies never
  }
}
