import { existsSync, statSync } from 'node:fs'
import { createServer, type Server } from 'node:net'
import path from 'node:path'
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest'
import { answers } from '../../app/run/parts/ports.mjs'
import { ownDatabase } from '../setup/clean'
import { newPlace, type Place, stackPids, startStack, until } from '../setup/stack'

// npm start as a person meets it: the real program, its own database, the production build (made here if it is not there yet).
const BUILDING = 240_000

const signUp = (place: Place, email: string, origin = place.url) =>
  fetch(`${place.url}/sign-up`, {
    method: 'POST',
    redirect: 'manual',
    headers: { origin },
    body: new URLSearchParams({ name: 'Ada Reed', email, password: 'seven herons standing', practice: 'Reed & Sedge' }),
  })
const signIn = (place: Place, email: string) =>
  fetch(`${place.url}/sign-in`, {
    method: 'POST',
    redirect: 'manual',
    headers: { origin: place.url },
    body: new URLSearchParams({ email, password: 'seven herons standing' }),
  })

/** Where nothing listens any more and no process of the stack is left. */
const allGone = (place: Place, starter: number) =>
  until(
    'every process is gone',
    async () => {
      const { web, sidecar, database } = stackPids(place, starter)
      const listening = (await answers(place.port)) || (await answers(place.realtimePort))
      return !web && !sidecar && !database && !listening
    },
    20_000,
  )

let place: Place
let stack: ReturnType<typeof startStack> | null = null
beforeAll(async () => {
  place = await newPlace()
})
afterEach(async () => {
  await stack?.stop()
  stack = null
})
afterAll(() => place.remove())

describe('npm start', () => {
  it(
    'comes up, answers on both ports, keeps its secrets to itself and stops cleanly',
    async () => {
      stack = startStack(place)
      await stack.up()
      expect(stack.output()).toContain(place.url)
      expect((await fetch(`${place.url}/health`)).status).toBe(200)
      expect((await fetch(`http://localhost:${place.realtimePort}/health`)).status).toBe(200)
      expect(statSync(path.join(place.folder, 'secrets.json')).mode & 0o077).toBe(0)
      expect(existsSync(path.join(place.folder, 'run/db.init.sql'))).toBe(false)
      expect((await signUp(place, 'ada@reed.example')).status).toBe(302)
      expect(await stack.stop()).toBe(0)
      await allGone(place, stack.pid)
    },
    BUILDING,
  )

  it(
    'keeps what was stored when any of its processes is killed, and ends rather than limp on',
    async () => {
      for (const which of ['web', 'sidecar', 'database'] as const) {
        stack = startStack(place)
        await stack.up()
        expect((await signIn(place, 'ada@reed.example')).status).toBe(302)
        expect((await signUp(place, `${which}@reed.example`)).status).toBe(302)
        const pid = stackPids(place, stack.pid)[which]
        expect(pid, `the process of the ${which}`).not.toBeNull()
        process.kill(pid ?? 0, 'SIGKILL')
        expect(await stack.ended).toBe(1)
        expect(stack.errors()).toMatch(/ended.*stopping the rest/)
        await allGone(place, stack.pid)
      }
      stack = startStack(place)
      await stack.up()
      for (const name of ['ada', 'web', 'sidecar', 'database'])
        expect((await signIn(place, `${name}@reed.example`)).status, name).toBe(302)
    },
    BUILDING,
  )

  it(
    'leaves nothing behind when the starter itself is killed, and starts again',
    async () => {
      stack = startStack(place)
      await stack.up()
      await stack.kill()
      await allGone(place, stack.pid)
      stack = startStack(place)
      await stack.up()
      expect((await signIn(place, 'ada@reed.example')).status).toBe(302)
    },
    BUILDING,
  )

  it(
    'refuses a second start on the same folder and names the one that runs',
    async () => {
      stack = startStack(place)
      await stack.up()
      const second = startStack(place)
      expect(await second.ended).toBe(1)
      expect(second.errors().trim().split('\n')).toHaveLength(1)
      expect(second.errors()).toContain(`process ${stack.pid}`)
      expect((await fetch(`${place.url}/health`)).status).toBe(200)
    },
    BUILDING,
  )
})

describe('npm start with DATABASE_URL', () => {
  it(
    'uses that server and starts none of its own',
    async () => {
      const [elsewhere, database] = [await newPlace(), await ownDatabase()]
      const attempt = startStack(elsewhere, { DATABASE_URL: database.url })
      try {
        await attempt.up()
        expect((await signUp(elsewhere, 'ada@reed.example')).status).toBe(302)
        expect(stackPids(elsewhere, attempt.pid).database).toBeNull()
        expect(existsSync(path.join(elsewhere.folder, 'db'))).toBe(false)
      } finally {
        await attempt.stop()
        elsewhere.remove()
        await database.drop()
      }
    },
    BUILDING,
  )
})

describe('npm start for real people', () => {
  it(
    'runs on secrets of one’s own, without the demo, without a mailbox and behind https',
    async () => {
      const real = await newPlace()
      const attempt = startStack(real, {
        NODE_ENV: 'production',
        APP_URL: 'https://doab.office.example',
        AUTH_SECRET: 'a secret of the office itself, long enough',
        LIVE_SECRET: 'another secret of the office, also long enough',
      })
      try {
        await attempt.up()
        expect(attempt.output()).not.toContain('Demo accounts')
        expect((await fetch(`${real.url}/mailbox`)).status).toBe(404)
        const page = await fetch(`${real.url}/sign-in`)
        expect(page.headers.get('strict-transport-security')).toContain('max-age')
        expect(page.headers.get('content-security-policy')).toContain("frame-ancestors 'none'")
        // The proxy in front ends TLS: the form's origin is the public address, the request itself is plain.
        const signed = await signUp(real, 'ada@reed.example', 'https://doab.office.example')
        expect((await signUp(real, 'eve@reed.example', 'https://evil.example')).status).toBe(400)
        expect(signed.headers.get('set-cookie')).toMatch(/^__Secure-.*; Secure/i)
      } finally {
        await attempt.stop()
        real.remove()
      }
    },
    BUILDING,
  )
})

describe('npm start says in one line what is wrong', () => {
  let other: Place
  let taken: Server | null = null
  beforeAll(async () => {
    other = await newPlace()
  })
  afterEach(() => {
    taken?.close()
    taken = null
  })
  afterAll(() => other.remove())

  /** Expects exit code 1 and one line on stderr, without a stack. */
  async function refused(env: NodeJS.ProcessEnv, words: RegExp) {
    const attempt = startStack(other, env)
    expect(await attempt.ended).toBe(1)
    expect(attempt.errors()).toMatch(words)
    expect(attempt.errors().trim().split('\n')).toHaveLength(1)
    expect(attempt.errors()).not.toMatch(/\n\s+at /)
  }
  const listen = (port: number) =>
    new Promise<void>((resolve) => {
      taken = createServer().listen(port, () => resolve())
    })

  it('a taken port, for the app and for the live connection', async () => {
    await listen(other.port)
    await refused({}, new RegExp(`Port ${other.port} for the web app is taken.*PORT=`))
    taken?.close()
    await listen(other.realtimePort)
    await refused({}, new RegExp(`Port ${other.realtimePort} for the live connection is taken.*REALTIME_PORT=`))
  })

  it('a port that is none', () => refused({ PORT: 'many' }, /PORT is "many".*1 to 65535/))

  it(
    'a database that cannot be reached',
    () =>
      refused(
        { DATABASE_URL: 'mysql://app:x@127.0.0.1:9/doab' },
        /database at 127\.0\.0\.1:9 cannot be reached.*ECONNREFUSED/,
      ),
    BUILDING,
  )

  it(
    'a database that belongs to something else',
    async () => {
      const foreign = await ownDatabase()
      const { default: mysql } = await import('mysql2/promise')
      const connection = await mysql.createConnection(foreign.url)
      await connection.query('delete from __drizzle_migrations')
      await connection.end()
      await refused({ DATABASE_URL: foreign.url }, /holds \d+ tables that are not from Doab.*empty database/)
      await foreign.drop()
    },
    BUILDING,
  )

  it('the secrets of the demo in production', () =>
    refused(
      { NODE_ENV: 'production', APP_URL: 'https://doab.office.example' },
      /AUTH_SECRET must be set to a secret of your own/,
    ))

  it(
    'the demo itself in production',
    async () => {
      const database = await ownDatabase()
      const { default: mysql } = await import('mysql2/promise')
      const connection = await mysql.createConnection(database.url)
      await connection.query("insert into setup (name) values ('demo')")
      await connection.end()
      await refused(
        {
          NODE_ENV: 'production',
          APP_URL: 'https://doab.office.example',
          DATABASE_URL: database.url,
          AUTH_SECRET: 'a secret of the office itself, long enough',
          LIVE_SECRET: 'another secret of the office, also long enough',
        },
        /holds the demo.*empty database/,
      )
      await database.drop()
    },
    BUILDING,
  )
})
