import { performance } from 'node:perf_hooks'
import demo from '../../drizzle/seed/people.json'

/**
 * How long the pages of a running Doab take, from asking to the last byte, as the first of the demo's people.
 * Start one with `npm start`, then `npm run bench:page` (or `npm run bench:page -- http://localhost:3100`).
 */
const base = process.argv[2] ?? 'http://localhost:3000'
const ROUNDS = 20

async function signIn(): Promise<string> {
  const [first] = demo.people
  if (!first) throw new Error('The demo has no people.')
  const answer = await fetch(`${base}/sign-in`, {
    method: 'POST',
    redirect: 'manual',
    headers: { origin: base },
    body: new URLSearchParams({ email: first.email, password: demo.password }),
  }).catch((error: unknown) => {
    throw new Error(`Nothing answers at ${base}. Start Doab with npm start, or give its address.`, { cause: error })
  })
  const cookie = answer.headers
    .getSetCookie()
    .map((one) => one.split(';')[0])
    .join('; ')
  if (!cookie) throw new Error(`Signing in as ${first.email} failed with ${answer.status}.`)
  return cookie
}

const cookie = await signIn()

async function page(path: string) {
  const from = performance.now()
  const answer = await fetch(base + path, { headers: { cookie } })
  const html = await answer.text()
  if (!answer.ok) throw new Error(`${path} answered ${answer.status}.`)
  return { html, ms: performance.now() - from }
}
const found = (html: string, pattern: RegExp) => [...new Set([...html.matchAll(pattern)].map(([, path]) => path ?? ''))]

const sites = found((await page('/sites')).html, /href="(\/sites\/[0-9a-f-]{36})"/g)
const home = (await page('/home')).html
const sections = found(home, /href="(\/sections\/[0-9a-f-]{36})"/g)

const rows = []
for (const path of ['/home', '/sites', ...sites, ...sections]) {
  const first = await page(path)
  const times: number[] = []
  for (let i = 0; i < ROUNDS; i++) times.push((await page(path)).ms)
  times.sort((a, b) => a - b)
  const at = (share: number) => Math.round(times[Math.min(times.length - 1, Math.floor(times.length * share))] ?? 0)
  const title = /<title>([^<]*)/.exec(first.html)?.[1]?.replace(' · Doab', '') ?? path
  rows.push({
    page: title,
    'first ms': Math.round(first.ms),
    'median ms': at(0.5),
    'slowest ms': at(1),
    kB: Math.round(first.html.length / 1000),
  })
}
console.table(rows)
