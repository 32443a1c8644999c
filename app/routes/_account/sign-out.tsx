import { Form, Link, redirect } from 'react-router'
import { auth } from '~/server/auth.server'
import { personOf } from '~/server/context.server'
import type { Route } from './+types/sign-out'

export const meta: Route.MetaFunction = () => [{ title: 'Sign out · Doab' }]

export function loader({ context }: Route.LoaderArgs) {
  if (!personOf(context)) throw redirect('/')
  return null
}

export async function action({ request }: Route.ActionArgs) {
  const { headers } = await auth.api.signOut({ headers: request.headers, returnHeaders: true })
  throw redirect('/sign-in', { headers })
}

export default function SignOut() {
  return (
    <Form method="post">
      <h1>Sign out</h1>
      <p className="account-lead">What is stored stays stored, and your colleagues draw on.</p>
      <button type="submit" className="account-button">
        Sign out
      </button>
      <div className="account-onward">
        <Link to="/home">Stay here</Link>
      </div>
    </Form>
  )
}
