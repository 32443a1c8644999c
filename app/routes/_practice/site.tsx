import { data, Form, Link, redirect } from 'react-router'
import { day, PageHead, SmallDrawing } from '~/pages/practice/shell'
import { formatQuantity } from '~/section'
import { requirePerson } from '~/server/context.server'
import { db } from '~/server/db.server'
import { AppError } from '~/server/errors.server'
import { archiveSection } from '~/server/sections/archive-section.server'
import { duplicateSection } from '~/server/sections/duplicate-section.server'
import { listSections } from '~/server/sections/list-sections.server'
import { renameSection } from '~/server/sections/rename-section.server'
import { archiveSite } from '~/server/sites/archive-site.server'
import { findSite } from '~/server/sites/find-site.server'
import { ListFilter, Pages, SortHead } from '~/ui/table'
import type { Route } from './+types/site'
import { light } from './light'
import { listQuery } from './list-query'

export const meta: Route.MetaFunction = ({ loaderData }) => [{ title: `${loaderData?.site.name ?? 'Site'} · Doab` }]

export async function loader({ context, request, params }: Route.LoaderArgs) {
  const person = requirePerson(context, request)
  const query = listQuery(request, ['title', 'updated', 'created'] as const)
  const [found, list] = await Promise.all([
    findSite(db, person, params.siteId),
    listSections(db, person, params.siteId, query),
  ])
  return { ...found, ...list, rows: light(list.rows), archived: query.archived, search: query.search }
}

/** What is done to a section or the site from its list. The service asks what the person may do. */
export async function action({ context, request, params }: Route.ActionArgs) {
  const person = requirePerson(context, request)
  const form = await request.formData()
  const id = String(form.get('section') ?? '')
  const back = () => redirect(new URL(request.url).pathname + new URL(request.url).search)
  try {
    switch (form.get('intent')) {
      case 'rename':
        await renameSection(db, person, id, String(form.get('title') ?? ''))
        return back()
      case 'duplicate':
        await duplicateSection(db, person, id)
        return back()
      case 'archive':
      case 'restore':
        await archiveSection(db, person, id, form.get('intent') === 'archive')
        return back()
      case 'archive-site':
      case 'restore-site':
        await archiveSite(db, person, params.siteId, form.get('intent') === 'archive-site')
        return back()
      default:
        throw new AppError('invalid', 'This page does not know what was asked.')
    }
  } catch (error) {
    // What was typed wrongly is said on the page; refusals go to the boundary.
    if (error instanceof AppError && error.code === 'invalid')
      return data({ wrong: error.message, section: id, typed: String(form.get('title') ?? '') }, { status: 400 })
    throw error
  }
}

export default function Site({ loaderData, actionData }: Route.ComponentProps) {
  const { site, acts, rows, total, pages, archived, search } = loaderData
  const may = (act: (typeof acts)[number]) => acts.includes(act)
  const wrong = actionData && 'wrong' in actionData ? actionData : null
  return (
    <>
      <PageHead
        title={site.name}
        trail={<Link to="/sites">Sites</Link>}
        lead={[site.number, site.place, site.client, `owner ${site.owner}`, site.archived ? 'archived' : '']
          .filter(Boolean)
          .join(' · ')}
      >
        {may('site.edit') ? (
          <Link to={`/sites/${site.id}/edit`} className="ui-button">
            Details{may('site.share') ? ' and sharing' : ''}
          </Link>
        ) : may('site.share') ? (
          <Link to={`/sites/${site.id}/edit`} className="ui-button">
            Sharing
          </Link>
        ) : null}
        {may('section.create') && !site.archived ? (
          <Link to={`/sites/${site.id}/sections/new`} className="ui-button ui-strong">
            New section
          </Link>
        ) : null}
      </PageHead>
      {site.note ? <p>{site.note}</p> : null}
      {wrong && !rows.some(({ id }) => id === wrong.section) ? (
        <p role="alert" className="ui-alert">
          {wrong.wrong}
        </p>
      ) : null}
      <ListFilter what="a section" archived={archived} />
      {rows.length === 0 ? (
        <div className="ui-empty">
          <h2>{search ? 'Nothing by that name' : archived ? 'Nothing is put away' : 'No sections yet'}</h2>
          <p>
            A section is one strip of ground between two waters. Start from an empty strip or from a drawing that comes
            near.
          </p>
          {may('section.create') && !site.archived ? (
            <Link to={`/sites/${site.id}/sections/new`} className="ui-button ui-strong">
              Draw the first section
            </Link>
          ) : null}
        </div>
      ) : (
        <div className="ui-scroll">
          <table className="ui-table">
            <caption className="sr-only">{total} sections</caption>
            <thead>
              <tr>
                <th scope="col">Drawing</th>
                <SortHead by="title" first>
                  Section
                </SortHead>
                <th scope="col" className="num">
                  Highest
                  <br />
                  water table
                </th>
                <th scope="col" className="num">
                  To left
                  <br />
                  bank
                </th>
                <th scope="col" className="num">
                  To right
                  <br />
                  bank
                </th>
                <SortHead by="updated">Changed</SortHead>
                <th scope="col">
                  <span className="sr-only">Actions</span>
                </th>
              </tr>
            </thead>
            <tbody>
              {rows.map((row) => (
                <tr key={row.id}>
                  <td>
                    <SmallDrawing sectionId={row.id} drawn={row.drawn} />
                  </td>
                  <td>
                    <Link to={`/sections/${row.id}`}>
                      <strong>{row.title}</strong>
                    </Link>
                  </td>
                  <td className="num" data-label="Highest">
                    {row.highest === null ? '–' : formatQuantity(row.highest, 'elevation', 'si')}
                  </td>
                  <Flow label="To left bank" rate={row.toLeft} />
                  <Flow label="To right bank" rate={row.toRight} />
                  <td className="ui-small" data-label="Changed">
                    {day(row.updatedAt)}
                    {row.updatedBy ? (
                      <>
                        <br />
                        {row.updatedBy}
                      </>
                    ) : null}
                  </td>
                  <td>
                    {may('section.rename') || may('section.archive') ? (
                      <details className="ui-more" open={wrong?.section === row.id || undefined}>
                        <summary className="ui-button ui-quiet" aria-label={`Change ${row.title}`}>
                          Change
                        </summary>
                        <div>
                          {may('section.rename') && !row.archived ? (
                            <Form method="post" className="ui-row">
                              <input type="hidden" name="section" value={row.id} />
                              <input
                                name="title"
                                defaultValue={wrong?.section === row.id ? wrong.typed : row.title}
                                aria-label={`New title of ${row.title}`}
                                aria-invalid={wrong?.section === row.id || undefined}
                                aria-describedby={wrong?.section === row.id ? `wrong-${row.id}` : undefined}
                                className="ui-input"
                              />
                              <button type="submit" name="intent" value="rename" className="ui-button ui-quiet">
                                Rename
                              </button>
                              {wrong?.section === row.id ? (
                                <p className="ui-wrong" id={`wrong-${row.id}`} role="alert">
                                  {wrong.wrong}
                                </p>
                              ) : null}
                            </Form>
                          ) : null}
                          <Form method="post" className="ui-row">
                            <input type="hidden" name="section" value={row.id} />
                            {may('section.duplicate') ? (
                              <button type="submit" name="intent" value="duplicate" className="ui-button ui-quiet">
                                Duplicate
                              </button>
                            ) : null}
                            {may('section.archive') ? (
                              <button
                                type="submit"
                                name="intent"
                                value={row.archived ? 'restore' : 'archive'}
                                className="ui-button ui-quiet"
                              >
                                {row.archived ? 'Restore' : 'Archive'}
                              </button>
                            ) : null}
                          </Form>
                        </div>
                      </details>
                    ) : null}
                  </td>
                </tr>
              ))}
            </tbody>
          </table>
        </div>
      )}
      <Pages pages={pages} />
      {rows.some(({ toLeft, toRight }) => (toLeft ?? 0) < 0 || (toRight ?? 0) < 0) ? (
        <p className="ui-small mt-3">Per metre of bank. A minus means that the water loses to the ground.</p>
      ) : null}
      {may('site.archive') ? <PutAway archived={site.archived} /> : null}
    </>
  )
}

function Flow({ label, rate }: { label: string; rate: number | null }) {
  return (
    <td className="num" data-label={label}>
      {rate === null ? '–' : formatQuantity(rate, 'flow', 'si')}
    </td>
  )
}

/** Asks before a whole job is put away; taking it out again needs no asking. */
function PutAway({ archived }: { archived: boolean }) {
  if (archived)
    return (
      <Form method="post">
        <button type="submit" name="intent" value="restore-site" className="ui-button">
          Restore this site
        </button>
      </Form>
    )
  return (
    <details className="ui-ask">
      <summary className="ui-button ui-quiet">Archive this site …</summary>
      <Form method="post">
        <p>
          Its sections can then be read but not drawn on; open sheets turn read-only. Nothing is deleted, and the site
          can be restored.
        </p>
        <button type="submit" name="intent" value="archive-site" className="ui-button ui-danger">
          Archive the site
        </button>
      </Form>
    </details>
  )
}
