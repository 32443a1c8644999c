import { parseWithZod } from '@conform-to/zod/v4'
import { data, Link, redirect } from 'react-router'
import { wordsWhenLimited } from '~/server/accounts/limit.server'
import { resetPassword } from '~/server/accounts/reset.server'
import type { Route } from './+types/reset'
import { AccountForm, Field, Plain } from './form'
import { PASSWORD_MIN, resetForm } from './forms'

export const meta: Route.MetaFunction = () => [{ title: 'New password · Doab' }]

export function loader({ request }: Route.LoaderArgs) {
  return { token: new URL(request.url).searchParams.get('token') ?? '' }
}

export async function action({ request }: Route.ActionArgs) {
  const submission = parseWithZod(await request.formData(), { schema: resetForm })
  const answer = (formErrors?: string[]) =>
    data({ result: submission.reply({ formErrors, hideFields: ['password'] }) }, { status: 400 })
  if (submission.status !== 'success') return answer()
  const done = await resetPassword(request, submission.value).catch(wordsWhenLimited)
  if (typeof done === 'string') return answer([done])
  if (!done.ok) return answer([done.message])
  throw redirect('/sign-in?done=reset')
}

export default function Reset({ loaderData, actionData }: Route.ComponentProps) {
  if (!loaderData.token)
    return (
      <Plain title="This link is not whole">
        <p>Open it again from the letter, all of it, or ask for a new one.</p>
        <p>
          <Link to="/forgot">Ask for a new link</Link>
        </p>
      </Plain>
    )
  return (
    <AccountForm
      title="Your new password"
      lead="Setting it signs you out everywhere else."
      schema={resetForm}
      result={actionData?.result}
      submit="Set the password"
      after={<Link to="/forgot">Ask for a new link</Link>}
    >
      {(fields) => (
        <>
          <input type="hidden" name="token" value={loaderData.token} />
          <Field
            meta={fields.password}
            label="New password"
            type="password"
            autoComplete="new-password"
            hint={`At least ${PASSWORD_MIN} characters.`}
          />
        </>
      )}
    </AccountForm>
  )
}
