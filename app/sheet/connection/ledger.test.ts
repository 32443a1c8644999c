import { describe, expect, it } from 'vitest'
import { Ledger } from './ledger'

describe('what the server has said is stored', () => {
  /** Connected, with the step 2 that answers the server taken. */
  const joined = (inherited = 0) => {
    const ledger = new Ledger(inherited)
    ledger.connected()
    ledger.message(true)
    ledger.acknowledged(1, 0)
    return ledger
  }

  it('counts each edit until its own message is acknowledged', () => {
    const ledger = joined()
    for (const _ of [1, 2, 3]) {
      ledger.edit()
      ledger.message(false)
    }
    expect(ledger.waiting).toBe(3)
    ledger.acknowledged(3, 0)
    expect(ledger.waiting).toBe(1)
    ledger.acknowledged(4, 0)
    expect(ledger.waiting).toBe(0)
  })

  it('believes no update before a step 2 was taken on this connection', () => {
    const ledger = new Ledger(4)
    ledger.connected()
    ledger.edit()
    ledger.message(false)
    ledger.acknowledged(1, 0)
    expect(ledger.waiting).toBe(5)
    ledger.message(true)
    ledger.acknowledged(2, 0)
    expect(ledger.waiting).toBe(0)
  })

  it('keeps what was refused as waiting until everything has been sent and taken again', () => {
    const ledger = joined()
    ledger.edit()
    ledger.message(false)
    ledger.acknowledged(2, 1)
    ledger.edit()
    ledger.message(false)
    ledger.acknowledged(3, 1)
    expect(ledger.waiting).toBe(2)
    ledger.message(true)
    ledger.acknowledged(4, 1)
    expect(ledger.waiting).toBe(0)
  })

  it('forgets what an old connection sent; the next step 2 covers it', () => {
    const ledger = joined()
    ledger.edit()
    ledger.message(false)
    ledger.connected()
    ledger.acknowledged(1, 0)
    expect(ledger.waiting).toBe(1)
    ledger.message(true)
    ledger.acknowledged(1, 0)
    expect(ledger.waiting).toBe(0)
  })

  it('is not confused by an acknowledgement of more than was sent', () => {
    const ledger = joined()
    ledger.edit()
    ledger.acknowledged(99, 0)
    expect(ledger.waiting).toBe(1)
  })
})
