import { Link, Outlet } from 'react-router'
import '../_public/inks.css'
import './account.css'
import { Brand } from '../_public/brand'
import { Ground } from './ground'

export default function AccountLayout() {
  return (
    <div className="inks account">
      <div className="account-side">
        <header>
          <Link to="/" className="account-brand">
            <Brand size={30} />
            Doab
          </Link>
        </header>
        <main className="account-sheet">
          <Outlet />
        </main>
      </div>
      <div className="account-ground">
        <Ground />
      </div>
    </div>
  )
}
