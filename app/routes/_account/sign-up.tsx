import { parseWithZod } from '@conform-to/zod/v4'
import { data, Link, redirect } from 'react-router'
import { wordsWhenLimited } from '~/server/accounts/limit.server'
import { safePath } from '~/server/accounts/redirect.server'
import { signUp } from '~/server/accounts/sign-up.server'
import { personOf } from '~/server/context.server'
import type { Route } from './+types/sign-up'
import { AccountForm, Field } from './form'
import { PASSWORD_MIN, signUpForm } from './forms'

export const meta: Route.MetaFunction = () => [{ title: 'Found a practice · Doab' }]

export function loader({ context, request }: Route.LoaderArgs) {
  const redirectTo = safePath(new URL(request.url).searchParams.get('redirectTo'))
  if (personOf(context)) throw redirect(redirectTo)
  return { redirectTo }
}

export async function action({ request }: Route.ActionArgs) {
  const submission = parseWithZod(await request.formData(), { schema: signUpForm })
  const answer = (errors: { fieldErrors?: Record<string, string[]>; formErrors?: string[] } = {}) =>
    data({ result: submission.reply({ ...errors, hideFields: ['password'] }) }, { status: 400 })
  if (submission.status !== 'success') return answer()
  const { redirectTo, ...given } = submission.value
  const signed = await signUp(request, given).catch(wordsWhenLimited)
  if (typeof signed === 'string') return answer({ formErrors: [signed] })
  if (!signed.ok) return answer({ fieldErrors: { [signed.field]: [signed.message] } })
  throw redirect(safePath(redirectTo), { headers: signed.headers })
}

export default function SignUp({ loaderData, actionData }: Route.ComponentProps) {
  return (
    <AccountForm
      title="Found a practice"
      lead="A practice is an office of people who draw, check and file sections together. You head the one you found; colleagues come in by invitation."
      schema={signUpForm}
      result={actionData?.result}
      submit="Found the practice"
      after={
        <span>
          Already have an account? <Link to="/sign-in">Sign in</Link>
        </span>
      }
    >
      {(fields) => (
        <>
          <input type="hidden" name="redirectTo" value={loaderData.redirectTo} />
          <Field meta={fields.practice} label="Practice" autoComplete="organization" />
          <Field meta={fields.name} label="Your name" autoComplete="name" />
          <Field meta={fields.email} label="E-mail" type="email" autoComplete="username" />
          <Field
            meta={fields.password}
            label="Password"
            type="password"
            autoComplete="new-password"
            hint={`At least ${PASSWORD_MIN} characters.`}
          />
        </>
      )}
    </AccountForm>
  )
}
