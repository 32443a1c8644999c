import type { Act } from '~/access/acts'
import { can } from '~/access/decide'
import { type SiteFacts, standingForSite } from '~/access/facts.server'
import type { Executor } from '../../../drizzle/client'
import type { Person } from '../context.server'
import { must, notFound } from '../errors.server'

/** What the person is towards a site, when they may do this act. @throws AppError not-found or forbidden. */
export async function askSite(db: Executor, person: Person, siteId: string, act: Act): Promise<SiteFacts> {
  const facts = await standingForSite(db, person, siteId)
  if (!facts) throw notFound()
  must(can(facts.standing, act))
  return facts
}
