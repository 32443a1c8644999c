import { auth } from '~/server/auth.server'
import { AppError } from '~/server/errors.server'
import type { Route } from './+types/auth'

// better-auth's organization calls would change practices past our audit and past the sidecar's revocation, and its sign-up
// would make somebody without a practice. Pages do those through ~/server; here only what concerns one's own sign-in is open.
const OPEN =
  /^\/api\/auth\/(ok|get-session|sign-in\/email|sign-out|request-password-reset|reset-password|change-password)$/

function handle({ request }: Route.LoaderArgs | Route.ActionArgs) {
  if (!OPEN.test(new URL(request.url).pathname)) throw new AppError('not-found', 'There is no such call.')
  return auth.handler(request)
}

export const loader = handle
export const action = handle
