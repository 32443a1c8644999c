import type { ReactNode } from 'react'
import { Form, Link, NavLink } from 'react-router'

/** The frame of every page of the practice: brand, where one can go, who one is. */
export function PracticeShell({
  name,
  practice,
  role,
  children,
}: {
  name: string
  practice: string | null
  role: string | null
  children: ReactNode
}) {
  return (
    <div className="practice inks">
      <header className="practice-bar">
        <Link to="/home" aria-label="Doab, home">
          <svg viewBox="0 0 28 34" width="22" height="27" aria-hidden="true">
            <path
              d="M2 2c4 12 7 18 12 24c5-6 8-12 12-24M14 26v6"
              fill="none"
              stroke="var(--water)"
              strokeWidth="3.2"
              strokeLinecap="round"
              strokeLinejoin="round"
            />
            <path d="M7 3q7 5 14 0l-7 14Z" fill="var(--land)" />
          </svg>
          Doab
        </Link>
        <nav aria-label="Practice">
          <NavLink to="/home">Home</NavLink>
          <NavLink to="/sites">Sites</NavLink>
        </nav>
        <div className="practice-who">
          <span>
            {name}
            {practice ? ` · ${practice}` : ''}
            {role ? `, ${role}` : ''}
          </span>
          <Form method="post" action="/sign-out">
            <button type="submit" className="ui-button ui-quiet">
              Sign out
            </button>
          </Form>
        </div>
      </header>
      <main className="ui-page">{children}</main>
    </div>
  )
}

/** A drawing that the server made from parsed values. */
export function Drawing({ svg }: { svg: string | null }) {
  if (!svg) return <div className="ui-drawing" />
  // biome-ignore lint/security/noDangerouslySetInnerHtml: made by app/export, which escapes every text
  return <div className="ui-drawing" dangerouslySetInnerHTML={{ __html: svg }} />
}

/** The small drawing of a section in a list. It stands beside the title, which says what it is. */
export function SmallDrawing({ sectionId, drawn }: { sectionId: string; drawn: boolean }) {
  if (!drawn) return <div className="ui-drawing ui-undrawn">cannot be drawn</div>
  return (
    <div className="ui-drawing">
      <img src={`/api/sections/${sectionId}/thumbnail.svg`} alt="" width={240} height={96} loading="lazy" />
    </div>
  )
}

export function PageHead({
  title,
  trail,
  lead,
  children,
}: {
  title: string
  trail?: ReactNode
  lead?: ReactNode
  children?: ReactNode
}) {
  return (
    <header className="ui-head">
      <div>
        {trail ? <p className="ui-trail">{trail}</p> : null}
        <h1>{title}</h1>
        {lead ? <p>{lead}</p> : null}
      </div>
      {children ? <div className="ui-row">{children}</div> : null}
    </header>
  )
}

const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec']

/** A day and hour as people in an office write it, in UTC: the same on server and page. */
export function day(given: Date | string): string {
  const date = new Date(given)
  return `${date.getUTCDate()} ${MONTHS[date.getUTCMonth()]} ${date.getUTCFullYear()}, ${date.toISOString().slice(11, 16)}`
}
