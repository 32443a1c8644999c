import { type FieldMetadata, getInputProps, getSelectProps, getTextareaProps } from '@conform-to/react'
import type { ReactNode } from 'react'

type Common = { label: string; hint?: ReactNode; optional?: boolean }
type Meta = FieldMetadata<string | undefined, Record<string, unknown>, string[]>
const described = (meta: Meta, hint: ReactNode) => (hint && !meta.errors ? meta.descriptionId : undefined)

function Around({ meta, label, hint, optional, children }: Common & { meta: Meta; children: ReactNode }) {
  return (
    <div className="ui-field">
      <label htmlFor={meta.id}>
        {label} {optional ? <small>(may stay empty)</small> : null}
      </label>
      {children}
      {hint && !meta.errors ? (
        <p className="ui-hint" id={meta.descriptionId}>
          {hint}
        </p>
      ) : null}
      {meta.errors ? (
        <p className="ui-wrong" id={meta.errorId}>
          {meta.errors.join(' ')}
        </p>
      ) : null}
    </div>
  )
}

/** A line of text with its label, a hint, and what is wrong with it beside it. */
export function TextField({ meta, type = 'text', ...rest }: Common & { meta: Meta; type?: 'text' | 'email' | 'date' }) {
  const { key, ...input } = getInputProps(meta, { type, ariaDescribedBy: described(meta, rest.hint) })
  return (
    <Around meta={meta} {...rest}>
      <input key={key} {...input} className="ui-input" autoComplete="off" />
    </Around>
  )
}

export function TextArea({ meta, rows = 5, ...rest }: Common & { meta: Meta; rows?: number }) {
  const { key, ...input } = getTextareaProps(meta, { ariaDescribedBy: described(meta, rest.hint) })
  return (
    <Around meta={meta} {...rest}>
      <textarea key={key} {...input} rows={rows} className="ui-input" />
    </Around>
  )
}

export function SelectField({
  meta,
  options,
  ...rest
}: Common & { meta: Meta; options: readonly { value: string; label: string }[] }) {
  const { key, ...select } = getSelectProps(meta, { ariaDescribedBy: described(meta, rest.hint) })
  return (
    <Around meta={meta} {...rest}>
      <select key={key} {...select} className="ui-input">
        {options.map(({ value, label }) => (
          <option key={value} value={value}>
            {label}
          </option>
        ))}
      </select>
    </Around>
  )
}

/** What is wrong with a form as a whole. */
export const FormAlert = ({ id, errors }: { id: string; errors?: string[] }) =>
  errors ? (
    <p role="alert" id={id} className="ui-alert">
      {errors.join(' ')}
    </p>
  ) : null
