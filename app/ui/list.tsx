import type { ReactNode } from 'react'
import { Form, Link, useSearchParams } from 'react-router'
import { Button } from './button'

/** The page's address with some of its parameters changed; null takes one out. */
export function useAddress() {
  const [params] = useSearchParams()
  return (changes: Record<string, string | null>) => {
    const next = new URLSearchParams(params)
    for (const [name, value] of Object.entries(changes)) {
      if (value === null) next.delete(name)
      else next.set(name, value)
    }
    const text = next.toString()
    return text ? `?${text}` : '.'
  }
}

/** Search, and what is in use or put away: all in the address, so that it works without JavaScript and can be sent on. */
export function ListTools({
  search,
  placeholder,
  children,
}: {
  search: string
  placeholder: string
  children?: ReactNode
}) {
  const [params] = useSearchParams()
  const to = useAddress()
  const archived = params.get('archived') === '1'
  return (
    <div className="ui-tools">
      <Form method="get" role="search">
        <input
          type="search"
          name="q"
          key={search}
          defaultValue={search}
          aria-label={placeholder}
          placeholder={placeholder}
          className="ui-input"
        />
        {['sort', 'archived'].map((name) => {
          const value = params.get(name)
          return value ? <input key={name} type="hidden" name={name} value={value} /> : null
        })}
        <Button>Search</Button>
        {search ? (
          <Link to={to({ q: null, page: null })} className="ui-button" data-kind="plain">
            Show all
          </Link>
        ) : null}
      </Form>
      {children}
      <div className="ui-tabs">
        <Link to={to({ archived: null, page: null })} aria-current={!archived}>
          In use
        </Link>
        <Link to={to({ archived: '1', page: null })} aria-current={archived}>
          Put away
        </Link>
      </div>
    </div>
  )
}

/** A column's head that sorts by it; a second time, the other way round. */
export function SortHead({
  by,
  sort,
  descending,
  number,
  children,
}: {
  by: string
  sort: string
  descending: boolean
  number?: boolean
  children: ReactNode
}) {
  const to = useAddress()
  const here = sort === by
  return (
    <th
      scope="col"
      className={number ? 'ui-number' : undefined}
      aria-sort={here ? (descending ? 'descending' : 'ascending') : undefined}
    >
      <Link to={to({ sort: here && !descending ? `-${by}` : by, page: null })}>
        {children} {here ? <span aria-hidden="true">{descending ? '▾' : '▴'}</span> : null}
      </Link>
    </th>
  )
}

export function Pages({ page, pages, total, of }: { page: number; pages: number; total: number; of: string }) {
  const to = useAddress()
  if (pages < 2) return null
  return (
    <nav aria-label="Pages" className="ui-row pt-4">
      {page > 1 ? (
        <Link className="ui-button" to={to({ page: String(page - 1) })}>
          Before
        </Link>
      ) : null}
      <span>
        Page {page} of {pages}, {total} {of}
      </span>
      {page < pages ? (
        <Link className="ui-button" to={to({ page: String(page + 1) })}>
          Next
        </Link>
      ) : null}
    </nav>
  )
}
