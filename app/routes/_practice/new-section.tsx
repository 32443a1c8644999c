import { parseWithZod } from '@conform-to/zod/v4'
import { data, Link, redirect } from 'react-router'
import { can } from '~/access/decide'
import { thumbnailSvg } from '~/export'
import { sectionForm } from '~/pages/practice/forms'
import { Drawing, PageHead } from '~/pages/practice/shell'
import { isStartingDrawing, STARTING_DRAWINGS, startingDrawing } from '~/section'
import { requirePerson } from '~/server/context.server'
import { db } from '~/server/db.server'
import { AppError, must } from '~/server/errors.server'
import { createSection } from '~/server/sections/create-section.server'
import { findSite } from '~/server/sites/find-site.server'
import { solveSteady } from '~/solver'
import { PageForm, TextArea, TextField } from '~/ui/form'
import type { Route } from './+types/new-section'

export const meta: Route.MetaFunction = () => [{ title: 'New section · Doab' }]

let drawn: { name: string; label: string; says: string; svg: string }[] | null = null
/** The starting drawings as they solve: the same every time, so drawn once. */
const starts = () => {
  drawn ??= STARTING_DRAWINGS.map(({ name, label, says }) => {
    const section = startingDrawing(name)
    return { name, label, says, svg: thumbnailSvg(section, solveSteady(section)) }
  })
  return drawn
}

export async function loader({ context, request, params }: Route.LoaderArgs) {
  const person = requirePerson(context, request)
  const { site, acts } = await findSite(db, person, params.siteId)
  if (!acts.includes('section.create')) must(can({ grades: ['reader'], archived: site.archived }, 'section.create'))
  return { site: { id: site.id, name: site.name }, starts: starts() }
}

export async function action({ context, request, params }: Route.ActionArgs) {
  const person = requirePerson(context, request)
  const submission = parseWithZod(await request.formData(), { schema: sectionForm })
  if (submission.status !== 'success') return data({ result: submission.reply() }, { status: 400 })
  const { title = '', start, json } = submission.value
  const wrong = (field: string, message: string, status = 400) =>
    data({ result: submission.reply({ fieldErrors: { [field]: [message] } }) }, { status })
  if (start !== 'file' && !title) return wrong('title', 'Give the section a title, as it should stand on the drawing.')
  if (start === 'file' && !json) return wrong('json', 'Paste a section file here, or choose a starting drawing above.')
  if (start !== 'file' && !isStartingDrawing(start)) return wrong('start', 'Choose what to start from.')
  try {
    const { id } = await createSection(
      db,
      person,
      params.siteId,
      start === 'file' || !isStartingDrawing(start) ? { title, json: json ?? '' } : { title, start },
    )
    throw redirect(`/sections/${id}`)
  } catch (error) {
    if (error instanceof AppError && (error.code === 'unreadable' || error.code === 'invalid'))
      return wrong(start === 'file' ? 'json' : 'title', error.message, error.status)
    throw error
  }
}

export default function NewSection({ loaderData: { site, starts }, actionData }: Route.ComponentProps) {
  return (
    <>
      <PageHead
        title="New section"
        trail={<Link to={`/sites/${site.id}`}>{site.name}</Link>}
        lead="Start from the drawing that comes nearest; everything in it can be moved, typed over or taken out."
      />
      <PageForm
        id="section"
        schema={sectionForm}
        result={actionData?.result}
        defaults={{ start: 'river-and-canal' }}
        submit="Make the section"
      >
        {(fields) => (
          <>
            <TextField meta={fields.title} label="Title" />
            <fieldset style={{ maxWidth: 'none' }}>
              <legend className="ui-legend">Start from</legend>
              <ul className="ui-cards">
                {starts.map((start) => (
                  <li key={start.name} className="ui-card">
                    <Drawing svg={start.svg} />
                    <div>
                      <label className="ui-check">
                        <input
                          type="radio"
                          name={fields.start.name}
                          value={start.name}
                          defaultChecked={(fields.start.initialValue ?? 'river-and-canal') === start.name}
                        />
                        <strong>{start.label}</strong>
                      </label>
                      <p className="ui-small">{start.says}</p>
                    </div>
                  </li>
                ))}
                <li className="ui-card">
                  <div>
                    <label className="ui-check">
                      <input
                        type="radio"
                        name={fields.start.name}
                        value="file"
                        defaultChecked={fields.start.initialValue === 'file'}
                      />
                      <strong>A section file</strong>
                    </label>
                    <p className="ui-small">Paste the JSON that “Download” on a sheet gives.</p>
                    <TextArea meta={fields.json} label="Section file" rows={4} />
                  </div>
                </li>
              </ul>
              {fields.start.errors ? <p className="ui-wrong">{fields.start.errors.join(' ')}</p> : null}
            </fieldset>
          </>
        )}
      </PageForm>
    </>
  )
}
