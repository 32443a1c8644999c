import { Link } from 'react-router'
import { listLetters, readLetter } from '~/server/mail/list-letters.server'
import type { Route } from './+types/mailbox'
import './_public/inks.css'
import './_public/mailbox.css'

export const meta: Route.MetaFunction = () => [{ title: 'Mailbox · Doab' }]

export async function loader({ request }: Route.LoaderArgs) {
  const id = new URL(request.url).searchParams.get('letter')
  const [letters, open] = await Promise.all([listLetters(), id ? readLetter(id) : null])
  return { letters, open }
}

const STATES = {
  waiting: 'waiting',
  sending: 'on its way',
  sent: 'sent',
  caught: 'caught here',
  failed: 'could not be sent',
}
/** The same on the server and in the browser, whatever its language and place. */
const when = (at: Date) => `${at.toISOString().slice(0, 16).replace('T', ' ')} UTC`

export default function Mailbox({ loaderData }: Route.ComponentProps) {
  const { letters, open } = loaderData
  return (
    <main className="inks mailbox">
      <h1>Mailbox</h1>
      <p className="mailbox-lead">
        Without a mail server, every letter Doab would send lies here. Only on a machine of one’s own; a Doab for real
        people has no such page.
      </p>
      {letters.length === 0 ? (
        <p className="mailbox-lead">No letters yet. Ask for a new password, and one comes.</p>
      ) : null}
      <div className="mailbox-body">
        <ul className="mailbox-list">
          {letters.map(({ id, to, subject, state, createdAt }) => (
            <li key={id}>
              <Link to={`?letter=${id}`} aria-current={open?.id === id || undefined}>
                <span>{subject}</span>
                <small>
                  {to} · {STATES[state]} · {when(createdAt)}
                </small>
              </Link>
            </li>
          ))}
        </ul>
        {open ? (
          <article className="mailbox-letter">
            <h2>{open.subject}</h2>
            <iframe
              title="The letter as HTML"
              sandbox="allow-popups allow-top-navigation-by-user-activation"
              srcDoc={open.html}
            />
            <pre data-testid="letter-text">{open.text}</pre>
          </article>
        ) : null}
      </div>
    </main>
  )
}
