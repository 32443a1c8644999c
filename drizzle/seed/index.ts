import { hashPassword } from 'better-auth/crypto'
import type { Executor } from '../client'
import { account, member, organization, user } from '../schema'
// Also read by the starter, which prints who can sign in.
import demo from './people.json'

/** The demo's people and practice. Called once, in a transaction: all of it or nothing. */
export async function seed(db: Executor): Promise<void> {
  const practice = crypto.randomUUID()
  await db.insert(organization).values({ id: practice, name: 'Kell & Marsh', slug: 'kell-marsh' })
  const password = await hashPassword(demo.password)
  for (const { name, email, role } of demo.people) {
    const userId = crypto.randomUUID()
    await db.insert(user).values({ id: userId, name, email, emailVerified: true })
    await db
      .insert(account)
      .values({ id: crypto.randomUUID(), userId, accountId: userId, providerId: 'credential', password })
    await db.insert(member).values({ id: crypto.randomUUID(), organizationId: practice, userId, role })
  }
}
