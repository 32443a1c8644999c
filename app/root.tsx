import type { ReactNode } from 'react'
import { Links, Meta, Outlet, Scripts, ScrollRestoration } from 'react-router'
import type { Route } from './+types/root'
import './app.css'
import { useNonce } from './entry.nonce'
import { Trouble } from './routes/_public/trouble'
import { actorMiddleware } from './server/context.server'

export const middleware: Route.MiddlewareFunction[] = [actorMiddleware]

export const meta: Route.MetaFunction = () => [
  { title: 'Doab' },
  { name: 'description', content: 'Draw the strip of ground between two waters together and read its water table.' },
]

export const links: Route.LinksFunction = () => [{ rel: 'icon', href: '/favicon.svg', type: 'image/svg+xml' }]

// zod would try `new Function`, which our content security policy refuses (and reports on every page).
const BEFORE_SCRIPTS = 'globalThis.__zod_globalConfig={jitless:true}'

export function Layout({ children }: { children: ReactNode }) {
  const nonce = useNonce()
  return (
    <html lang="en">
      <head>
        <meta charSet="utf-8" />
        <meta name="viewport" content="width=device-width, initial-scale=1" />
        <meta name="color-scheme" content="light dark" />
        <Meta />
        <Links />
        <script nonce={nonce} suppressHydrationWarning>
          {BEFORE_SCRIPTS}
        </script>
      </head>
      <body>
        {children}
        <ScrollRestoration nonce={nonce} />
        <Scripts nonce={nonce} />
      </body>
    </html>
  )
}

export default function App() {
  return <Outlet />
}

export function ErrorBoundary({ error }: Route.ErrorBoundaryProps) {
  return <Trouble error={error} />
}
