import { useEffect, useRef, useState } from 'react'
import { useSheet, useSheetState } from './use-sheet'

/** The section's title, edited where it stands. */
export function TitleField() {
  const sheet = useSheet()
  const title = useSheetState((state) => state.live.section.title)
  const may = useSheetState((state) => state.may)
  const [draft, setDraft] = useState<string | null>(null)
  const given = useRef(false)
  useEffect(() => {
    document.title = `${title} · Doab`
  }, [title])
  if (may === 'read') return <h1 className="section-title">{title}</h1>
  const keep = () => {
    const text = draft?.trim()
    if (!given.current && text && text !== title) sheet.edit([{ do: 'set', path: 'title', value: text.slice(0, 200) }])
    given.current = false
    setDraft(null)
  }
  const shown = draft ?? title
  return (
    <h1 className="section-title">
      <span className="title-measure" data-text={shown}>
        <input
          aria-label="Title of the section"
          value={shown}
          maxLength={200}
          size={1}
          onChange={(event) => setDraft(event.target.value)}
          onBlur={keep}
          onKeyDown={(event) => {
            if (event.key === 'Escape') given.current = true
            if (event.key === 'Enter' || event.key === 'Escape') event.currentTarget.blur()
          }}
        />
      </span>
    </h1>
  )
}
