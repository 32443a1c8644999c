import { type LiveSection, readLive } from '~/live'
import type { Executor } from '../../../drizzle/client'
import { LogUnreadable, loadDoc } from '../../../drizzle/log'
import { AppError, notFound } from '../errors.server'
import { log } from '../log.server'

export type Stored = {
  live: LiveSection
  epoch: number
  seq: number
  /** Rows of the log past the snapshot. */
  rows: number
}

/** Loads the stored document and hands it on with its reading; it is let go of afterwards. */
export async function withStored<T>(
  db: Executor,
  sectionId: string,
  use: (stored: Stored, loaded: NonNullable<Awaited<ReturnType<typeof loadDoc>>>) => T | Promise<T>,
): Promise<T> {
  const loaded = await loadDoc(db, sectionId).catch((error: unknown) => {
    if (!(error instanceof LogUnreadable)) throw error
    log.error({ sectionId, why: error.message }, 'a section cannot be read')
    throw new AppError('unreadable', 'The stored drawing cannot be read. Restore an earlier version from its history.')
  })
  if (!loaded) throw notFound()
  try {
    const { epoch, seq, rows } = loaded
    return await use({ live: readLive(loaded.doc), epoch, seq, rows }, loaded)
  } finally {
    loaded.doc.destroy()
  }
}

/** The section as last stored. */
export const storedSection = (db: Executor, sectionId: string): Promise<Stored> =>
  withStored(db, sectionId, (stored) => stored)
