import {
  emptySection,
  isPathOf,
  LIMITS,
  lineAt,
  NAMED,
  POINT,
  SECTION,
  type Section,
  said,
  troubleWith,
} from '~/section'
import { DOC_VERSION, MADE_UP, type Mirror, type Root } from '../shape'
import type { LiveSection } from '../types'
import { readCases } from './cases'
import { type Held, NONE, problemList, readField, type Say } from './context'
import { keepCover, keysOf, pointsOf, readLine, type Strip } from './lines'
import { readMarkup } from './markup'
import { mend } from './mend'
import {
  readBank,
  readBodies,
  readFeatures,
  readLimits,
  readMaterials,
  readObservations,
  readRecharge,
} from './objects'

/**
 * The section a document holds, whatever it holds. What contradicts itself is brought to the nearest that does not, what cannot be
 * read is left out, and each such thing becomes a problem with its place; the section always passes parseSection. The same
 * document gives the same answer on every replica.
 */
export function settle(mirror: Mirror): LiveSection {
  const { problems, say } = problemList()
  const root = (name: Root): Held => mirror.get(name) ?? NONE
  const version = root('doc').get('version')
  if (version !== undefined && version !== DOC_VERSION)
    say(
      'section',
      'This section was drawn with another version of Doab; what this one cannot read is not shown. Reload the page.',
    )
  const markup = readMarkup(root('layers'), root('marks'), say)
  if (isBlank(mirror)) {
    say('section', 'Nothing has been drawn here yet: an empty strip is shown.')
    return { section: emptySection(), keys: blankKeys(), markup, problems }
  }

  const strip = readStrip(root, say)
  const lines = keepCover(
    readLine(root('ground'), 'ground', strip, say),
    readLine(root('base'), 'base', strip, say),
    say,
  )
  const words = readWords(root('section'), say)
  const materials = readMaterials(root('materials'), say)
  const host = words.host ?? materials[0]?.id ?? ''
  const ground = pointsOf(lines.ground)
  const drawn: Section = {
    format: 'doab.section',
    version: 1,
    title: words.title,
    datum: words.datum,
    ground,
    base: pointsOf(lines.base),
    left: withStage(readBank(root('left'), 'left', strip.left, say), ground),
    right: withStage(readBank(root('right'), 'right', strip.right, say), ground),
    materials,
    host,
    bodies: readBodies(root('bodies'), host, say),
    recharge: readRecharge(root('recharge'), say),
    features: readFeatures(root('features'), say),
    observations: readObservations(root('observations'), say),
    limits: readLimits(root('limits'), say),
    cases: [],
    sources: {},
    surfaceSeepage: words.surfaceSeepage,
    ...words.names,
  }
  const section = { ...mend(withinVertices(drawn, say), say) }
  section.cases = readCases(root('cases'), section, say)
  section.sources = readSources(root('sources'), section)
  return {
    section,
    keys: {
      ground: keysOf(section.ground),
      base: keysOf(section.base),
      bodies: Object.fromEntries(section.bodies.map(({ id, outline }) => [id, keysOf(outline)])),
    },
    markup,
    problems,
  }
}

const blankKeys = () => ({
  ground: [MADE_UP.left, MADE_UP.right],
  base: [MADE_UP.left, MADE_UP.right],
  bodies: {},
})

function isBlank(mirror: Mirror): boolean {
  for (const [root, held] of mirror)
    if (root !== 'doc' && root !== 'layers' && root !== 'marks' && held.size > 0) return false
  return true
}

function readWords(held: Held, say: Say) {
  const text = (field: 'title' | 'datum', instead: string) => {
    const value = held.has(field) ? readField(held, field, SECTION[field], field, say) : undefined
    return typeof value === 'string' ? value : instead
  }
  const host = held.get('host')
  const seepage = held.get('surfaceSeepage')
  const names: Pick<Section, 'name' | 'note'> = {}
  for (const field of ['name', 'note'] as const) {
    const value = held.has(field) ? readField(held, field, NAMED[field], field, say) : undefined
    if (typeof value === 'string') names[field] = value
  }
  return {
    title: text('title', 'Untitled section'),
    datum: text('datum', 'm above site datum'),
    host: troubleWith(SECTION.host, host) === null && typeof host === 'string' ? host : null,
    surfaceSeepage: typeof seepage === 'boolean' ? seepage : true,
    names,
  }
}

/** Where the banks stand. Dragged past one another they change places; a lost one goes where the ground ends. */
function readStrip(root: (name: Root) => Held, say: Say): Strip {
  const xs: number[] = []
  for (const vertex of root('ground').values())
    if (typeof vertex === 'object' && vertex !== null && 'x' in vertex && troubleWith(POINT.x, vertex.x) === null)
      xs.push(Number(vertex.x))
  const ends = {
    left: xs.reduce((a, b) => Math.min(a, b), Infinity),
    right: xs.reduce((a, b) => Math.max(a, b), -Infinity),
  }
  const at = (side: 'left' | 'right'): number | null => {
    const value = root(side).get('x')
    if (typeof value === 'number' && troubleWith(POINT.x, value) === null) return value + 0
    say(`${side}.x`, `Where the ${side} bank stands could not be read; it is taken where the ground ends.`)
    return Number.isFinite(ends[side]) ? ends[side] : null
  }
  const [a, b] = [at('left'), at('right')]
  let left = a ?? (b === null ? 0 : b - 100)
  let right = b ?? left + 100
  if (left > right) {
    say('right.x', 'The banks stood the wrong way round; they are taken the other way. Move one of them.', {
      x: right,
      to: left,
    })
    ;[left, right] = [right, left]
  }
  if (right - left < LIMITS.strip.min) {
    say('right.x', 'The banks stood at one place; the strip is taken 1 m long. Move one of them.', { x: left })
    if (left + 1 <= LIMITS.coordinate) right = left + 1
    else left = right - 1
  }
  if (right - left > LIMITS.strip.max) {
    right = left + LIMITS.strip.max
    say('right.x', `The strip was longer than ${said(LIMITS.strip.max)} m and is cut there.`, { x: right })
  }
  return { left, right }
}

/** A bank whose stage could not be read: the water stands a metre below the ground. */
function withStage(bank: Section['left'], ground: Section['ground']): Section['left'] {
  if (bank.kind !== 'water' || !Number.isNaN(bank.stage)) return bank
  return { ...bank, stage: Math.max(-LIMITS.coordinate, lineAt(ground, bank.x) - 1) }
}

/** Bodies beyond the number of vertices a section may have are left out, the last ones first. */
function withinVertices(section: Section, say: Say): Section {
  let total = section.ground.length + section.base.length
  const bodies = section.bodies.filter(({ outline }) => {
    total += outline.length
    return total <= LIMITS.vertices
  })
  if (bodies.length === section.bodies.length) return section
  say(
    'bodies',
    `The section has more than ${said(LIMITS.vertices)} vertices; ${said(section.bodies.length - bodies.length)} bodies are left out.`,
  )
  return { ...section, bodies }
}

function readSources(held: Held, section: Section): Section['sources'] {
  const kept: [string, string][] = []
  for (const path of [...held.keys()].sort()) {
    const text = held.get(path)
    if (typeof text === 'string' && isPathOf(section, path) && kept.length < LIMITS.sources) {
      const rule = { type: 'text', label: 'The source', max: 2000 } as const
      if (troubleWith(rule, text) === null) kept.push([path, text])
    }
  }
  return Object.fromEntries(kept)
}
