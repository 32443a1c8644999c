import { hashPassword } from 'better-auth/crypto'
import type { Executor } from '../client'
import { account, member, organization, user } from '../schema'
// Also read by the starter, which prints who can sign in.
import demo from './people.json'

export type Seeded = { practiceId: string; userIdOf: (email: string) => string; outsiderId: string }

/** A surveyor from outside the practice; signs in with the same password as everybody in the demo. */
const OUTSIDER = { name: 'Bel Arden', email: 'bel@ardensurvey.example' }

/** The demo's practice, its people, and one person from outside. */
export async function seedPeople(db: Executor): Promise<Seeded> {
  const practiceId = crypto.randomUUID()
  await db.insert(organization).values({ id: practiceId, name: 'Kell & Marsh', slug: 'kell-marsh' })
  const password = await hashPassword(demo.password)
  const ids = new Map<string, string>()
  const add = async ({ name, email }: { name: string; email: string }) => {
    const userId = crypto.randomUUID()
    await db.insert(user).values({ id: userId, name, email, emailVerified: true })
    await db
      .insert(account)
      .values({ id: crypto.randomUUID(), userId, accountId: userId, providerId: 'credential', password })
    ids.set(email, userId)
    return userId
  }
  for (const person of demo.people) {
    const userId = await add(person)
    await db.insert(member).values({ id: crypto.randomUUID(), organizationId: practiceId, userId, role: person.role })
  }
  const outsiderId = await add(OUTSIDER)
  const userIdOf = (email: string) => {
    const id = ids.get(email)
    if (!id) throw new Error(`people.json has nobody with the address ${email}, whom the demo's sites need`)
    return id
  }
  return { practiceId, userIdOf, outsiderId }
}
