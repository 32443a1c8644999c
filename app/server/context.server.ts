import { asc, eq } from 'drizzle-orm'
import { createContext, type RouterContextProvider, redirect } from 'react-router'
import type { PracticeRole } from '~/access/acts'
import type { Actor } from '~/access/facts.server'
import { member, organization } from '../../drizzle/schema'
import { auth } from './auth.server'
import { db } from './db.server'
import { AppError } from './errors.server'
import { databaseAnswers } from './health.server'
import { clientAddress } from './http/address.server'

export type Membership = { id: string; name: string; slug: string; role: PracticeRole }

/** Somebody signed in. Passes wherever an `Actor` is asked for. */
export type Person = {
  kind: 'person'
  userId: string
  name: string
  email: string
  sessionId: string
  /** Where the request came from; for the audit. */
  address: string
  /** The practices they belong to, oldest first. */
  practices: Membership[]
  /** The practice they are working in now; null when they belong to none (a guest on somebody's site). */
  practice: Membership | null
}

/** Who makes this request: a signed-in person, or null. Holders of a read-only link are told from the token by the route. */
export const actorContext = createContext<Person | null>(null)

const KNOWN_ROLES: readonly string[] = ['principal', 'engineer', 'checker', 'reader']

async function memberships(userId: string): Promise<Membership[]> {
  const rows = await db
    .select({ id: organization.id, name: organization.name, slug: organization.slug, role: member.role })
    .from(member)
    .innerJoin(organization, eq(organization.id, member.organizationId))
    .where(eq(member.userId, userId))
    .orderBy(asc(member.createdAt))
  return rows.filter((row): row is Membership => KNOWN_ROLES.includes(row.role))
}

/** Reads the session cookie. `headers` carry a renewed cookie when better-auth wants one set. */
export async function readPerson(request: Request): Promise<{ person: Person | null; headers: Headers }> {
  if (!request.headers.has('cookie')) return { person: null, headers: new Headers() }
  const { response, headers } = await auth.api.getSession({ headers: request.headers, returnHeaders: true })
  if (!response) return { person: null, headers }
  const { user, session } = response
  const practices = await memberships(user.id)
  const practice = practices.find((p) => p.id === session.activeOrganizationId) ?? practices[0] ?? null
  const person: Person = {
    kind: 'person',
    userId: user.id,
    name: user.name,
    email: user.email,
    sessionId: session.id,
    address: clientAddress(request),
    practices,
    practice,
  }
  return { person, headers }
}

type MiddlewareArgs = { request: Request; context: Readonly<RouterContextProvider> }

/** Root middleware: puts the person into the context before any loader or action runs. */
export async function actorMiddleware({ request, context }: MiddlewareArgs, next: () => Promise<Response>) {
  const { person, headers } = await readPerson(request).catch(async (error: unknown) => {
    if (await databaseAnswers()) throw error
    throw new AppError('unavailable', 'The database does not answer.')
  })
  context.set(actorContext, person)
  const response = await next()
  // An action that signed somebody in or out has set its own cookie; a renewal must not overwrite it.
  if (!response.headers.has('set-cookie'))
    for (const cookie of headers.getSetCookie()) response.headers.append('set-cookie', cookie)
  return response
}

type Context = Pick<RouterContextProvider, 'get'>

/** The signed-in person, or null. */
export const personOf = (context: Context): Person | null => context.get(actorContext)

/** The signed-in person; whoever is not is sent to sign in and comes back to where they were. */
export function requirePerson(context: Context, request: Request): Person {
  const person = personOf(context)
  if (person) return person
  const url = new URL(request.url)
  // After an action there is no page to come back to but the one that holds the form.
  const path = url.pathname.replace(/\.data$/, '') + (request.method === 'GET' ? withoutRouterParams(url) : '')
  throw redirect(`/sign-in?redirectTo=${encodeURIComponent(path)}`)
}

function withoutRouterParams(url: URL): string {
  const params = new URLSearchParams(url.search)
  params.delete('_routes')
  params.delete('index')
  const text = params.toString()
  return text ? `?${text}` : ''
}

export type { Actor }
