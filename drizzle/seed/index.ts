import { hashPassword } from 'better-auth/crypto'
import type { Executor } from '../client'
import { account, member, organization, user } from '../schema'

/** The demo's people and practice. */
export async function seed(db: Executor): Promise<void> {
  const practice = crypto.randomUUID()
  await db.insert(organization).values({ id: practice, name: 'Kell & Marsh', slug: 'kell-marsh' })
  const password = await hashPassword('demo-water-table')
  for (const [name, email, role] of [
    ['Ines Kell', 'ines@kellmarsh.example', 'principal'],
    ['Tom Odera', 'tom@kellmarsh.example', 'engineer'],
    ['Mira Voss', 'mira@kellmarsh.example', 'checker'],
    ['Jon Hale', 'jon@kellmarsh.example', 'reader'],
  ] as const) {
    const userId = crypto.randomUUID()
    await db.insert(user).values({ id: userId, name, email, emailVerified: true })
    await db
      .insert(account)
      .values({ id: crypto.randomUUID(), userId, accountId: userId, providerId: 'credential', password })
    await db.insert(member).values({ id: crypto.randomUUID(), organizationId: practice, userId, role })
  }
}
