import { randomUUID } from 'node:crypto'
import path from 'node:path'
import { createRequestHandler } from '@react-router/express'
import compression from 'compression'
import express, { type ErrorRequestHandler, type RequestHandler } from 'express'
import type { ServerBuild } from 'react-router'
import { env } from '../env.server'
import { log } from '../log.server'
import { CLIENT_ADDRESS } from './address.server'
import { commonHeaders } from './headers.server'

const YEAR = '1y'
/** Largest form or file an action takes. */
export const MAX_BODY = 8_000_000
const FORWARDED = [
  'forwarded',
  'x-forwarded-for',
  'x-forwarded-host',
  'x-forwarded-proto',
  'x-forwarded-port',
  'x-real-ip',
]

/** The path as the log may keep it: what stands after /s/ is the key to somebody's drawing. */
export const loggedPath = (url: string): string =>
  (url.split('?')[0] ?? '')
    .replace(/^\/s\/[^/.]+/, '/s/…')
    .replace(/^\/api\/auth\/reset-password\/.+/, '/api/auth/reset-password/…')

/** express's "trust proxy": a number of hops, or names and addresses. */
const proxySetting = (text: string): number | string => (/^\d+$/.test(text) ? Number(text) : text)

/** Names the request, says who asks in a header nobody outside can set, and logs the answer. */
const identify: RequestHandler = (req, res, next) => {
  if (!env.TRUST_PROXY) for (const name of FORWARDED) delete req.headers[name]
  // With a trusted proxy express reads its header; else this is the socket's own address.
  req.headers[CLIENT_ADDRESS] = req.ip ?? req.socket.remoteAddress ?? 'unknown'
  const id = randomUUID()
  req.headers['x-request-id'] = id
  res.setHeader('x-request-id', id)
  for (const [name, value] of commonHeaders(req.path)) res.setHeader(name, value)
  const from = performance.now()
  res.once('close', () => {
    const entry = {
      id,
      method: req.method,
      path: loggedPath(req.originalUrl),
      status: res.statusCode,
      ms: Math.round(performance.now() - from),
    }
    if (res.statusCode >= 500) log.error(entry, 'request')
    else log.info(entry, 'request')
  })
  next()
}

/** Refuses a body that is too large before anything reads it, and one whose size is not told. */
const limitBody: RequestHandler = (req, res, next) => {
  const length = req.headers['content-length']
  if (req.headers['transfer-encoding'] !== undefined && length === undefined) {
    res.status(411).type('text').send('Say how long the body is (Content-Length).')
    return
  }
  if (Number(length ?? 0) > MAX_BODY) {
    res
      .status(413)
      .type('text')
      .send(`That is too large: at most ${MAX_BODY / 1_000_000} MB can be sent at once.`)
    return
  }
  next()
}

/** The status an error of express or its parts carries: 404 for a file that is not there, 400 for a malformed address. */
function statusOf(error: unknown): number {
  if (error instanceof URIError) return 400
  if (typeof error !== 'object' || error === null || !('status' in error)) return 500
  return typeof error.status === 'number' && error.status >= 400 && error.status < 500 ? error.status : 500
}
const SAYS: Record<number, string> = { 400: 'This address cannot be read.', 404: 'There is no such file.' }

const onError: ErrorRequestHandler = (error: unknown, req, res, next) => {
  const status = statusOf(error)
  if (status === 500) log.error({ err: error, path: loggedPath(req.originalUrl) }, 'request failed')
  if (res.headersSent) next(error)
  else
    res
      .status(status)
      .type('text')
      .send(SAYS[status] ?? 'Something broke on our side.')
}

/** The whole web server around a React Router build: files, limits, headers, pages. */
export function createApp(build: ServerBuild, clientFolder: string) {
  const app = express()
  app.disable('x-powered-by')
  app.set('query parser', false)
  if (env.TRUST_PROXY) app.set('trust proxy', proxySetting(env.TRUST_PROXY))
  app.use(compression())
  // Files with a hash in their name never change; they are not worth a log line each.
  app.use(
    '/assets',
    express.static(path.join(clientFolder, 'assets'), {
      immutable: true,
      maxAge: YEAR,
      fallthrough: false,
      setHeaders: noSniff,
    }),
  )
  app.use(express.static(clientFolder, { maxAge: '1h', index: false, redirect: false, setHeaders: noSniff }))
  app.use(identify, limitBody)
  // Behind a proxy that ends TLS the request looks like http:// here, while forms come from https://: APP_URL says who we are.
  const ours = { ...build, allowedActionOrigins: [new URL(env.APP_URL).host] }
  const handle = createRequestHandler({ build: ours, mode: env.NODE_ENV })
  app.use((req, res, next) => void handle(req, res, next))
  app.use(onError)
  return app
}

const noSniff = (res: express.Response) => res.setHeader('x-content-type-options', 'nosniff')
