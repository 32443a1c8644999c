import { Outlet } from 'react-router'
import { PracticeShell } from '~/pages/practice/shell'
import { requirePerson } from '~/server/context.server'
import '../_public/inks.css'
import '~/ui/ui.css'
import type { Route } from './+types/layout'

export function loader({ context, request }: Route.LoaderArgs) {
  const { name, practice } = requirePerson(context, request)
  return { name, practice: practice?.name ?? null, role: practice?.role ?? null }
}

export default function PracticeLayout({ loaderData }: Route.ComponentProps) {
  return (
    <PracticeShell {...loaderData}>
      <Outlet />
    </PracticeShell>
  )
}
