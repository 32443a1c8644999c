import { useState } from 'react'
import { useSheet, useSheetState } from '../../shell/use-sheet'

/** Where a value comes from, below it. Nothing said is said plainly. */
export function SourceNote({ path, label }: { path: string; label: string }) {
  const sheet = useSheet()
  const text = useSheetState((state) => state.live.section.sources[path] ?? '')
  const may = useSheetState((state) => state.may)
  const [draft, setDraft] = useState<string | null>(null)
  if (may === 'read') return <p className="source-note">{text || 'no source given'}</p>
  if (draft === null)
    return (
      <button
        type="button"
        className="source-note"
        data-bare={text === '' || undefined}
        onClick={() => setDraft(text)}
        aria-label={`Source of ${label}: ${text || 'none given'}. Change`}
      >
        {text || 'say where it comes from'}
      </button>
    )
  const keep = () => {
    if (draft.trim() !== text) sheet.edit([{ do: 'source', path, text: draft.trim() || null }])
    setDraft(null)
  }
  return (
    <span className="source-edit">
      <input
        className="text-input small-input"
        aria-label={`Source of ${label}`}
        placeholder="slug test P-2, assumed …"
        maxLength={200}
        value={draft}
        // biome-ignore lint/a11y/noAutofocus: the field takes the place of the button that was just pressed
        autoFocus
        onChange={(event) => setDraft(event.target.value)}
        onBlur={keep}
        onKeyDown={(event) => {
          if (event.key === 'Enter') keep()
          if (event.key === 'Escape') {
            setDraft(null)
            event.stopPropagation()
          }
        }}
      />
      <button
        type="button"
        className="link-button"
        onPointerDown={(event) => event.preventDefault()}
        onClick={() => {
          sheet.edit([{ do: 'source', path, text: 'assumed' }])
          setDraft(null)
        }}
      >
        assumed
      </button>
    </span>
  )
}
