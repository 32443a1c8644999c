import { Link } from 'react-router'
import { TABLE } from '~/access/decide'
import { day, PageHead, SmallDrawing } from '~/pages/practice/shell'
import { formatQuantity } from '~/section'
import { requirePerson } from '~/server/context.server'
import { db } from '~/server/db.server'
import { listRecent } from '~/server/practices/list-recent.server'
import type { Route } from './+types/home'
import { light } from './light'

export const meta: Route.MetaFunction = () => [{ title: 'Home · Doab' }]

export async function loader({ context, request }: Route.LoaderArgs) {
  const person = requirePerson(context, request)
  const makes = person.practice !== null && TABLE['site.create'].includes(person.practice.role)
  return { name: person.practice?.name ?? person.name, recent: light(await listRecent(db, person)), makes }
}

export default function Home({ loaderData: { name, recent, makes } }: Route.ComponentProps) {
  return (
    <>
      <PageHead title={name} lead="Sections drawn on lately">
        <Link to="/sites" className="ui-button">
          All sites
        </Link>
        {makes ? (
          <Link to="/sites/new" className="ui-button ui-strong">
            New site
          </Link>
        ) : null}
      </PageHead>
      {recent.length === 0 ? (
        <div className="ui-empty">
          <h2>No sections yet</h2>
          <p>
            A site is one job. On it stand sections: strips of ground between two waters, drawn together, whose drawing
            is the calculation.
          </p>
          {makes ? (
            <Link to="/sites/new" className="ui-button ui-strong">
              Make the first site
            </Link>
          ) : null}
        </div>
      ) : (
        <ul className="ui-cards">
          {recent.map((row) => (
            <li key={row.id} className="ui-card">
              <SmallDrawing sectionId={row.id} drawn={row.drawn} />
              <div>
                <Link to={`/sections/${row.id}`}>{row.title}</Link>
                <p className="ui-small">
                  {row.site.name}
                  {row.highest === null ? '' : ` · highest ${formatQuantity(row.highest, 'elevation', 'si')}`}
                </p>
                <p className="ui-small">{day(row.updatedAt)}</p>
              </div>
            </li>
          ))}
        </ul>
      )}
    </>
  )
}
