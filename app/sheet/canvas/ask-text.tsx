import { useEffect, useRef } from 'react'

export type Asking = { px: number; py: number; initial: string; answer(text: string | null): void }

/** A small paper slip on the drawing to write a note on. Leaving it keeps what was written; Escape drops it. */
export function AskText({ asking }: { asking: Asking }) {
  const field = useRef<HTMLTextAreaElement>(null)
  const done = useRef(false)
  useEffect(() => {
    const element = field.current
    if (!element) return
    // Opened when the press is over, so nothing takes the focus away again.
    element.focus()
    element.select()
  }, [])
  const answer = (text: string | null) => {
    if (done.current) return
    done.current = true
    asking.answer(text)
  }
  return (
    <textarea
      ref={field}
      data-own-input=""
      className="canvas-slip"
      aria-label="Text of the note"
      defaultValue={asking.initial}
      rows={Math.max(2, asking.initial.split('\n').length)}
      maxLength={2000}
      style={{ left: `min(${asking.px}px, calc(100% - 15.5rem))`, top: `min(${asking.py}px, calc(100% - 4.5rem))` }}
      onBlur={(event) => answer(event.currentTarget.value)}
      onKeyDown={(event) => {
        event.stopPropagation()
        // While an input method composes, Enter and Escape belong to it.
        if (event.nativeEvent.isComposing) return
        if (event.key === 'Escape') answer(null)
        else if (event.key === 'Enter' && (event.ctrlKey || event.metaKey)) answer(event.currentTarget.value)
      }}
    />
  )
}
