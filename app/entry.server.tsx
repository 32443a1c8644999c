import { randomBytes } from 'node:crypto'
import { PassThrough } from 'node:stream'
import { createReadableStreamFromReadable } from '@react-router/node'
import { isbot } from 'isbot'
import { renderToPipeableStream } from 'react-dom/server'
import {
  type ActionFunctionArgs,
  type EntryContext,
  isRouteErrorResponse,
  type LoaderFunctionArgs,
  ServerRouter,
} from 'react-router'
import { NonceProvider } from './entry.nonce'
import { closeDatabase } from './server/db.server'
import { AppError } from './server/errors.server'
import { documentHeaders } from './server/http/headers.server'
import { log } from './server/log.server'
import { startSender, stopSender } from './server/mail/sender.server'

export const streamTimeout = 5_000

startSender()

/** Called by the web server once its last request is answered. */
export async function shutdown(): Promise<void> {
  await stopSender()
  await closeDatabase()
}

/** Renders a page: the shell at once, the rest streamed, everything at once for robots. */
export default function handleRequest(request: Request, status: number, headers: Headers, router: EntryContext) {
  // In development no policy asks for it, and the browser hides it from hydration, which would then complain.
  const nonce = import.meta.env.DEV ? undefined : randomBytes(16).toString('base64')
  headers.set('content-type', 'text/html; charset=utf-8')
  for (const [name, value] of documentHeaders(request, nonce)) if (!headers.has(name)) headers.set(name, value)
  if (request.method === 'HEAD') return new Response(null, { status, headers })

  const ready = isbot(request.headers.get('user-agent') ?? '') || router.isSpaMode ? 'onAllReady' : 'onShellReady'
  return new Promise<Response>((resolve, reject) => {
    let shellRendered = false
    let code = status
    const { pipe, abort } = renderToPipeableStream(
      <NonceProvider value={nonce}>
        <ServerRouter context={router} url={request.url} nonce={nonce} />
      </NonceProvider>,
      {
        nonce,
        [ready]() {
          shellRendered = true
          const body = new PassThrough({
            final(callback) {
              clearTimeout(timer)
              callback()
            },
          })
          const stream = createReadableStreamFromReadable(body)
          pipe(body)
          resolve(new Response(stream, { status: code, headers }))
        },
        onShellError(error: unknown) {
          clearTimeout(timer)
          reject(error)
        },
        onError(error: unknown) {
          code = 500
          // Errors before the shell reject above and are logged by handleError.
          if (shellRendered) log.error({ err: error, path: new URL(request.url).pathname }, 'rendering failed')
        },
      },
    )
    // A little after React Router gives up on the data, so that rejected boundaries still reach the page.
    const timer = setTimeout(() => abort(), streamTimeout + 1000)
  })
}

/** What React Router could not answer. Refusals are ordinary; a person who closed the tab is not an error. */
export function handleError(error: unknown, { request }: LoaderFunctionArgs | ActionFunctionArgs) {
  if (request.signal.aborted || error instanceof AppError || isRouteErrorResponse(error)) return
  log.error({ err: error, path: new URL(request.url).pathname, method: request.method }, 'request failed')
}
