import {
  type FieldMetadata,
  getFormProps,
  getInputProps,
  getTextareaProps,
  type SubmissionResult,
  useForm,
} from '@conform-to/react'
import { getZodConstraint, parseWithZod } from '@conform-to/zod/v4'
import type { ReactNode } from 'react'
import { Form, useNavigation } from 'react-router'
import type { z } from 'zod'

/** A form that works without JavaScript: checked on the server, keeps what was typed, says what is wrong beside the field. */
export function PageForm<Schema extends z.ZodObject>({
  id,
  schema,
  result,
  defaults,
  intent,
  submit,
  children,
}: {
  id: string
  schema: Schema
  result?: SubmissionResult<string[]> | null
  defaults?: Record<string, string>
  intent?: string
  submit: string
  children: (fields: { [Name in keyof z.input<Schema>]-?: FieldMetadata<z.input<Schema>[Name]> }) => ReactNode
}) {
  const busy = useNavigation().state === 'submitting'
  const [form, fields] = useForm<z.input<Schema>, z.output<Schema>, string[]>({
    id,
    lastResult: result,
    ...(defaults && { defaultValue: defaults as never }),
    constraint: getZodConstraint(schema),
    shouldValidate: 'onSubmit',
    shouldRevalidate: 'onInput',
    onValidate: ({ formData }) => parseWithZod(formData, { schema }),
  })
  return (
    <Form method="post" {...getFormProps(form)} className="ui-form">
      {intent ? <input type="hidden" name="intent" value={intent} /> : null}
      {form.errors ? (
        <p role="alert" className="ui-alert" id={form.errorId}>
          {form.errors.join(' ')}
        </p>
      ) : null}
      {children(fields)}
      <button type="submit" className="ui-button ui-strong" aria-disabled={busy}>
        {submit}
      </button>
    </Form>
  )
}

type FieldProps = { meta: FieldMetadata<string | undefined>; label: string; hint?: string }

export function TextField({ meta, label, hint, type = 'text' }: FieldProps & { type?: 'text' | 'email' | 'date' }) {
  const { key, ...input } = getInputProps(meta, { type, ariaDescribedBy: hint ? meta.descriptionId : undefined })
  return (
    <Labelled meta={meta} label={label} hint={hint}>
      <input key={key} {...input} className="ui-input" />
    </Labelled>
  )
}

export function TextArea({ meta, label, hint, rows = 5 }: FieldProps & { rows?: number }) {
  const { key, ...input } = getTextareaProps(meta, { ariaDescribedBy: hint ? meta.descriptionId : undefined })
  return (
    <Labelled meta={meta} label={label} hint={hint}>
      <textarea key={key} {...input} rows={rows} className="ui-input" />
    </Labelled>
  )
}

function Labelled({ meta, label, hint, children }: FieldProps & { children: ReactNode }) {
  return (
    <div className="ui-field">
      <label htmlFor={meta.id}>{label}</label>
      {children}
      {hint ? (
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
