import { Link } from 'react-router'
import { listLetters, readLetter } from '~/server/mail/list-letters.server'
import type { Route } from './+types/mailbox'

export const meta: Route.MetaFunction = () => [{ title: 'Mailbox · Doab' }]

export async function loader({ request }: Route.LoaderArgs) {
  const id = new URL(request.url).searchParams.get('letter')
  const [letters, open] = await Promise.all([listLetters(), id ? readLetter(id) : null])
  return { letters, open }
}

export default function Mailbox({ loaderData }: Route.ComponentProps) {
  const { letters, open } = loaderData
  return (
    <main>
      <h1>Mailbox</h1>
      <ul>
        {letters.map((letter) => (
          <li key={letter.id}>
            <Link to={`?letter=${letter.id}`}>
              {letter.to} {letter.subject}
            </Link>
          </li>
        ))}
      </ul>
      {open ? (
        <article>
          <h2>{open.subject}</h2>
          <iframe title="As HTML" sandbox="" srcDoc={open.html} />
          <pre data-testid="letter-text">{open.text}</pre>
        </article>
      ) : null}
    </main>
  )
}
