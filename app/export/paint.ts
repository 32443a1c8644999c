import type { Ink, Layer, Plot, PlotHatch, PlotList, PlotText } from '~/drawing'
import { FAMILY, type Outliner } from './fonts'
import { idOf, num, xml } from './xml'

/** Names of the layers as vector editors show them. */
const LAYER_NAMES: Record<Layer, string> = {
  frame: 'Frame',
  ground: 'Ground',
  base: 'Base',
  bodies: 'Bodies',
  water: 'Water',
  works: 'Works',
  results: 'Results',
  marks: 'Marks',
  'mark-up': 'Mark-up',
}

export type PaintOptions = {
  /** Before every id, so that several drawings can stand on one page. */
  prefix?: string
  /** Text as shapes instead of as text. */
  outline?: Outliner
  /** Keep ids and paths of the objects drawn. */
  named?: boolean
}

function inkOf({ stroke, width, dash, fill, opacity, cap, join }: Ink): string {
  const parts = [`fill="${fill ?? 'none'}"`]
  if (stroke && width !== 0) {
    parts.push(`stroke="${stroke}"`, `stroke-width="${num(width ?? 1)}"`)
    if (dash?.length) parts.push(`stroke-dasharray="${dash.map(num).join(' ')}"`)
    if (cap && cap !== 'butt') parts.push(`stroke-linecap="${cap}"`)
    if (join && join !== 'miter') parts.push(`stroke-linejoin="${join}"`)
  }
  if (opacity !== undefined && opacity !== 1) parts.push(`opacity="${num(opacity)}"`)
  return parts.join(' ')
}

function textOf(plot: PlotText, outline: Outliner | undefined, mark: string): string {
  const { x, y, text, size, weight, family, anchor, fill, rotate, halo, haloColour } = plot
  if (text.trim() === '') return ''
  const turn = rotate ? `rotate(${num(rotate)} ${num(x)} ${num(y)})` : ''
  const around =
    halo && haloColour
      ? ` stroke="${haloColour}" stroke-width="${num(halo * 2)}" stroke-linejoin="round" paint-order="stroke"`
      : ''
  const shape = family === 'sans' && anchor === 'start' ? outline?.(text, size, weight) : null
  if (shape)
    return `<path${mark} role="img" aria-label="${xml(text)}" transform="${turn}translate(${num(x)} ${num(y)})" d="${shape}" fill="${fill}"${around}/>`
  const side = anchor === 'start' ? '' : ` text-anchor="${anchor}"`
  const face = family === 'symbols' ? ` font-family="${FAMILY.symbols}"` : ''
  const heavy = weight === 400 ? '' : ` font-weight="${weight}"`
  return `<text${mark} x="${num(x)}" y="${num(y)}" font-size="${num(size)}"${heavy}${face}${side} fill="${fill}"${around}${turn ? ` transform="${turn}"` : ''}>${xml(text)}</text>`
}

const markOf = (plot: Extract<Plot, { of: string }>, { prefix = '', named }: PaintOptions): string =>
  named === false ? '' : ` id="${idOf(prefix + plot.id)}" data-of="${xml(plot.of)}" data-role="${plot.role}"`

/**
 * The SVG painter: the plots as elements, in their order, each run of a layer in a group named after it. No script, nothing
 * from outside, valid XML whatever people typed, numbers rounded so that the same drawing gives the same bytes.
 */
export function paintSvg(list: PlotList, options: PaintOptions = {}): string {
  const { prefix = '', outline } = options
  const out: string[] = []
  const clips: string[] = []
  const inside: string[] = []
  let open: Layer | null = null
  let runs = 0

  const close = () => {
    if (open === null) return
    out.push('</g>'.repeat(inside.length + 1))
    open = null
  }
  const enter = (layer: Layer) => {
    if (open === layer) return
    close()
    runs += 1
    out.push(`<g id="${prefix}${layer}-${runs}" data-layer="${layer}" aria-label="${LAYER_NAMES[layer]}">`)
    for (const clip of inside) out.push(`<g clip-path="url(#${clip})">`)
    open = layer
  }
  const addClip = (d: string): string => {
    const id = `${prefix}clip-${clips.length}`
    clips.push(`<clipPath id="${id}"><path d="${d}" clip-rule="evenodd"/></clipPath>`)
    return id
  }
  const hatched = (plot: PlotHatch) => {
    const { fill, ink, marks, dots, clip } = plot
    const see = ink.opacity === undefined ? '' : ` opacity="${num(ink.opacity)}"`
    out.push(`<g${markOf(plot, options)}${see}>`)
    if (fill) out.push(`<path d="${clip}" fill="${fill}" fill-rule="evenodd"/>`)
    if (marks || dots) {
      out.push(`<g clip-path="url(#${addClip(clip)})">`)
      if (marks) out.push(`<path d="${marks}" ${inkOf({ ...ink, fill: undefined, opacity: undefined })}/>`)
      if (dots) out.push(`<path d="${dots}" fill="${ink.stroke ?? ink.fill ?? 'none'}"/>`)
      out.push('</g>')
    }
    out.push('</g>')
  }

  for (const plot of list.plots) {
    switch (plot.kind) {
      case 'path': {
        enter(plot.layer)
        const rule = plot.fillRule === 'evenodd' ? ' fill-rule="evenodd"' : ''
        out.push(`<path${markOf(plot, options)} d="${plot.d}"${rule} ${inkOf(plot.ink)}/>`)
        break
      }
      case 'text':
        enter(plot.layer)
        out.push(textOf(plot, outline, markOf(plot, options)))
        break
      case 'hatch':
        enter(plot.layer)
        hatched(plot)
        break
      case 'clip-push': {
        const id = addClip(plot.d)
        inside.push(id)
        if (open !== null) out.push(`<g clip-path="url(#${id})">`)
        break
      }
      case 'clip-pop':
        if (inside.pop() !== undefined && open !== null) out.push('</g>')
        break
      case 'group-push':
      case 'group-pop':
        break
      default:
        plot satisfies never
    }
  }
  close()
  return `${clips.length > 0 ? `<defs>${clips.join('')}</defs>` : ''}${out.join('\n')}`
}
