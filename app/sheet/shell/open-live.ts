import * as Y from 'yjs'
import { type Connection, connect } from '../connection'
import { createSheet, type OpenSheet } from '../sheet-store'
import type { StillSheet } from './still-sheet'
import type { First } from './surround'

export type LiveSheet = { sheet: OpenSheet; connection: Connection; close(): void }

/** Applied updates of the server carry this origin: they are neither ours to undo nor edits to be stored. */
const FROM_PAGE = 'first view'

function bytesOf(base64: string): Uint8Array {
  return Uint8Array.from(atob(base64), (sign) => sign.charCodeAt(0))
}

/**
 * Joins the section's live document and opens the sheet on it as soon as the document holds something: at once with the state the
 * page brought along, else when the connection or this machine's own store delivers it. `still` tells what was chosen meanwhile.
 */
export function openLive(first: First, still: StillSheet, onOpen: (live: LiveSheet) => void): () => void {
  const doc = new Y.Doc()
  if (first.state) Y.applyUpdate(doc, bytesOf(first.state), FROM_PAGE)
  let live: LiveSheet | null = null
  let closed = false
  const open = () => {
    if (live || closed) return
    const { caseId, tool, picked, reading, view, units, theme, snap, grid, showArrows, showFlowLines, showMarkup } =
      still.get()
    const sheet = createSheet({
      sectionId: first.sectionId,
      doc,
      acts: first.acts,
      may: first.may,
      connection,
      initial: {
        caseId,
        tool,
        picked,
        reading,
        view,
        units,
        theme,
        snap,
        grid,
        showArrows,
        showFlowLines,
        showMarkup,
        link: connection.state,
      },
    })
    live = { sheet, connection, close }
    onOpen(live)
  }
  const connection = connect({
    ...(first.token === null ? { sectionId: first.sectionId } : { token: first.token }),
    doc,
    userKey: first.userId,
    epoch: first.epoch,
    // Not from inside the constructor: the sheet wants the connection.
    onReady: () => queueMicrotask(open),
  })
  // Until the sheet is open the light of the still one says how it goes.
  const unlisten = connection.subscribe(() => {
    if (!live) still.hearLink(connection.state)
  })
  if (first.state) queueMicrotask(open)
  function close() {
    closed = true
    unlisten()
    live?.sheet.close()
    connection.close()
    doc.destroy()
  }
  return close
}
