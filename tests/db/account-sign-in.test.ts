import { afterAll, beforeEach, describe, expect, it } from 'vitest'
import { auth } from '~/server/auth.server'
import { closeDatabase } from '~/server/db.server'
import { cleanDatabase } from '../setup/clean'

beforeEach(cleanDatabase)
afterAll(closeDatabase)

describe('signing up', () => {
  it('makes a user', async () => {
    const made = await auth.api.signUpEmail({ body: { name: 'A', email: 'a@b.example', password: 'long-enough-1' } })
    expect(made.user.email).toBe('a@b.example')
  })
})
