import { parseWithZod } from '@conform-to/zod/v4'
import { data, Link, redirect } from 'react-router'
import { wordsWhenLimited } from '~/server/accounts/limit.server'
import { safePath } from '~/server/accounts/redirect.server'
import { signIn } from '~/server/accounts/sign-in.server'
import { personOf } from '~/server/context.server'
import type { Route } from './+types/sign-in'
import { AccountForm, Field, Notice } from './form'
import { signInForm } from './forms'

export const meta: Route.MetaFunction = () => [{ title: 'Sign in · Doab' }]

export function loader({ context, request }: Route.LoaderArgs) {
  const params = new URL(request.url).searchParams
  const redirectTo = safePath(params.get('redirectTo'))
  if (personOf(context)) throw redirect(redirectTo)
  return { redirectTo, reset: params.get('done') === 'reset' }
}

export async function action({ request }: Route.ActionArgs) {
  const submission = parseWithZod(await request.formData(), { schema: signInForm })
  const answer = (formErrors?: string[]) =>
    data({ result: submission.reply({ formErrors, hideFields: ['password'] }) }, { status: 400 })
  if (submission.status !== 'success') return answer()
  const { redirectTo, ...given } = submission.value
  const signed = await signIn(request, given).catch(wordsWhenLimited)
  if (typeof signed === 'string') return answer([signed])
  if (!signed.ok) return answer([signed.message])
  throw redirect(safePath(redirectTo), { headers: signed.headers })
}

export default function SignIn({ loaderData, actionData }: Route.ComponentProps) {
  const { redirectTo, reset } = loaderData
  const onward = redirectTo === '/home' ? '' : `?redirectTo=${encodeURIComponent(redirectTo)}`
  return (
    <AccountForm
      title="Sign in"
      schema={signInForm}
      result={actionData?.result}
      submit="Sign in"
      before={reset ? <Notice>Your new password is set. Sign in with it.</Notice> : null}
      after={
        <>
          <Link to="/forgot">Forgotten your password?</Link>
          <span>
            New here? <Link to={`/sign-up${onward}`}>Found a practice</Link>
          </span>
        </>
      }
    >
      {(fields) => (
        <>
          <input type="hidden" name="redirectTo" value={redirectTo} />
          <Field meta={fields.email} label="E-mail" type="email" autoComplete="username" />
          <Field meta={fields.password} label="Password" type="password" autoComplete="current-password" />
        </>
      )}
    </AccountForm>
  )
}
