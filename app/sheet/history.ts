import * as Y from 'yjs'
import { LOCAL } from '~/live'

/** What was picked before and after a step, so that undo and redo bring the selection back with the change. */
type Picked = { before: string[]; after: string[] }

export type History = {
  /** Run a write as one step of its own. Steps with the same `join` word within a second become one. */
  step(write: () => void, picked: Picked, join?: string): void
  undo(): void
  redo(): void
  canUndo(): boolean
  canRedo(): boolean
  close(): void
}

/** Two nudges nearer than this are one step, ms. */
const JOIN_WITHIN = 1000

/**
 * Undo of one's own edits only: Yjs' UndoManager over the whole document, tracking our local origin and nothing else. Where
 * somebody else has since changed the same field, their value stays (Yjs never undoes over a foreign change) and the next
 * older step of one's own is undone instead.
 */
export function createHistory(
  doc: Y.Doc,
  on: { change(): void; select(picked: string[]): void; now?: () => number },
): History {
  const now = on.now ?? Date.now
  const manager = new Y.UndoManager(doc, { trackedOrigins: new Set([LOCAL]), captureTimeout: 0 })
  let pending: Picked | null = null
  let last: { join: string; at: number } | null = null

  manager.on('stack-item-added', ({ stackItem, type }) => {
    // Undoing adds an item to the redo stack: it keeps the selections of the step it reverses.
    if (pending && type === 'undo') stackItem.meta.set('picked', pending)
    on.change()
  })
  manager.on('stack-item-updated', ({ stackItem }) => {
    const first = stackItem.meta.get('picked') as Picked | undefined
    if (pending) stackItem.meta.set('picked', { before: first?.before ?? pending.before, after: pending.after })
    on.change()
  })
  manager.on('stack-item-popped', ({ stackItem, type }) => {
    const picked = stackItem.meta.get('picked') as Picked | undefined
    const other = type === 'undo' ? manager.redoStack : manager.undoStack
    if (picked) other.at(-1)?.meta.set('picked', picked)
    if (picked) on.select(type === 'undo' ? picked.before : picked.after)
    on.change()
  })

  return {
    step(write, picked, join) {
      const joins = join !== undefined && last !== null && last.join === join && now() - last.at < JOIN_WITHIN
      manager.captureTimeout = joins ? Number.POSITIVE_INFINITY : 0
      if (!joins) manager.stopCapturing()
      pending = picked
      try {
        write()
      } finally {
        pending = null
        manager.captureTimeout = 0
        last = join === undefined ? null : { join, at: now() }
      }
    },
    undo() {
      last = null
      manager.undo()
      on.change()
    },
    redo() {
      last = null
      manager.redo()
      on.change()
    },
    canUndo: () => manager.undoStack.length > 0,
    canRedo: () => manager.redoStack.length > 0,
    close: () => manager.destroy(),
  }
}
