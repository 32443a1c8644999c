import { eq } from 'drizzle-orm'
import type { Database } from '../client'
import { setup } from '../schema'
import { seed } from './index'

const DEMO = 'demo'

/** Whether the demo was ever loaded into this database. */
export async function demoIsThere(db: Database): Promise<boolean> {
  const [row] = await db.select().from(setup).where(eq(setup.name, DEMO))
  return row !== undefined
}

/** Loads the demo, all of it or nothing: the note that it is there is part of the same transaction. */
export async function loadDemo(db: Database): Promise<void> {
  await db.transaction(async (tx) => {
    await tx.insert(setup).values({ name: DEMO })
    await seed(tx)
  })
}
