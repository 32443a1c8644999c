import { eq } from 'drizzle-orm'
import { RouterContextProvider } from 'react-router'
import { afterAll, beforeEach, describe, expect, it } from 'vitest'
import { askForReset, resetPassword } from '~/server/accounts/reset.server'
import { signIn } from '~/server/accounts/sign-in.server'
import { signUp } from '~/server/accounts/sign-up.server'
import { actorContext, personOf, readPerson, requirePerson } from '~/server/context.server'
import { closeDatabase, db } from '~/server/db.server'
import { AppError } from '~/server/errors.server'
import { CLIENT_ADDRESS } from '~/server/http/address.server'
import { account, audit, member, organization, outbox, session, user } from '../../drizzle/schema'
import { cleanDatabase } from '../setup/clean'

beforeEach(cleanDatabase)
afterAll(closeDatabase)

const PASSWORD = 'seven herons standing'
const newcomer = { name: 'Ada Reed', email: 'Ada@Reed.example', password: PASSWORD, practice: 'Reed & Sedge' }

const request = (headers: Record<string, string> = {}, path = '/') =>
  new Request(`http://localhost:3000${path}`, { headers: { [CLIENT_ADDRESS]: '192.0.2.7', ...headers } })

/** The cookie header a browser would send after these set-cookie headers. */
const cookieOf = (headers: Headers) =>
  headers
    .getSetCookie()
    .map((line) => line.split(';')[0])
    .join('; ')

async function signedUp() {
  const result = await signUp(request(), newcomer)
  if (!result.ok) throw new Error(result.message)
  return cookieOf(result.headers)
}

const tokenOfLetter = (text: string) => /reset\?token=([^\s]+)/.exec(text)?.[1] ?? ''

describe('signing up', () => {
  it('founds a practice with the person as its principal and signs them in', async () => {
    const { person } = await readPerson(request({ cookie: await signedUp() }))
    expect(person).toMatchObject({
      kind: 'person',
      name: 'Ada Reed',
      email: 'ada@reed.example',
      address: '192.0.2.7',
      practice: { name: 'Reed & Sedge', role: 'principal' },
    })
    expect(person?.practices).toHaveLength(1)
    const [practice] = await db.select().from(organization)
    expect(practice?.slug).toMatch(/^reed-sedge-[0-9a-f]{6}$/)
    const [row] = await db.select().from(audit)
    expect(row).toMatchObject({
      act: 'practice.found',
      practiceId: practice?.id,
      actorName: 'Ada Reed',
      address: '192.0.2.7',
    })
    const [open] = await db.select().from(session)
    expect(open).toMatchObject({ activeOrganizationId: practice?.id, ipAddress: '192.0.2.7' })
  })

  it('says so beside the e-mail when it is taken, and changes nothing', async () => {
    await signedUp()
    const again = await signUp(request(), { ...newcomer, email: 'ada@REED.example', practice: 'Another' })
    expect(again).toMatchObject({ ok: false, field: 'email' })
    expect(await db.select().from(organization)).toHaveLength(1)
    expect(await db.select().from(user)).toHaveLength(1)
  })

  it('stores no password that can be read', async () => {
    await signedUp()
    const [row] = await db.select().from(account)
    expect(row?.password).toBeTruthy()
    expect(JSON.stringify(row)).not.toContain(PASSWORD)
  })
})

describe('signing in', () => {
  it('opens in a practice the person belongs to', async () => {
    await signedUp()
    const result = await signIn(request(), { email: 'ADA@reed.example', password: PASSWORD })
    expect(result.ok).toBe(true)
    if (!result.ok) return
    const { person } = await readPerson(request({ cookie: cookieOf(result.headers) }))
    expect(person?.practice?.name).toBe('Reed & Sedge')
  })

  it('answers an unknown e-mail and a wrong password alike', async () => {
    await signedUp()
    const wrong = await signIn(request(), { email: 'ada@reed.example', password: 'not the password' })
    const unknown = await signIn(request(), { email: 'nobody@reed.example', password: 'not the password' })
    expect(wrong.ok).toBe(false)
    expect(unknown).toEqual(wrong)
  })

  it('refuses the ninth try on one account after eight wrong ones, from that address only', async () => {
    await signedUp()
    const attempt = (from: string, password: string) =>
      signIn(request({ [CLIENT_ADDRESS]: from }), { email: 'ada@reed.example', password })
    for (let i = 0; i < 8; i++) expect((await attempt('192.0.2.7', 'wrong wrong')).ok).toBe(false)
    await expect(attempt('192.0.2.7', PASSWORD)).rejects.toMatchObject({ code: 'too-many', status: 429 })
    expect((await attempt('192.0.2.8', PASSWORD)).ok).toBe(true)
  })

  it('forgets the wrong tries once the right password came', async () => {
    await signedUp()
    const attempt = (password: string) => signIn(request(), { email: 'ada@reed.example', password })
    for (let round = 0; round < 2; round++) {
      for (let i = 0; i < 7; i++) expect((await attempt('wrong wrong')).ok).toBe(false)
      expect((await attempt(PASSWORD)).ok).toBe(true)
    }
  })
})

describe('a forgotten password', () => {
  it('is replaced once by the letter, which ends every session', async () => {
    const cookie = await signedUp()
    await askForReset(request(), 'ada@reed.example')
    const [letter] = await db.select().from(outbox)
    expect(letter).toMatchObject({ kind: 'reset', to: 'ada@reed.example', state: 'waiting' })
    const token = tokenOfLetter(letter?.text ?? '')
    expect(letter?.html).toContain(token)

    expect(await resetPassword(request(), { token, password: 'an entirely new one' })).toEqual({ ok: true })
    expect((await readPerson(request({ cookie }))).person).toBeNull()
    expect((await signIn(request(), { email: 'ada@reed.example', password: PASSWORD })).ok).toBe(false)
    expect((await signIn(request(), { email: 'ada@reed.example', password: 'an entirely new one' })).ok).toBe(true)
    expect((await resetPassword(request(), { token, password: 'used a second time' })).ok).toBe(false)
  })

  it('sends nothing to an address without an account, and does not say so', async () => {
    await expect(askForReset(request(), 'nobody@reed.example')).resolves.toBeUndefined()
    expect(await db.select().from(outbox)).toHaveLength(0)
  })

  it('can be asked for five times in a quarter of an hour', async () => {
    for (let i = 0; i < 5; i++) await askForReset(request(), 'ada@reed.example')
    await expect(askForReset(request(), 'Ada@reed.example')).rejects.toBeInstanceOf(AppError)
  })
})

describe('the person of a request', () => {
  it('loses a practice the moment the membership is gone', async () => {
    const cookie = await signedUp()
    await db.delete(member)
    const { person } = await readPerson(request({ cookie }))
    expect(person).toMatchObject({ practices: [], practice: null })
  })

  it('is nobody with a forged, an ended and no cookie', async () => {
    const cookie = await signedUp()
    expect((await readPerson(request())).person).toBeNull()
    expect((await readPerson(request({ cookie: `${cookie}x` }))).person).toBeNull()
    await db
      .update(session)
      .set({ expiresAt: new Date(Date.now() - 1000) })
      .where(eq(session.ipAddress, '192.0.2.7'))
    expect((await readPerson(request({ cookie }))).person).toBeNull()
  })

  it('is asked to sign in and brought back to where they were', () => {
    const context = new RouterContextProvider()
    expect(personOf(context)).toBeNull()
    context.set(actorContext, null)
    const thrown = (() => {
      try {
        requirePerson(context, request({}, '/sites.data?q=weir&_routes=root'))
      } catch (error) {
        return error
      }
    })()
    expect(thrown).toBeInstanceOf(Response)
    expect((thrown as Response).headers.get('location')).toBe('/sign-in?redirectTo=%2Fsites%3Fq%3Dweir')
  })
})
