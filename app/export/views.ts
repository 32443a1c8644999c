import { compose, layout, palette, type Theme } from '~/drawing'
import { applyCase, type Section, type UnitSet } from '~/section'
import type { Solution } from '~/solver'
import { inWords } from './sheet'
import { paintSvg } from './svg'

/** Small true drawing with its water table for lists: no rulers, no text. Inks by CSS variables would not survive a download. */
export function thumbnailSvg(section: Section, solution: Solution, size = { width: 240, height: 96 }): string {
  const scene = compose(section, solution, { grid: false, arrows: false, strips: false, markup: false })
  const list = layout(scene, { ...size, unit: 1.7, foot: false, rulers: false }, 'light')
  return paintSvg(list, {
    title: section.title,
    description: inWords(section, solution, 'si'),
    prefix: `t${hash(section.title + JSON.stringify(section.ground) + section.bodies.length)}`,
    background: palette('light').sheet,
    className: 'thumbnail',
  })
}

/** The first view of the sheet, made on the server with the canvas's own plot list; it scales to the room it is given. */
export function firstViewSvg(
  section: Section,
  solution: Solution,
  options: { caseId?: string | null; units?: UnitSet; theme?: Theme; width?: number; height?: number } = {},
): string {
  const shown = options.caseId ? applyCase(section, options.caseId) : section
  const theme = options.theme ?? 'light'
  const scene = compose(shown, solution, { units: options.units })
  const list = layout(scene, { width: options.width ?? 1080, height: options.height ?? 700 }, theme)
  return paintSvg(list, {
    title: section.title,
    description: inWords(shown, solution, options.units ?? 'si'),
    prefix: 'first',
    size: { width: '100%', height: '100%' },
  })
}

/** Short name for ids: two thumbnails on a page must not share clips. */
function hash(text: string): string {
  let value = 2166136261
  for (let i = 0; i < text.length; i++) value = Math.imul(value ^ text.charCodeAt(i), 16777619)
  return (value >>> 0).toString(36)
}
