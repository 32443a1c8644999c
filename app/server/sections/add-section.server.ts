import * as Y from 'yjs'
import { type LiveSection, writeSection } from '~/live'
import type { Section } from '~/section'
import type { Executor } from '../../../drizzle/client'
import { createLog } from '../../../drizzle/log'
import { section as table } from '../../../drizzle/schema'

type New = {
  siteId: string
  practiceId: string
  createdBy: string
  section: Section
  markup?: LiveSection['markup']
}

/** Adds a section and the first state of its live document. Only inside a transaction that has asked whether it may. */
export async function addSection(tx: Executor, { siteId, practiceId, createdBy, section, markup }: New) {
  const id = crypto.randomUUID()
  const doc = new Y.Doc()
  writeSection(doc, section, markup)
  const state = Y.encodeStateAsUpdate(doc)
  doc.destroy()
  await tx.insert(table).values({ id, siteId, practiceId, title: section.title, createdBy })
  await createLog(tx, id, state, { userId: null })
  return id
}
