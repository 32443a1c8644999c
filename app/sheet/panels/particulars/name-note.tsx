import type { ReactNode } from 'react'
import { valueAt } from '~/section'
import { useSheet, useSheetState } from '../../shell/use-sheet'
import { TextField } from '../fields/text-field'

const textAt = (value: unknown) => (typeof value === 'string' ? value : '')

/** The name above and the note below the numbers. */
export function NameAndNote({ path, children }: { path: string; children: ReactNode }) {
  const sheet = useSheet()
  const may = useSheetState((state) => state.may)
  const name = useSheetState((state) => textAt(valueAt(state.live.section, `${path}.name`)))
  const note = useSheetState((state) => textAt(valueAt(state.live.section, `${path}.note`)))
  const keep = (field: 'name' | 'note') => (text: string) =>
    sheet.edit([{ do: 'set', path: `${path}.${field}`, value: text || undefined }])
  const read = may === 'read'
  return (
    <>
      {read && !name ? null : (
        <TextField label="Name" value={name} disabled={read} maxLength={80} onCommit={keep('name')} />
      )}
      {children}
      {read && !note ? null : (
        <TextField label="Note" value={note} disabled={read} maxLength={500} onCommit={keep('note')} />
      )}
    </>
  )
}
