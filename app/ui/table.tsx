import type { ReactNode } from 'react'
import { Form, Link, useSearchParams } from 'react-router'

/** A column's head as a link that sorts by it, or turns the order round. */
export function SortHead({
  by,
  first,
  number,
  children,
}: {
  by: string
  first?: boolean
  number?: boolean
  children: ReactNode
}) {
  const [params] = useSearchParams()
  const now = params.get('sort') ?? (first ? by : '')
  const down = params.get('order') === 'down'
  const next = new URLSearchParams(params)
  next.set('sort', by)
  next.set('order', now === by && !down ? 'down' : 'up')
  next.delete('page')
  return (
    <th
      scope="col"
      className={number ? 'num' : undefined}
      aria-sort={now === by ? (down ? 'descending' : 'ascending') : undefined}
    >
      <Link to={`?${next}`} preventScrollReset className="ui-sort">
        {children}
        <span aria-hidden="true">{now === by ? (down ? ' ↓' : ' ↑') : ''}</span>
      </Link>
    </th>
  )
}

/** Search and the choice of what is put away, as a plain GET form. */
export function ListFilter({ what, archived }: { what: string; archived: boolean }) {
  const [params] = useSearchParams()
  return (
    <Form method="get" className="ui-filter" role="search">
      <input
        type="search"
        name="search"
        defaultValue={params.get('search') ?? ''}
        placeholder={`Find ${what}`}
        aria-label={`Find ${what}`}
        className="ui-input"
      />
      {params.get('sort') ? <input type="hidden" name="sort" value={params.get('sort') ?? ''} /> : null}
      {params.get('order') ? <input type="hidden" name="order" value={params.get('order') ?? ''} /> : null}
      <label className="ui-check">
        <input type="checkbox" name="archived" value="1" defaultChecked={archived} /> Archived
      </label>
      <button type="submit" className="ui-button">
        Find
      </button>
    </Form>
  )
}

export function Pages({ pages }: { pages: number }) {
  const [params] = useSearchParams()
  const now = Math.max(1, Number(params.get('page')) || 1)
  if (pages <= 1) return null
  const to = (page: number) => {
    const next = new URLSearchParams(params)
    next.set('page', String(page))
    return `?${next}`
  }
  return (
    <nav aria-label="Pages" className="ui-pages">
      {now > 1 ? <Link to={to(now - 1)}>Previous</Link> : <span />}
      <span>
        Page {now} of {pages}
      </span>
      {now < pages ? <Link to={to(now + 1)}>Next</Link> : <span />}
    </nav>
  )
}
