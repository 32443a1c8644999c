import { isRouteErrorResponse, Link } from 'react-router'
import './inks.css'
import './trouble.css'

type Words = { title: string; way: string }

/** What each status means to the person before the page, and the way on. */
const WORDS: Record<number, Words> = {
  400: { title: 'That could not be read', way: 'Go back and check what was entered.' },
  401: { title: 'Sign in first', way: 'This page is for people who are signed in.' },
  403: { title: 'Not with your role', way: 'The head of your practice, or the owner of the site, can change that.' },
  404: { title: 'A dry hole: nothing here', way: 'Check the address, or find the sheet from the start.' },
  405: { title: 'Not this way', way: 'Go back and use the page’s own buttons.' },
  409: { title: 'Somebody was quicker', way: 'Go back, look at what changed, then decide again.' },
  410: { title: 'This link has ended', way: 'Ask whoever gave it to you for a new one.' },
  413: { title: 'Too large', way: 'Send a smaller file.' },
  422: { title: 'That could not be used', way: 'The words above say where it is wrong and how to mend it.' },
  429: { title: 'Too many tries', way: 'Wait a little, then try again.' },
  500: {
    title: 'Something broke on our side',
    way: 'What was stored is safe. Load the page again; if it stays, tell whoever runs this Doab.',
  },
  503: { title: 'Out of reach for a moment', way: 'What was stored is safe. Try again in a minute.' },
}
const BROKEN: Words = { title: 'Something broke on our side', way: 'What was stored is safe. Load the page again.' }

/** The refusal's own sentence, when the server gave one. */
function sentence(error: unknown): string | null {
  if (!isRouteErrorResponse(error)) return null
  const { data } = error
  if (typeof data === 'object' && data !== null && 'message' in data && typeof data.message === 'string')
    return data.message
  return null
}

/** Shown instead of a page that cannot be. `stack` only in development. */
export function Trouble({ error }: { error: unknown }) {
  const status = isRouteErrorResponse(error) ? error.status : 500
  const words = WORDS[status] ?? BROKEN
  const message = sentence(error)
  const stack = import.meta.env.DEV && error instanceof Error ? error.stack : undefined
  return (
    <main className="inks trouble">
      <div className="trouble-sheet">
        <DryHole />
        <div className="trouble-words">
          <h1>{words.title}</h1>
          {message ? <p>{message}</p> : null}
          <p>{words.way}</p>
          {stack ? <pre>{stack}</pre> : null}
        </div>
        <div className="trouble-title">
          <Link to="/">Back to the start</Link>
          <span>Doab</span>
          <span>{status}</span>
        </div>
      </div>
    </main>
  )
}

const HATCH = Array.from({ length: 45 }, (_, i) => i * 16)
const TURF = Array.from({ length: 30 }, (_, i) => 12 + i * 24)
const groundAt = (x: number) => 58 + 14 * Math.sin(x / 150) - x / 60

/** Ground, base, and a borehole between them that met no water. */
function DryHole() {
  const ground = Array.from({ length: 37 }, (_, i) => `${i * 20} ${groundAt(i * 20).toFixed(1)}`).join('L')
  return (
    <svg viewBox="0 0 720 190" aria-hidden="true">
      <g fill="none" stroke="var(--base)">
        <path d="M0 152L180 146L420 156L720 148V190H0Z" fill="var(--base-fill)" stroke="none" opacity="0.7" />
        <path d={HATCH.map((x) => `M${x} 190l30 -38`).join('')} strokeWidth="0.8" opacity="0.55" />
        <path d="M0 152L180 146L420 156L720 148" strokeWidth="2" />
      </g>
      <g fill="none" stroke="var(--land)">
        <path d={`M${ground}`} strokeWidth="3" />
        <path d={TURF.map((x) => `M${x} ${groundAt(x).toFixed(1)}l-7 9`).join('')} strokeWidth="1" />
      </g>
      <g fill="none" stroke="var(--ink)" strokeWidth="1.4">
        <path d={`M452 ${groundAt(452) - 16}V154M460 ${groundAt(460) - 16}V154M448 ${groundAt(452) - 16}h16`} />
        <path d="M452 118h8M452 130h8M452 142h8" strokeWidth="1" />
        <path d="M474 136h34" stroke="var(--trouble)" />
      </g>
      <text x="514" y="141" fontSize="15" fontWeight="600" fill="var(--trouble)">
        dry
      </text>
    </svg>
  )
}
