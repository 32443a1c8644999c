import { Outlet } from 'react-router'

export default function AccountLayout() {
  return (
    <main>
      <Outlet />
    </main>
  )
}
