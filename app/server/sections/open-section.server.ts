import * as Y from 'yjs'
import type { Act } from '~/access/acts'
import { allowed, can } from '~/access/decide'
import type { Actor } from '~/access/facts.server'
import { firstViewSvg } from '~/export'
import type { LiveSection } from '~/live'
import { solveSteady } from '~/solver'
import type { Database } from '../../../drizzle/client'
import { compact } from '../../../drizzle/log'
import type { Person } from '../context.server'
import { db as database } from '../db.server'
import { findLink } from '../links/find-link.server'
import { log } from '../log.server'
import { findSite } from '../sites/find-site.server'
import { askSection } from './ask-section.server'
import { drawn, refreshView } from './refresh-view.server'
import { type Stored, withStored } from './stored-section.server'

/** What the sheet needs for its first view, without who is looking. */
export type Opened = {
  sectionId: string
  site: { id: string; name: string } | null
  live: LiveSection
  /** The live document's state, base64. */
  state: string
  /** The drawing of the case asked for, as SVG text. */
  svg: string
  epoch: number
  acts: Act[]
  may: 'write' | 'read'
  caseId: string | null
}

/** A log with more rows than this past its snapshot is folded when the section is opened. */
const LONG = 200

/**
 * Opens a section for a signed-in person: its stored state, the first view drawn, what they may do. Folds a long log and brings
 * the lists' view up to date on the way.
 * @throws AppError not-found, or unreadable when the log cannot be read.
 */
export async function openSection(
  person: Person,
  sectionId: string,
  wantedCase: string | null,
  db: Database = database,
): Promise<Opened> {
  const opened = await open(db, person, sectionId, wantedCase)
  const { site } = await findSite(db, person, opened.siteId)
  const { siteId, ...rest } = opened
  return { ...rest, site: { id: siteId, name: site.name } }
}

/**
 * Opens a section for whoever holds a link to it, and counts the use. The site stays unnamed: a link shows one section.
 * @throws AppError not-found for an unknown token, gone for one that is over.
 */
export async function openShared(token: string, wantedCase: string | null, db: Database = database): Promise<Opened> {
  const { actor, sectionId } = await findLink(db, token, { count: true })
  const { siteId: _, ...rest } = await open(db, actor, sectionId, wantedCase)
  return { ...rest, site: null }
}

async function open(db: Database, actor: Actor, sectionId: string, wantedCase: string | null) {
  const { standing, section } = await askSection(db, actor, sectionId, 'section.see')
  const { stored, state } = await withStored(db, sectionId, (stored, { doc }) => ({
    stored,
    state: Buffer.from(Y.encodeStateAsUpdate(doc)).toString('base64'),
  }))
  void tidy(db, sectionId, stored)
  const document = stored.live.section
  const caseId = document.cases.some(({ id }) => id === wantedCase) ? wantedCase : null
  const solution = solveSteady(document, { caseId })
  return {
    sectionId,
    siteId: section.siteId,
    live: stored.live,
    state,
    svg: drawn('first view', () => firstViewSvg(document, solution, { caseId })) ?? '',
    epoch: stored.epoch,
    acts: allowed(standing),
    may: actor.kind === 'person' && can(standing, 'section.edit').yes ? ('write' as const) : ('read' as const),
    caseId,
  }
}

/** Nobody waits for this, and nothing depends on it. */
async function tidy(db: Database, sectionId: string, stored: Stored): Promise<void> {
  try {
    await refreshView(db, sectionId, stored)
    if (stored.rows > LONG) await compact(db, sectionId)
  } catch (error) {
    log.warn({ err: error, sectionId }, 'a section was not tidied')
  }
}
