import type { Executor } from '../../../drizzle/client'
import { audit } from '../../../drizzle/schema'

/** Who did it; a `Person` of the request context passes. */
export type By = { userId: string; name: string; address: string }
export type Deed = {
  practiceId: string
  act: string
  /** "site:<id>", "section:<id>", "link:<id>". */
  on: string
  label: string
  details?: object
}

/** Notes a deed. Hand in the transaction of the deed itself, so that there is no deed without its note and no note without its deed. */
export async function writeAudit(tx: Executor, by: By, deed: Deed): Promise<void> {
  const { practiceId, act, on, label, details } = deed
  await tx.insert(audit).values({
    practiceId,
    actorId: by.userId,
    actorName: by.name,
    act,
    on,
    label: label.slice(0, 255),
    details: details ?? null,
    address: by.address,
  })
}
