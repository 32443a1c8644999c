import { Link } from 'react-router'
import { day, PageHead } from '~/pages/practice/shell'
import { requirePerson } from '~/server/context.server'
import { db } from '~/server/db.server'
import { listSites } from '~/server/sites/list-sites.server'
import { ListFilter, Pages, SortHead } from '~/ui/table'
import type { Route } from './+types/sites'
import { listQuery } from './list-query'

export const meta: Route.MetaFunction = () => [{ title: 'Sites · Doab' }]

export async function loader({ context, request }: Route.LoaderArgs) {
  const person = requirePerson(context, request)
  const query = listQuery(request, ['name', 'number', 'updated', 'sections'] as const)
  return {
    ...(await listSites(db, person, query)),
    archived: query.archived,
    search: query.search,
    makes: person.practice !== null && person.practice.role !== 'reader',
  }
}

export default function Sites({ loaderData: { rows, total, pages, archived, search, makes } }: Route.ComponentProps) {
  return (
    <>
      <PageHead title="Sites" lead={`${total} ${total === 1 ? 'job' : 'jobs'}${archived ? ', put away' : ''}`}>
        {makes ? (
          <Link to="/sites/new" className="ui-button ui-strong">
            New site
          </Link>
        ) : null}
      </PageHead>
      <ListFilter what="a site" archived={archived} />
      {rows.length === 0 ? (
        <div className="ui-empty">
          <h2>{search ? 'Nothing by that name' : archived ? 'Nothing is put away' : 'No sites yet'}</h2>
          <p>
            {search
              ? 'Search looks in name, number, place and client.'
              : 'A site is one job: its sections, its people, its links.'}
          </p>
        </div>
      ) : (
        <div className="ui-scroll">
          <table className="ui-table">
            <thead>
              <tr>
                <SortHead by="name" first>
                  Site
                </SortHead>
                <SortHead by="number">Number</SortHead>
                <th scope="col">Place</th>
                <th scope="col">Client</th>
                <SortHead by="sections" number>
                  Sections
                </SortHead>
                <SortHead by="updated">Changed</SortHead>
              </tr>
            </thead>
            <tbody>
              {rows.map((row) => (
                <tr key={row.id}>
                  <td>
                    <Link to={`/sites/${row.id}`}>
                      <strong>{row.name}</strong>
                    </Link>
                    {row.shared ? <span className="ui-small"> · shared with you</span> : null}
                  </td>
                  <td data-label="Number">{row.number || '–'}</td>
                  <td data-label="Place">{row.place || '–'}</td>
                  <td data-label="Client">{row.client || '–'}</td>
                  <td className="num" data-label="Sections">
                    {row.sections}
                  </td>
                  <td className="ui-small" data-label="Changed">
                    {day(row.updatedAt)}
                  </td>
                </tr>
              ))}
            </tbody>
          </table>
        </div>
      )}
      <Pages pages={pages} />
    </>
  )
}
