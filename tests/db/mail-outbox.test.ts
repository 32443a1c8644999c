import { once } from 'node:events'
import { SMTPServer } from 'smtp-server'
import { afterAll, beforeEach, describe, expect, it } from 'vitest'
import { closeDatabase, db } from '~/server/db.server'
import type { Letter } from '~/server/mail/letters.server'
import { queueMail } from '~/server/mail/queue.server'
import { BACK_OFF, sendDue } from '~/server/mail/send-due.server'
import { openTransport, type Transport } from '~/server/mail/transport.server'
import { outbox } from '../../drizzle/schema'
import { cleanDatabase } from '../setup/clean'

beforeEach(cleanDatabase)
afterAll(closeDatabase)

const letter: Letter = {
  kind: 'note',
  to: 'ada@reed.example',
  name: 'Ada',
  subject: 'A drain',
  paragraphs: ['It is in.'],
}
const later = (minutes: number) => new Date(Date.now() + minutes * 60_000)
const rows = () => db.select().from(outbox)

/** A transport that fails as often as told, then keeps what it was given. */
function fake(failures = 0, fail: () => Error = () => new Error('the line is dead')) {
  const got: string[] = []
  let left = failures
  const transport: Transport = {
    deliver: async ({ messageId }) => {
      if (left-- > 0) throw fail()
      got.push(messageId)
      return 'sent'
    },
    close: () => {},
  }
  return { transport, got }
}

describe('the outbox', () => {
  it('holds a letter exactly when the deed it reports was done', async () => {
    await db
      .transaction(async (tx) => {
        await queueMail(tx, letter)
        throw new Error('the deed failed')
      })
      .catch(() => {})
    expect(await rows()).toHaveLength(0)
    await db.transaction((tx) => queueMail(tx, letter))
    expect(await rows()).toHaveLength(1)
  })

  it('sends each letter once, however many look at the same time', async () => {
    for (let i = 0; i < 12; i++) await queueMail(db, letter)
    const { transport, got } = fake()
    await Promise.all([1, 2, 3, 4].map(() => sendDue(db, transport, later(0.1))))
    while ((await sendDue(db, transport, later(0.1))) > 0);
    expect(got).toHaveLength(12)
    expect(new Set(got).size).toBe(12)
    expect((await rows()).every((row) => row.state === 'sent' && row.sentAt !== null)).toBe(true)
  })

  it('waits longer after each failure, says why, and sends in the end', async () => {
    await queueMail(db, letter)
    const { transport, got } = fake(2)
    let now = later(0.1)
    await sendDue(db, transport, now)
    expect((await rows())[0]).toMatchObject({ state: 'waiting', tries: 1, error: 'the line is dead' })
    expect(await sendDue(db, transport, now)).toBe(0)
    now = new Date(now.getTime() + (BACK_OFF[0] ?? 0) * 60_000 + 1000)
    await sendDue(db, transport, now)
    expect(await sendDue(db, transport, new Date(now.getTime() + 2 * 60_000))).toBe(0)
    await sendDue(db, transport, new Date(now.getTime() + (BACK_OFF[1] ?? 0) * 60_000 + 1000))
    expect(got).toHaveLength(1)
    expect((await rows())[0]).toMatchObject({ state: 'sent', tries: 3, error: null })
  })

  it('gives up after the last waiting time, and at once when the address is refused', async () => {
    await queueMail(db, letter)
    const dead = fake(Number.POSITIVE_INFINITY)
    for (let i = 0; i <= BACK_OFF.length; i++) await sendDue(db, dead.transport, later(1 + i * 1000))
    expect((await rows())[0]).toMatchObject({ state: 'failed', tries: BACK_OFF.length + 1 })
    await cleanDatabase()
    await queueMail(db, letter)
    const refusing = fake(1, () => Object.assign(new Error('550 no such user'), { responseCode: 550 }))
    await sendDue(db, refusing.transport, later(0.1))
    expect((await rows())[0]).toMatchObject({ state: 'failed', tries: 1, error: '550 no such user' })
  })

  it('takes up a letter whose sender died, after ten minutes', async () => {
    await queueMail(db, letter)
    await db.update(outbox).set({ state: 'sending', tries: 1, nextTryAt: later(10) })
    const { transport, got } = fake()
    expect(await sendDue(db, transport, later(9))).toBe(0)
    expect(await sendDue(db, transport, later(11))).toBe(1)
    expect(got).toHaveLength(1)
  })

  it('catches everything when there is no mail server', async () => {
    await queueMail(db, letter)
    await sendDue(db, openTransport(undefined), later(0.1))
    expect((await rows())[0]).toMatchObject({ state: 'caught' })
  })

  it('speaks SMTP', async () => {
    let heard = ''
    const server = new SMTPServer({
      authOptional: true,
      disabledCommands: ['STARTTLS'],
      onData: (stream, _session, done) => {
        stream.on('data', (chunk) => {
          heard += chunk
        })
        stream.on('end', () => done())
      },
    })
    server.listen(0, '127.0.0.1')
    await once(server.server, 'listening')
    const address = server.server.address()
    const port = typeof address === 'object' && address ? address.port : 0
    const transport = openTransport(`smtp://127.0.0.1:${port}?ignoreTLS=true`, 'Doab <doab@office.example>')
    const id = await queueMail(db, letter)
    await sendDue(db, transport, later(0.1))
    transport.close()
    await new Promise<void>((resolve) => server.close(() => resolve()))
    expect((await rows())[0]).toMatchObject({ state: 'sent', error: null })
    expect(heard).toContain('Subject: A drain')
    expect(heard).toContain(`Message-ID: <${id}@doab>`)
    expect(heard).toContain('From: Doab <doab@office.example>')
  })
})
