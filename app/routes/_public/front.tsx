import { Link, redirect } from 'react-router'
import { personOf } from '~/server/context.server'
import type { Route } from './+types/front'

export function loader({ context }: Route.LoaderArgs) {
  if (personOf(context)) throw redirect('/home')
  return null
}

export default function Front() {
  return (
    <main>
      <h1>Doab</h1>
      <Link to="/sign-in">Sign in</Link> <Link to="/sign-up">Sign up</Link>
    </main>
  )
}
