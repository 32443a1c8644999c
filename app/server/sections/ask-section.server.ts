import type { Act } from '~/access/acts'
import { can } from '~/access/decide'
import { type Actor, type SectionFacts, standingForSection } from '~/access/facts.server'
import type { Executor } from '../../../drizzle/client'
import { must, notFound } from '../errors.server'

/** What the actor is towards a section, when they may do this act. @throws AppError not-found or forbidden. */
export async function askSection(db: Executor, actor: Actor, sectionId: string, act: Act): Promise<SectionFacts> {
  const facts = await standingForSection(db, actor, sectionId)
  if (!facts) throw notFound()
  must(can(facts.standing, act))
  return facts
}
