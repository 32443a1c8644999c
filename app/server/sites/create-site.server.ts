import { can } from '~/access/decide'
import { standingForPractice } from '~/access/facts.server'
import type { Database } from '../../../drizzle/client'
import { site } from '../../../drizzle/schema'
import { writeAudit } from '../audit/write-audit.server'
import type { Person } from '../context.server'
import { must, notFound } from '../errors.server'
import { readSiteWords, type SiteWords } from './site-words.server'

/** Makes a site in the practice the person is working in; they own it. */
export async function createSite(db: Database, person: Person, given: SiteWords): Promise<{ id: string }> {
  return db.transaction(async (tx) => {
    const facts = person.practice && (await standingForPractice(tx, person, person.practice.id))
    if (!facts) throw notFound()
    must(can(facts.standing, 'site.create'))
    const words = readSiteWords(given)
    const id = crypto.randomUUID()
    const practiceId = facts.practice.id
    await tx.insert(site).values({ id, practiceId, ownerId: person.userId, ...words })
    await writeAudit(tx, person, { practiceId, act: 'site.create', on: `site:${id}`, label: words.name })
    return { id }
  })
}
