import { type ReactNode, useId, useState } from 'react'

/** One headed part of the side: a title over a rule, a remark at its right end, and a way to fold it. */
export function Box({
  title,
  remark,
  children,
  folded = false,
}: {
  title: string
  remark?: ReactNode
  children: ReactNode
  folded?: boolean
}) {
  const [open, setOpen] = useState(!folded)
  const id = useId()
  return (
    <section className="box" aria-labelledby={`${id}-title`}>
      <header className="box-head">
        <h2 id={`${id}-title`}>
          <button type="button" aria-expanded={open} aria-controls={id} onClick={() => setOpen(!open)}>
            {title}
          </button>
        </h2>
        {remark ? <div className="box-remark">{remark}</div> : null}
      </header>
      <div id={id} className="box-body" hidden={!open}>
        {children}
      </div>
    </section>
  )
}

/** Label left, number right. */
export function Line({
  label,
  children,
  tone,
}: {
  label: ReactNode
  children: ReactNode
  tone?: 'good' | 'bad' | 'soft'
}) {
  return (
    <div className="line" data-tone={tone}>
      <dt>{label}</dt>
      <dd>{children}</dd>
    </div>
  )
}

const MARKS = {
  holds: ['M4 12.5l5 5L20 6', 'holds'],
  doubtful: ['M3 14q4-8 9-2t9-2', 'doubtful'],
  fails: ['M5 5l14 14M19 5L5 19', 'fails'],
} as const
export type Verdict = keyof typeof MARKS

/** A drawn mark and its word; never colour alone. */
export function VerdictMark({ verdict, word }: { verdict: Verdict; word?: string }) {
  const [path, said] = MARKS[verdict]
  return (
    <span className="verdict" data-verdict={verdict}>
      <svg viewBox="0 0 24 24" width="14" height="14" aria-hidden="true" className="symbol">
        <path d={path} />
      </svg>
      <span className="verdict-word">{word ?? said}</span>
    </span>
  )
}
