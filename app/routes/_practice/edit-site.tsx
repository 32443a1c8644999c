import { parseWithZod } from '@conform-to/zod/v4'
import { data, Form, Link, redirect } from 'react-router'
import { can } from '~/access/decide'
import { shareForm, siteForm } from '~/pages/practice/forms'
import { day, PageHead } from '~/pages/practice/shell'
import { SiteFields } from '~/pages/practice/site-fields'
import { requirePerson } from '~/server/context.server'
import { db } from '~/server/db.server'
import { AppError, must } from '~/server/errors.server'
import { editSite } from '~/server/sites/edit-site.server'
import { findSite } from '~/server/sites/find-site.server'
import { listShares, shareSite, unshareSite } from '~/server/sites/share-site.server'
import { PageForm, TextField } from '~/ui/form'
import type { Route } from './+types/edit-site'

export const meta: Route.MetaFunction = ({ loaderData }) => [
  { title: `${loaderData?.site.name ?? 'Site'}, details · Doab` },
]

export async function loader({ context, request, params }: Route.LoaderArgs) {
  const person = requirePerson(context, request)
  const found = await findSite(db, person, params.siteId)
  const edits = found.acts.includes('site.edit')
  const shares = found.acts.includes('site.share')
  if (!edits && !shares) must(can({ grades: ['reader'] }, 'site.edit'))
  return { ...found, edits, shared: shares ? await listShares(db, person, params.siteId) : null }
}

export async function action({ context, request, params }: Route.ActionArgs) {
  const person = requirePerson(context, request)
  const form = await request.formData()
  const here = `/sites/${params.siteId}/edit`
  switch (form.get('intent')) {
    case 'details': {
      const submission = parseWithZod(form, { schema: siteForm })
      if (submission.status !== 'success') return data({ details: submission.reply(), share: null }, { status: 400 })
      await editSite(db, person, params.siteId, submission.value)
      throw redirect(`/sites/${params.siteId}`)
    }
    case 'share': {
      const submission = parseWithZod(form, { schema: shareForm })
      if (submission.status !== 'success') return data({ details: null, share: submission.reply() }, { status: 400 })
      try {
        await shareSite(db, person, params.siteId, submission.value.email, submission.value.role)
      } catch (error) {
        if (!(error instanceof AppError) || error.code === 'forbidden' || error.code === 'not-found') throw error
        return data(
          { details: null, share: submission.reply({ fieldErrors: { email: [error.message] } }) },
          { status: error.status },
        )
      }
      throw redirect(here)
    }
    case 'unshare':
      await unshareSite(db, person, params.siteId, String(form.get('user') ?? ''))
      throw redirect(here)
    default:
      throw new AppError('invalid', 'This page does not know what was asked.')
  }
}

export default function EditSite({ loaderData: { site, edits, shared }, actionData }: Route.ComponentProps) {
  const { name, number, place, client, note } = site
  return (
    <>
      <PageHead title={edits ? 'Details' : 'Sharing'} trail={<Link to={`/sites/${site.id}`}>{site.name}</Link>} />
      {edits ? (
        <PageForm
          id="details"
          schema={siteForm}
          intent="details"
          result={actionData?.details}
          defaults={{ name, number, place, client, note }}
          submit="Keep the details"
        >
          {(fields) => <SiteFields fields={fields} />}
        </PageForm>
      ) : null}
      {shared ? (
        <section>
          <h2>People outside the practice</h2>
          <p className="ui-small">
            They see this site only. An editor draws; a reader reads and comments. Taking it back works at once, on open
            sheets too.
          </p>
          {shared.length ? (
            <div className="ui-scroll">
              <table className="ui-table">
                <tbody>
                  {shared.map((guest) => (
                    <tr key={guest.userId}>
                      <td>
                        <strong>{guest.name}</strong> <span className="ui-small">{guest.email}</span>
                      </td>
                      <td data-label="May">{guest.role === 'editor' ? 'draw' : 'read'}</td>
                      <td className="ui-small" data-label="Since">
                        since {day(guest.createdAt)}
                      </td>
                      <td>
                        <details className="ui-more">
                          <summary className="ui-button ui-quiet" aria-label={`Take back from ${guest.name} …`}>
                            Take back …
                          </summary>
                          <div>
                            <p>{guest.name} sees this site no more, on sheets that are open too.</p>
                            <Form method="post">
                              <input type="hidden" name="user" value={guest.userId} />
                              <button type="submit" name="intent" value="unshare" className="ui-button ui-danger">
                                Take back
                              </button>
                            </Form>
                          </div>
                        </details>
                      </td>
                    </tr>
                  ))}
                </tbody>
              </table>
            </div>
          ) : (
            <p>Nobody outside the practice sees this site.</p>
          )}
          <PageForm id="share" schema={shareForm} intent="share" result={actionData?.share} submit="Share the site">
            {(fields) => (
              <>
                <TextField
                  meta={fields.email}
                  label="E-mail"
                  type="email"
                  hint="Of somebody who has an account on Doab."
                />
                <fieldset>
                  <legend className="ui-legend">As</legend>
                  <label className="ui-check">
                    <input
                      type="radio"
                      name="role"
                      value="reader"
                      defaultChecked={fields.role.initialValue !== 'editor'}
                    />{' '}
                    reader
                  </label>{' '}
                  <label className="ui-check">
                    <input
                      type="radio"
                      name="role"
                      value="editor"
                      defaultChecked={fields.role.initialValue === 'editor'}
                    />{' '}
                    editor
                  </label>
                </fieldset>
              </>
            )}
          </PageForm>
        </section>
      ) : null}
    </>
  )
}
