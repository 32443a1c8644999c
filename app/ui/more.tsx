import { type ReactNode, useEffect, useRef } from 'react'
import type { ButtonKind } from './button'

/**
 * What opens beside a button: a menu, or a question before something is taken away. Opens and acts without JavaScript; with it, Escape
 * and a click elsewhere close it.
 */
export function More({
  label,
  name,
  kind,
  children,
}: {
  label: ReactNode
  /** Said to screen readers when the label alone does not tell which. */
  name?: string
  kind?: ButtonKind
  children: ReactNode
}) {
  const details = useRef<HTMLDetailsElement>(null)
  useEffect(() => {
    const close = (event: Event) => {
      const element = details.current
      if (!element?.open) return
      if (event instanceof KeyboardEvent) {
        if (event.key !== 'Escape') return
        element.querySelector('summary')?.focus()
      } else if (event.target instanceof Node && element.contains(event.target)) return
      element.open = false
    }
    document.addEventListener('pointerdown', close)
    document.addEventListener('keydown', close)
    return () => {
      document.removeEventListener('pointerdown', close)
      document.removeEventListener('keydown', close)
    }
  }, [])
  return (
    <details ref={details} className="ui-more">
      <summary className="ui-button" data-kind={kind} aria-label={name}>
        {label}
      </summary>
      <div className="ui-pop">{children}</div>
    </details>
  )
}
