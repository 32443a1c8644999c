import { type ComposeView, compose, layoutPaper, PAPERS, type Paper, type Theme, type TitleBlock } from '~/drawing'
import { applyCase, type Section, type UnitSet } from '~/section'
import type { Solution } from '~/solver'
import { FAMILY, type Fonts, fontFaces, type Outliner } from './fonts'
import { paintSvg } from './paint'
import { sayInWords } from './words'
import { num, xml } from './xml'

export type SheetOptions = {
  section: Section
  /** Solved for the same case. */
  solution: Solution
  /** Values of this case are put into the section before it is drawn; leave out when they already are. */
  caseId?: string | null
  caseName?: string
  live?: ComposeView['live']
  /** Fields of the title block (ISO 7200); what is not known shows a dash. */
  site?: string
  practice?: string
  number?: string
  revision?: string
  prepared?: string
  checked?: string
  approved?: string
  date?: string
  paper?: Paper
  /** Horizontal scale 1:n; the first of ISO 5455 that shows the whole strip unless given. */
  scale?: number | null
  exaggeration?: number | null
  units?: UnitSet
  theme?: Theme
  /** Put into the file; without them the family is only named and readers use their own sans-serif where they lack it. */
  fonts?: Fonts | null
  /** Draws text as shapes instead, for readers that take no fonts from a file. */
  outline?: Outliner
  /** Layers of the mark-up that are not hidden; on unless told. */
  markup?: boolean
  include?: {
    grid?: boolean
    arrows?: boolean
    flowLines?: boolean
    strips?: boolean
    legend?: boolean
  }
  /** BCP 47; English unless told. */
  lang?: string
}

/**
 * The sheet as one SVG file: true to scale on its paper, millimetres as user units, layers as named groups, nothing fetched
 * from outside, no script. Deterministic. Draws whatever `parseSection` accepts.
 * @throws RangeError when the paper is unknown, or scale or exaggeration is no positive number.
 */
export function sheetSvg(options: SheetOptions): string {
  const { solution, include = {}, paper = 'A4', theme = 'print', units = 'si' } = options
  if (!Object.hasOwn(PAPERS, paper))
    throw new RangeError(`paper: "${String(paper)}" is not one of ${Object.keys(PAPERS).join(', ')}`)
  for (const key of ['scale', 'exaggeration'] as const) {
    const value = options[key]
    if (value !== undefined && value !== null && !(value > 0 && Number.isFinite(value)))
      throw new RangeError(`${key}: ${value} is no positive number`)
  }
  const section = options.caseId ? applyCase(options.section, options.caseId) : options.section
  const scene = compose(section, solution, {
    live: options.live,
    units,
    grid: include.grid,
    arrows: include.arrows,
    flowLines: include.flowLines,
    strips: include.strips,
    markup: options.markup,
    title: fieldsOf(options),
  })
  const { scale, exaggeration } = options
  const list = layoutPaper(scene, { paper, scale, exaggeration, legend: include.legend }, theme)
  const { fonts, outline } = options
  const faces = fonts && !outline ? `<style>${fontFaces(fonts)}</style>\n` : ''
  const lang = xml(options.lang ?? 'en')
  const size = `width="${num(list.width)}mm" height="${num(list.height)}mm" viewBox="0 0 ${num(list.width)} ${num(list.height)}"`
  return `<?xml version="1.0" encoding="UTF-8"?>
<svg xmlns="http://www.w3.org/2000/svg" lang="${lang}" xml:lang="${lang}" ${size} font-family="${FAMILY.sans}" role="img">
<title>${xml(scene.title.title || 'Untitled section')}</title>
<desc>${xml(sayInWords(section, solution, units))}</desc>
${faces}${paintSvg(list, { outline })}
</svg>
`
}

const FIELDS = [
  'caseName',
  'site',
  'practice',
  'number',
  'revision',
  'prepared',
  'checked',
  'approved',
  'date',
] as const
/** What is known of the title block; what is not keeps the scene's own. */
function fieldsOf(options: SheetOptions): Partial<TitleBlock> {
  const known: Partial<TitleBlock> = {}
  for (const field of FIELDS) {
    const value = options[field]
    if (value) known[field] = value
  }
  return known
}
