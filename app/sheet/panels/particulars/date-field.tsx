import { useId } from 'react'
import { valueAt } from '~/section'
import { useSheet, useSheetState } from '../../shell/use-sheet'

export function DateField({ path, label }: { path: string; label?: string }) {
  const sheet = useSheet()
  const id = useId()
  const may = useSheetState((state) => state.may)
  const date = useSheetState((state) => valueAt(state.live.section, path))
  return (
    <div className="field">
      <label className={label ? 'sr-only' : 'field-label'} htmlFor={id}>
        {label ?? 'Date'}
      </label>
      <input
        id={id}
        type="date"
        className="text-input"
        disabled={may === 'read'}
        value={typeof date === 'string' ? date : ''}
        onChange={(event) => sheet.edit([{ do: 'set', path, value: event.target.value || undefined }])}
      />
    </div>
  )
}
