import { parseWithZod } from '@conform-to/zod/v4'
import { data, Form, Link, redirect } from 'react-router'
import { can } from '~/access/decide'
import { standingForSection } from '~/access/facts.server'
import { linkForm } from '~/pages/practice/forms'
import { day, PageHead } from '~/pages/practice/shell'
import { requirePerson } from '~/server/context.server'
import { db } from '~/server/db.server'
import { env } from '~/server/env.server'
import { AppError, must, notFound } from '~/server/errors.server'
import { listLinks } from '~/server/links/list-links.server'
import { makeLink } from '~/server/links/make-link.server'
import { revokeLink } from '~/server/links/revoke-link.server'
import { PageForm, TextField } from '~/ui/form'
import type { Route } from './+types/links'

export const meta: Route.MetaFunction = () => [{ title: 'Read-only links · Doab' }]

export async function loader({ context, request, params }: Route.LoaderArgs) {
  const person = requirePerson(context, request)
  const facts = await standingForSection(db, person, params.sectionId)
  if (!facts) throw notFound()
  must(can(facts.standing, 'link.see'))
  const makes = can(facts.standing, 'link.make').yes
  const revokes = can(facts.standing, 'link.revoke').yes
  return { section: facts.section, links: await listLinks(db, person, params.sectionId), makes, revokes }
}

export async function action({ context, request, params }: Route.ActionArgs) {
  const person = requirePerson(context, request)
  const form = await request.formData()
  const intent = form.get('intent')
  if (intent === 'revoke') {
    await revokeLink(db, person, params.sectionId, String(form.get('link') ?? ''))
    throw redirect(`/sections/${params.sectionId}/links`)
  }
  if (intent === 'revoke-all') {
    const facts = await standingForSection(db, person, params.sectionId)
    if (!facts) throw notFound()
    must(can(facts.standing, 'link.revoke'))
    const live = (await listLinks(db, person, params.sectionId)).filter(({ state }) => state === 'live')
    for (const { id } of live) await revokeLink(db, person, params.sectionId, id)
    throw redirect(`/sections/${params.sectionId}/links`)
  }
  if (intent !== 'make') throw new AppError('invalid', 'This page does not know what was asked.')
  const submission = parseWithZod(form, { schema: linkForm })
  if (submission.status !== 'success') return data({ result: submission.reply(), made: null }, { status: 400 })
  const { label, expires } = submission.value
  // The last day counts to its end.
  const expiresAt = expires ? new Date(`${expires}T23:59:59.000Z`) : null
  try {
    const { token } = await makeLink(db, person, params.sectionId, { label, expiresAt })
    // The address is shown this once: only a hash of it is kept.
    const origin = env.APP_URL ?? new URL(request.url).origin
    return data(
      { result: submission.reply({ resetForm: true }), made: new URL(`/s/${token}`, origin).href },
      { headers: { 'Cache-Control': 'no-store' } },
    )
  } catch (error) {
    if (!(error instanceof AppError) || error.code !== 'invalid') throw error
    return data(
      { result: submission.reply({ fieldErrors: { expires: [error.message] } }), made: null },
      { status: 400 },
    )
  }
}

export default function Links({ loaderData: { section, links, makes, revokes }, actionData }: Route.ComponentProps) {
  const live = links.filter(({ state }) => state === 'live').length
  return (
    <>
      <PageHead
        title="Read-only links"
        trail={<Link to={`/sections/${section.id}`}>{section.title}</Link>}
        lead="Whoever holds a link sees the live sheet, may switch cases and download, and can change nothing."
      />
      {actionData?.made ? (
        <div className="ui-note" role="status">
          <p>
            <strong>The new link.</strong> Copy it now: it is shown this once.
          </p>
          <input readOnly value={actionData.made} aria-label="New link" className="ui-input" />
          <p>
            <a href={actionData.made}>{actionData.made}</a>
          </p>
        </div>
      ) : null}
      {makes ? (
        <section>
          <h2>Make a link</h2>
          <PageForm id="link" schema={linkForm} intent="make" result={actionData?.result} submit="Make the link">
            {(fields) => (
              <>
                <TextField meta={fields.label} label="For whom" hint="Only your office sees this label." />
                <TextField meta={fields.expires} label="Last day" type="date" hint="Empty: until it is revoked." />
              </>
            )}
          </PageForm>
        </section>
      ) : null}
      <section>
        <div className="ui-row">
          <h2>Links of this section</h2>
          {revokes && live > 1 ? (
            <details className="ui-more">
              <summary className="ui-button ui-quiet">Revoke all {live} …</summary>
              <div>
                <p>Every link of this section ends at once, on open sheets too.</p>
                <Form method="post">
                  <button type="submit" name="intent" value="revoke-all" className="ui-button ui-danger">
                    Revoke all {live}
                  </button>
                </Form>
              </div>
            </details>
          ) : null}
        </div>
        {links.length === 0 ? (
          <p>No link has been made yet.</p>
        ) : (
          <div className="ui-scroll">
            <table className="ui-table">
              <thead>
                <tr>
                  <th scope="col">For whom</th>
                  <th scope="col">State</th>
                  <th scope="col">Made</th>
                  <th scope="col">Ends</th>
                  <th scope="col">Last used</th>
                  <th scope="col" className="num">
                    Uses
                  </th>
                  <th scope="col">
                    <span className="sr-only">Actions</span>
                  </th>
                </tr>
              </thead>
              <tbody>
                {links.map((row) => (
                  <tr key={row.id}>
                    <td>
                      <strong>{row.label}</strong>
                    </td>
                    <td>{row.state}</td>
                    <td className="ui-small">
                      {day(row.createdAt)} · {row.by}
                    </td>
                    <td className="ui-small">
                      {row.revokedAt
                        ? `revoked ${day(row.revokedAt)}`
                        : row.expiresAt
                          ? day(row.expiresAt)
                          : 'when revoked'}
                    </td>
                    <td className="ui-small" data-label="Last used">
                      {row.lastUsedAt ? day(row.lastUsedAt) : 'never'}
                    </td>
                    <td className="num" data-label="Uses">
                      {row.uses}
                    </td>
                    <td>
                      {revokes && row.state === 'live' ? (
                        <details className="ui-more">
                          <summary className="ui-button ui-quiet" aria-label={`Revoke ${row.label} …`}>
                            Revoke …
                          </summary>
                          <div>
                            <p>
                              The link ends at once, on sheets that are open by it too. It cannot be taken up again.
                            </p>
                            <Form method="post">
                              <input type="hidden" name="link" value={row.id} />
                              <button type="submit" name="intent" value="revoke" className="ui-button ui-danger">
                                Revoke
                              </button>
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
      </section>
    </>
  )
}
