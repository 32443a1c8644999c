import { parseWithZod } from '@conform-to/zod/v4'
import { data, Link, redirect } from 'react-router'
import { siteForm } from '~/pages/practice/forms'
import { PageHead } from '~/pages/practice/shell'
import { SiteFields } from '~/pages/practice/site-fields'
import { requirePerson } from '~/server/context.server'
import { db } from '~/server/db.server'
import { createSite } from '~/server/sites/create-site.server'
import { PageForm } from '~/ui/form'
import type { Route } from './+types/new-site'

export const meta: Route.MetaFunction = () => [{ title: 'New site · Doab' }]

export function loader({ context, request }: Route.LoaderArgs) {
  requirePerson(context, request)
  return null
}

export async function action({ context, request }: Route.ActionArgs) {
  const person = requirePerson(context, request)
  const submission = parseWithZod(await request.formData(), { schema: siteForm })
  if (submission.status !== 'success') return data({ result: submission.reply() }, { status: 400 })
  const { id } = await createSite(db, person, submission.value)
  throw redirect(`/sites/${id}`)
}

export default function NewSite({ actionData }: Route.ComponentProps) {
  return (
    <>
      <PageHead
        title="New site"
        trail={<Link to="/sites">Sites</Link>}
        lead="A site is one job. You own it: you may share it and make links to its sections."
      />
      <PageForm id="site" schema={siteForm} result={actionData?.result} submit="Make the site">
        {(fields) => <SiteFields fields={fields} />}
      </PageForm>
    </>
  )
}
