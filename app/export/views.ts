import { type ComposeView, compose, layout, type PlotList, type Role, type Theme } from '~/drawing'
import { applyCase, type Section } from '~/section'
import type { Solution } from '~/solver'
import { FAMILY } from './fonts'
import { paintSvg } from './paint'
import { sayInWords } from './words'
import { num, xml } from './xml'

/** For inside a page: no ids but those of the clips, no file header. */
const inline = (list: PlotList, label: string, attributes: string, prefix: string) =>
  `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 ${num(list.width)} ${num(list.height)}" ${attributes} font-family="${FAMILY.sans}" role="img" aria-label="${xml(label)}">${paintSvg(list, { prefix, named: false })}</svg>`

/** What a small drawing has room for. */
const SMALL: ReadonlySet<Role> = new Set<Role>([
  'soil',
  'ground',
  'base',
  'base-fill',
  'body',
  'body-edge',
  'open-water',
  'stage',
  'saturated',
  'water-table',
  'wall',
  'bank-no-flow',
  'divide',
])

/** A small true drawing with its water table for lists: no text, no rulers. Two on a page share no ids. */
export function thumbnailSvg(
  section: Section,
  solution: Solution,
  { width = 240, height = 96, theme = 'light' }: { width?: number; height?: number; theme?: Theme } = {},
): string {
  const scene = compose(section, solution, { arrows: false, grid: false, strips: false, markup: false })
  const items = scene.items.filter(({ role, kind }) => SMALL.has(role) && kind !== 'text' && kind !== 'symbol')
  // No labels, no recharge: the height goes to what is drawn.
  const levels = items.flatMap((item) => (item.kind === 'path' ? item.points.map(({ z }) => z) : []))
  const panels = scene.panels.map((panel) => {
    const { min, max } = panel.range
    const top = Math.min(max, Math.max(...levels))
    return { ...panel, range: { min, max: top + (top - min) * 0.12 } }
  })
  const list = layout({ ...scene, items, panels }, { width, height, unit: 1.6, foot: false, rulers: false }, theme)
  const label = section.title || 'Section'
  return inline(
    list,
    label,
    `width="${num(width)}" height="${num(height)}"`,
    `t${hash(JSON.stringify([section, theme]))}-`,
  )
}

/**
 * The sheet's first view, as the canvas will draw it at a nominal size: for the page that the server renders. It scales with the
 * place it stands in and keeps its proportions.
 */
export function firstViewSvg(
  section: Section,
  solution: Solution,
  options: ComposeView & { caseId?: string | null; width?: number; height?: number; theme?: Theme } = {},
): string {
  const { caseId, width = 1080, height = 700, theme = 'light', ...view } = options
  const shown = caseId ? applyCase(section, caseId) : section
  const list = layout(compose(shown, solution, view), { width, height }, theme)
  const label = `${section.title || 'Section'}. ${sayInWords(shown, solution, view.units ?? 'si')}`
  return inline(list, label, 'width="100%" height="100%" preserveAspectRatio="xMidYMid meet"', 'first-')
}

/** FNV-1a: a short name that differs where the drawing differs. */
function hash(text: string): string {
  let value = 2166136261
  for (let i = 0; i < text.length; i++) value = Math.imul(value ^ text.charCodeAt(i), 16777619)
  return (value >>> 0).toString(36)
}
