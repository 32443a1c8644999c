import { eq } from 'drizzle-orm'
import { z } from 'zod'
import { can } from '~/access/decide'
import type { Actor } from '~/access/facts.server'
import { profileCsv, sectionJson, sheetSvg } from '~/export'
import { applyCase } from '~/section'
import { solveSteady } from '~/solver'
import type { Executor } from '../../../drizzle/client'
import { organization, site, section as table } from '../../../drizzle/schema'
import { AppError } from '../errors.server'
import { askSection } from './ask-section.server'
import { fonts } from './fonts.server'
import { storedSection } from './stored-section.server'

export type FileKind = 'sheet.svg' | 'profile.csv' | 'section.json'
export type SectionFile = { name: string; type: string; body: string }

const PAPERS = ['A4', 'A3', 'Letter', 'Tabloid'] as const

const asked = z.object({
  case: z.string().optional(),
  paper: z.enum(PAPERS, `paper: use ${PAPERS.join(', ')}.`).default('A4'),
  scale: z.coerce
    .number('scale: give the n of 1:n as a number.')
    .min(1, 'scale: give 1 or more.')
    .max(10_000_000, 'scale: give at most 10000000.')
    .optional(),
  units: z.enum(['si', 'us'], 'units: use si or us.').default('si'),
})

/**
 * A section as a file. Same rights as the page that shows it.
 * @throws AppError not-found or forbidden; invalid, naming the wrong parameter and what it may be; unreadable.
 */
export async function exportSection(
  db: Executor,
  actor: Actor,
  sectionId: string,
  kind: FileKind,
  query: URLSearchParams,
): Promise<SectionFile> {
  const facts = await askSection(db, actor, sectionId, 'section.export')
  // A parameter that is there but empty was not chosen.
  const read = asked.safeParse(Object.fromEntries([...query].filter(([, value]) => value !== '')))
  if (!read.success) throw new AppError('invalid', read.error.issues.map((issue) => issue.message).join(' '))
  const { paper, scale, units } = read.data
  const { live } = await storedSection(db, sectionId)
  const found = live.section.cases.find(({ id }) => id === read.data.case)
  if (read.data.case && !found) throw new AppError('invalid', `case: the section has no case “${read.data.case}”.`)
  const caseId = found?.id ?? null
  const caseName = found ? found.name || found.id : 'As drawn'
  const { title } = live.section
  const name = found ? `${title}, ${caseName}` : title
  if (kind === 'section.json')
    return { name: `${title}.json`, type: 'application/json; charset=utf-8', body: sectionJson(live.section) }
  const solution = solveSteady(live.section, { caseId })
  const section = applyCase(live.section, caseId)
  if (kind === 'profile.csv')
    return {
      name: `${name}.csv`,
      type: 'text/csv; charset=utf-8; header=present',
      body: profileCsv(section, solution, { units }),
    }
  // A link shows one section; what job it belongs to is not told with it.
  const places = await placeNames(db, sectionId)
  const seesSite = can(facts.standing, 'site.see').yes
  const body = sheetSvg({
    section,
    solution,
    site: seesSite ? places?.site : undefined,
    practice: places?.practice,
    caseName,
    paper,
    scale,
    units,
    fonts: await fonts(),
  })
  return { name: `${name}.svg`, type: 'image/svg+xml; charset=utf-8', body }
}

async function placeNames(db: Executor, sectionId: string) {
  const [row] = await db
    .select({ site: site.name, practice: organization.name })
    .from(table)
    .innerJoin(site, eq(site.id, table.siteId))
    .innerJoin(organization, eq(organization.id, table.practiceId))
    .where(eq(table.id, sectionId))
  return row
}
