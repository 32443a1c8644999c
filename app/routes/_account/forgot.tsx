import { parseWithZod } from '@conform-to/zod/v4'
import { data, Link } from 'react-router'
import { wordsWhenLimited } from '~/server/accounts/limit.server'
import { askForReset } from '~/server/accounts/reset.server'
import { env } from '~/server/env.server'
import type { Route } from './+types/forgot'
import { AccountForm, Field, Plain } from './form'
import { forgotForm } from './forms'

export const meta: Route.MetaFunction = () => [{ title: 'Forgotten password · Doab' }]

export async function action({ request }: Route.ActionArgs) {
  const submission = parseWithZod(await request.formData(), { schema: forgotForm })
  if (submission.status !== 'success') return data({ result: submission.reply(), sentTo: null }, { status: 400 })
  const refused = await askForReset(request, submission.value.email).catch(wordsWhenLimited)
  if (refused) return data({ result: submission.reply({ formErrors: [refused] }), sentTo: null }, { status: 429 })
  const mailbox = env.DOAB_LOCAL === 'yes' && !env.SMTP_URL
  return { result: null, sentTo: { email: submission.value.email, mailbox } }
}

export default function Forgot({ actionData }: Route.ComponentProps) {
  const sent = actionData?.sentTo
  if (sent)
    return (
      <Plain title="Look in your mail">
        <p>
          If there is an account for <strong>{sent.email}</strong>, a letter with a link is on its way. The link holds
          for half an hour.
        </p>
        {sent.mailbox ? (
          <p>
            This Doab has no mail server; what it would send lies in the <Link to="/mailbox">mailbox</Link>.
          </p>
        ) : null}
        <p>
          <Link to="/sign-in">Back to signing in</Link>
        </p>
      </Plain>
    )
  return (
    <AccountForm
      title="Choose a new password"
      lead="Enter the e-mail address of your account. We send a link to it."
      schema={forgotForm}
      result={actionData?.result}
      submit="Send the link"
      after={<Link to="/sign-in">Back to signing in</Link>}
    >
      {(fields) => <Field meta={fields.email} label="E-mail" type="email" autoComplete="username" />}
    </AccountForm>
  )
}
