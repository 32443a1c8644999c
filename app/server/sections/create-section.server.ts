import { isStartingDrawing, parseSection, type Section, type StartingDrawing, startingDrawing } from '~/section'
import type { Database } from '../../../drizzle/client'
import { writeAudit } from '../audit/write-audit.server'
import type { Person } from '../context.server'
import { AppError } from '../errors.server'
import { askSite } from '../sites/ask-site.server'
import { addSection } from './add-section.server'
import { readTitle } from './section-title.server'

export type NewSection = { title: string; start: StartingDrawing } | { title: string; json: string }

/**
 * Makes a section on a site: from a starting drawing, or from a section file (an empty title then keeps the file's own).
 * @throws AppError invalid or unreadable, naming the place in the file and what is wrong there.
 */
export async function createSection(
  db: Database,
  person: Person,
  siteId: string,
  given: NewSection,
): Promise<{ id: string }> {
  return db.transaction(async (tx) => {
    const { site } = await askSite(tx, person, siteId, 'section.create')
    const section = 'json' in given ? fromFile(given.title, given.json) : fromStart(given.title, given.start)
    const id = await addSection(tx, { siteId, practiceId: site.practiceId, createdBy: person.userId, section })
    await writeAudit(tx, person, {
      practiceId: site.practiceId,
      act: 'section.create',
      on: `section:${id}`,
      label: section.title,
      details: 'json' in given ? { from: 'file' } : { from: given.start },
    })
    return { id }
  })
}

function fromStart(title: string, start: string): Section {
  if (!isStartingDrawing(start)) throw new AppError('invalid', 'Choose one of the starting drawings.')
  return { ...startingDrawing(start), title: readTitle(title) }
}

const TOLD = 5

function fromFile(title: string, json: string): Section {
  let input: unknown
  try {
    input = JSON.parse(json)
  } catch (error) {
    const why = error instanceof Error ? ` (${error.message})` : ''
    throw new AppError('unreadable', `The file is not JSON${why}. Choose a section file saved by Doab.`)
  }
  const read = parseSection(input)
  if (read.ok) return title.trim() ? { ...read.section, title: readTitle(title) } : read.section
  const told = read.errors.slice(0, TOLD).map(({ path, message }) => (path ? `${path}: ${message}` : message))
  const more = read.errors.length > TOLD ? [`and ${read.errors.length - TOLD} more`] : []
  throw new AppError('unreadable', `The file is not a section Doab can read. ${[...told, ...more].join('; ')}`)
}
