import { useId, useLayoutEffect, useRef, useState } from 'react'
import type { UnitSet } from '../../state'
import { editable, type Kind, shapeOf, show } from './quantities'
import { readQuantity, warmUnits } from './read-quantity'

export type QuantityFieldProps = {
  label: string
  hideLabel?: boolean
  /** In a table whose heading names the unit: the number alone until it is typed in. */
  bare?: boolean
  kind: Kind
  units: UnitSet
  /** In metres and days; null or undefined: empty; 'several': the picked objects differ. */
  value: number | null | undefined | 'several'
  /** What an empty field means; without it the field may not be emptied. */
  emptyMeans?: string
  refuse?: (value: number) => string | null
  hint?: string
  disabled?: boolean
  /** null when emptied. Answers why it was refused, or null. */
  onCommit: (value: number | null) => string | null | undefined
}

/**
 * A number with its unit. What is typed may carry any unit of the right kind, or be a small sum; Enter or leaving the field keeps
 * it, Esc gives the old value back, the arrows step it. What is wrong stands below, and what was typed stays.
 */
export function QuantityField(props: QuantityFieldProps) {
  const { kind, units, value } = props
  const id = useId()
  const field = useRef<HTMLInputElement>(null)
  /** Just entered or kept: nothing typed or pressed since. */
  const entered = useRef(false)
  const [draft, setDraft] = useState<string | null>(null)
  const [wrong, setWrong] = useState<string | null>(null)
  const shown = typeof value === 'number' ? show(value, kind, units, !props.bare) : ''
  const inField = draft ?? shown
  useLayoutEffect(() => {
    // Entered, or just kept: what is typed next takes the value's place. Only the text on the screen can be selected.
    const element = field.current
    if (entered.current && document.activeElement === element && element?.value === inField) element.select()
  }, [inField])
  const release = () => {
    setDraft(null)
    setWrong(null)
  }
  const commit = async (text: string) => {
    if (text.trim() === '') {
      if (props.emptyMeans === undefined) return value === 'several' ? release() : setWrong('A value is needed here.')
      const refused = typeof value === 'number' || value === 'several' ? props.onCommit(null) : null
      return refused ? setWrong(refused) : release()
    }
    const read = await readQuantity(text, kind, units)
    if (!read.ok) return setWrong(read.message)
    const refused = props.refuse?.(read.value) ?? (read.value === value ? null : props.onCommit(read.value))
    return refused ? setWrong(refused) : release()
  }
  const step = async (by: number) => {
    const read = draft === null ? null : await readQuantity(draft, kind, units)
    const from = read?.ok ? read.value : typeof value === 'number' ? value : null
    if (from === null) return
    const next = stepped(from, by, kind, units)
    const refused = props.refuse?.(next) ?? props.onCommit(next)
    if (refused) setWrong(refused)
    else release()
  }
  return (
    <div className="field" data-wrong={wrong ? true : undefined}>
      <label className={props.hideLabel ? 'sr-only' : 'field-label'} htmlFor={id}>
        {props.label}
      </label>
      <input
        ref={field}
        id={id}
        className="text-input number-input"
        inputMode="text"
        autoComplete="off"
        spellCheck={false}
        title={props.hint}
        disabled={props.disabled}
        placeholder={value === 'several' ? 'several' : props.emptyMeans}
        aria-invalid={wrong !== null}
        aria-describedby={wrong ? `${id}-wrong` : undefined}
        value={inField}
        onFocus={() => {
          warmUnits()
          if (typeof value === 'number') setDraft(editable(value, kind, units))
          entered.current = true
        }}
        onClick={(event) => {
          // The press that brought the focus put the caret somewhere; what one wants is to type over the value.
          if (entered.current) event.currentTarget.select()
          entered.current = false
        }}
        onChange={(event) => {
          entered.current = false
          setDraft(event.target.value)
          setWrong(null)
        }}
        onBlur={() => {
          if (draft === null || (typeof value === 'number' && draft === editable(value, kind, units))) release()
          else void commit(draft)
        }}
        onKeyDown={(event) => {
          if (event.key === 'Enter' && draft !== null) {
            event.preventDefault()
            entered.current = true
            void commit(draft)
          }
          if (event.key === 'Escape') {
            event.stopPropagation()
            release()
          }
          if (event.key === 'ArrowUp' || event.key === 'ArrowDown') {
            event.preventDefault()
            void step((event.key === 'ArrowUp' ? 1 : -1) * (event.shiftKey ? 10 : 1))
          }
        }}
      />
      {wrong ? (
        <p className="field-wrong" id={`${id}-wrong`} role="alert">
          {wrong}
        </p>
      ) : null}
    </div>
  )
}

/** One step of an arrow key: the last place shown for lengths, about a hundredth for what spans decades. */
export function stepped(from: number, by: number, kind: Kind, units: UnitSet): number {
  const { times, size } = stepOf(from, kind, units)
  const next = Math.round((from * times) / size + by) * size
  return next / times
}
function stepOf(from: number, kind: Kind, units: UnitSet): { times: number; size: number } {
  const shape = shapeOf(kind, units)
  if (shape.decimals !== undefined) return { times: shape.times, size: 10 ** -shape.decimals }
  const scaled = Math.abs(from * shape.times)
  const size = scaled === 0 ? 10 ** -(shape.figures ?? 3) : 10 ** (Math.floor(Math.log10(scaled)) - 1)
  return { times: shape.times, size }
}
