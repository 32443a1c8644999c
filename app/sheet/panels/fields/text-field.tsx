import { useId, useState } from 'react'

/** A line of words that is kept on Enter or when left, and given back on Esc. */
export function TextField(props: {
  label: string
  value: string
  onCommit: (text: string) => void
  hideLabel?: boolean
  disabled?: boolean
  placeholder?: string
  maxLength?: number
}) {
  const id = useId()
  const [draft, setDraft] = useState<string | null>(null)
  const keep = () => {
    if (draft !== null && draft.trim() !== props.value) props.onCommit(draft.trim())
    setDraft(null)
  }
  return (
    <div className="field">
      <label className={props.hideLabel ? 'sr-only' : 'field-label'} htmlFor={id}>
        {props.label}
      </label>
      <input
        id={id}
        className="text-input"
        value={draft ?? props.value}
        disabled={props.disabled}
        placeholder={props.placeholder}
        maxLength={props.maxLength ?? 200}
        onChange={(event) => setDraft(event.target.value)}
        onBlur={keep}
        onKeyDown={(event) => {
          if (event.key === 'Escape') {
            setDraft(null)
            event.stopPropagation()
          }
          if (event.key === 'Enter') event.currentTarget.blur()
        }}
      />
    </div>
  )
}
