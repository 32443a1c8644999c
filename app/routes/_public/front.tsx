import { Link, redirect } from 'react-router'
import { personOf } from '~/server/context.server'
import { Ground } from '../_account/ground'
import type { Route } from './+types/front'
import { Brand } from './brand'
import { Legend } from './legend'
import './inks.css'
import './front.css'

export const meta: Route.MetaFunction = () => [
  { title: 'Doab: draw the ground, read the water' },
  {
    name: 'description',
    content:
      'Draw the strip of ground between two waters together, live, and read its water table, flow and balance from the drawing.',
  },
]

export function loader({ context }: Route.LoaderArgs) {
  if (personOf(context)) throw redirect('/home')
  return null
}

export default function Front() {
  return (
    <div className="inks front">
      <header className="front-bar">
        <span className="front-brand">
          <Brand size={30} />
          Doab
        </span>
        <Link to="/sign-in" className="front-link">
          Sign in
        </Link>
        <Link to="/sign-up" className="front-button">
          Found a practice
        </Link>
      </header>
      <main>
        <div className="front-head">
          <h1>Draw the ground. Read the water.</h1>
          <div>
            <p className="front-lead">
              Between river and canal, ditch and ditch, lake and sea: how high does the water table stand, where does
              the water go, and what would a drain or a wet spring change? In Doab an office draws the section together,
              and the answer stands in the drawing.
            </p>
            <div className="front-do">
              <Link to="/sign-up" className="front-button">
                Found a practice
              </Link>
              <Link to="/sign-in" className="front-link">
                Sign in
              </Link>
            </div>
          </div>
        </div>
        <div className="front-sheet">
          <div className="front-drawing">
            <Ground wide />
          </div>
          <Legend />
          <div className="front-title">
            <strong>Screening estimate</strong>
            <span>
              Worked under the Dupuit–Forchheimer assumptions. It is no substitute for site investigation, for local
              codes or for the judgement of a licensed professional.
            </span>
          </div>
        </div>
      </main>
      <footer className="front-foot">doab, n.: the tongue of land between two rivers.</footer>
    </div>
  )
}
