import { type FieldMetadata, getFormProps, getInputProps, type SubmissionResult, useForm } from '@conform-to/react'
import { getZodConstraint, parseWithZod } from '@conform-to/zod/v4'
import { createContext, type ReactNode, useContext } from 'react'
import { Form, useNavigation } from 'react-router'
import type { z } from 'zod'

const Focus = createContext<string | undefined>(undefined)
const FocusOn = Focus.Provider

/** What every account page's form has: a title, an error for the whole of it, fields, one button, ways onward. */
export function AccountForm<Schema extends z.ZodObject>({
  title,
  lead,
  schema,
  result,
  submit,
  before,
  after,
  children,
}: {
  title: string
  lead?: string
  schema: Schema
  result: SubmissionResult<string[]> | null | undefined
  submit: string
  before?: ReactNode
  after?: ReactNode
  children: (fields: { [Name in keyof z.input<Schema>]-?: FieldMetadata<z.input<Schema>[Name]> }) => ReactNode
}) {
  const busy = useNavigation().state === 'submitting'
  const [form, fields] = useForm<z.input<Schema>, z.output<Schema>, string[]>({
    lastResult: result,
    constraint: getZodConstraint(schema),
    shouldValidate: 'onSubmit',
    shouldRevalidate: 'onInput',
    onValidate: ({ formData }) => parseWithZod(formData, { schema }),
  })
  // Without JavaScript the page comes back whole: the browser then puts the focus where the first mistake is.
  const byName = fields as Record<string, { id: string; errors?: string[] }>
  const wrong = Object.keys(schema.shape).find((name) => byName[name]?.errors)
  return (
    <Form method="post" {...getFormProps(form)}>
      <h1>{title}</h1>
      {lead ? <p className="account-lead">{lead}</p> : null}
      {before}
      {form.errors ? (
        <p
          role="alert"
          className="account-alert"
          id={form.errorId}
          tabIndex={-1}
          {...{ autoFocus: wrong === undefined }}
        >
          {form.errors.join(' ')}
        </p>
      ) : null}
      <FocusOn value={wrong ? byName[wrong]?.id : undefined}>
        <div className="account-fields">{children(fields)}</div>
      </FocusOn>
      <button type="submit" className="account-button" aria-disabled={busy}>
        {busy ? 'One moment …' : submit}
      </button>
      <div className="account-onward">{after}</div>
    </Form>
  )
}

export function Field({
  meta,
  label,
  type = 'text',
  autoComplete,
  hint,
}: {
  meta: FieldMetadata<string | undefined>
  label: string
  type?: 'text' | 'email' | 'password'
  autoComplete: string
  hint?: string
}) {
  const autoFocus = useContext(Focus) === meta.id
  const { key, ...rest } = getInputProps(meta, {
    type,
    ariaDescribedBy: hint && !meta.errors ? meta.descriptionId : undefined,
  })
  const input = { ...rest, autoFocus }
  return (
    <div className="account-field">
      <label htmlFor={meta.id}>{label}</label>
      <input key={key} {...input} autoComplete={autoComplete} />
      {hint && !meta.errors ? (
        <p className="account-hint" id={meta.descriptionId}>
          {hint}
        </p>
      ) : null}
      {meta.errors ? (
        <p className="account-wrong" id={meta.errorId}>
          {meta.errors.join(' ')}
        </p>
      ) : null}
    </div>
  )
}

export function Notice({ children }: { children: ReactNode }) {
  return (
    <p role="status" className="account-notice">
      {children}
    </p>
  )
}

/** A page of this group that is read rather than filled in. */
export function Plain({ title, children }: { title: string; children: ReactNode }) {
  return (
    <section className="account-plain">
      <h1>{title}</h1>
      {children}
    </section>
  )
}
