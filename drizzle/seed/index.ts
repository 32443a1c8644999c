import type { Executor } from '../client'
import { seedPeople } from './people'
import { seedSites } from './sites'

/** The demo: a practice, its people, two sites with six sections. Called once, in a transaction: all of it or nothing. */
export async function seed(db: Executor): Promise<void> {
  await seedSites(db, await seedPeople(db))
}
