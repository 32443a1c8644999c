import { data, Form, redirect } from 'react-router'
import { z } from 'zod'
import { safePath } from '~/server/accounts/redirect.server'
import { signIn } from '~/server/accounts/sign-in.server'
import { personOf } from '~/server/context.server'
import type { Route } from './+types/sign-in'

const schema = z.object({ email: z.string(), password: z.string(), redirectTo: z.string().optional() })

export function loader({ context, request }: Route.LoaderArgs) {
  const redirectTo = safePath(new URL(request.url).searchParams.get('redirectTo'))
  if (personOf(context)) throw redirect(redirectTo)
  return { redirectTo }
}

export async function action({ request }: Route.ActionArgs) {
  const form = schema.parse(Object.fromEntries(await request.formData()))
  const result = await signIn(request, form)
  if (!result.ok) return data({ message: result.message }, { status: 400 })
  throw redirect(safePath(form.redirectTo), { headers: result.headers })
}

export default function SignIn({ loaderData, actionData }: Route.ComponentProps) {
  return (
    <Form method="post">
      <h1>Sign in</h1>
      {actionData ? <p role="alert">{actionData.message}</p> : null}
      <input type="hidden" name="redirectTo" value={loaderData.redirectTo} />
      <label>
        E-mail <input name="email" type="email" autoComplete="username" />
      </label>
      <label>
        Password <input name="password" type="password" autoComplete="current-password" />
      </label>
      <button type="submit">Sign in</button>
    </Form>
  )
}
