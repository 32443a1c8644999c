import * as idb from 'lib0/indexeddb'
import { IndexeddbPersistence } from 'y-indexeddb'
import * as Y from 'yjs'
import type { Leftover } from './types'

/**
 * Edits kept on this machine until they are stored: one IndexedDB store for each person, section and epoch. How many of them
 * wait stands beside it in localStorage, which is written at once even when the tab is being closed.
 */
const storeName = (userKey: string, sectionId: string, epoch: number) => `doab:doc:${userKey}:${sectionId}:${epoch}`
const MARK = 'doab:kept:'
const COUNT = 'doab:waiting:'

const memory = (): Storage | null => {
  try {
    return globalThis.localStorage ?? null
  } catch {
    return null
  }
}
const keys = (prefix: string): string[] => {
  const kept = memory()
  if (!kept) return []
  return Array.from({ length: kept.length }, (_, i) => kept.key(i) ?? '').filter((key) => key.startsWith(prefix))
}
const countOf = (name: string): number =>
  keys(`${COUNT}${name}#`).reduce((n, key) => n + (Number(memory()?.getItem(key)) || 0), 0)

const forget = async (name: string) => {
  await idb.deleteDB(name)
  memory()?.removeItem(MARK + name)
  for (const key of keys(`${COUNT}${name}#`)) memory()?.removeItem(key)
}

export class LocalStore {
  /** Unstored edits of earlier sessions (or of other tabs) that are in the store. */
  readonly inherited: number
  /** Resolves once they are in the document, or when this browser keeps nothing. */
  readonly loaded: Promise<'found' | 'empty' | 'none'>
  private persistence: IndexeddbPersistence | null = null
  private readonly earlier: string[]
  private readonly own: string
  private closed = false

  constructor(
    private readonly name: string,
    doc: Y.Doc,
  ) {
    this.inherited = countOf(name)
    this.earlier = keys(`${COUNT}${name}#`)
    this.own = `${COUNT}${name}#${doc.clientID}`
    this.loaded = this.open(doc)
  }

  static of(userKey: string, sectionId: string, epoch: number, doc: Y.Doc) {
    return new LocalStore(storeName(userKey, sectionId, epoch), doc)
  }

  private async open(doc: Y.Doc): Promise<'found' | 'empty' | 'none'> {
    try {
      // y-indexeddb has no way to tell of a store that cannot be opened (private windows, a full disk), so it is tried first.
      const trial = await idb.openDB(this.name, (db) =>
        idb.createStores(db, [['updates', { autoIncrement: true }], ['custom']]),
      )
      const [updates] = idb.transact(trial, ['updates'], 'readonly')
      const rows = updates ? await idb.count(updates) : 0
      trial.close()
      if (this.closed) return 'none'
      memory()?.setItem(MARK + this.name, '1')
      this.persistence = new IndexeddbPersistence(this.name, doc)
      await this.persistence.whenSynced
      return rows > 0 ? 'found' : 'empty'
    } catch {
      return 'none'
    }
  }

  get keeps() {
    return this.persistence !== null
  }

  /** How many edits of this tab wait, those it found here included. */
  waiting(count: number) {
    try {
      if (count > 0) memory()?.setItem(this.own, String(count))
      else memory()?.removeItem(this.own)
      // From the first change on, what was found is counted under this tab.
      for (const key of this.earlier.splice(0)) if (key !== this.own) memory()?.removeItem(key)
    } catch {
      // A full localStorage costs the count after a reload, not the edits.
    }
  }

  async close() {
    this.closed = true
    await this.persistence?.destroy()
  }

  /** Access is gone and nothing waits: nothing of the section stays on this machine. */
  async discard() {
    await this.close()
    await forget(this.name).catch(() => {})
  }
}

/** Unstored edits of earlier epochs of this section. */
export async function leftoversOf(userKey: string, sectionId: string, epoch: number): Promise<Leftover[]> {
  const prefix = `${MARK}doab:doc:${userKey}:${sectionId}:`
  const left: Leftover[] = []
  for (const key of keys(prefix)) {
    const older = Number(key.slice(prefix.length))
    const name = key.slice(MARK.length)
    if (!(older < epoch)) continue
    const waiting = countOf(name)
    if (waiting === 0) await forget(name).catch(() => {})
    else left.push({ epoch: older, waiting, open: () => stateOf(name), forget: () => forget(name) })
  }
  return left
}

async function stateOf(name: string): Promise<Uint8Array> {
  const doc = new Y.Doc()
  const persistence = new IndexeddbPersistence(name, doc)
  await persistence.whenSynced
  const state = Y.encodeStateAsUpdate(doc)
  await persistence.destroy()
  doc.destroy()
  return state
}

/** Unstored edits of this person on this machine, over all sections; for a word of warning before signing out. */
export const waitingLocally = (userKey: string): number =>
  keys(`${COUNT}doab:doc:${userKey}:`).reduce((n, key) => n + (Number(memory()?.getItem(key)) || 0), 0)

/** Removes everything kept on this machine: for this person, or (without a key) for everybody. Called on signing out. */
export async function clearLocal(userKey?: string): Promise<void> {
  const prefix = userKey === undefined ? MARK : `${MARK}doab:doc:${userKey}:`
  await Promise.all(keys(prefix).map((key) => forget(key.slice(MARK.length)).catch(() => {})))
}
