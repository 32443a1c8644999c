import { screen } from '@testing-library/react'
import { describe, expect, it } from 'vitest'
import { CLOSE } from '../../live/codes'
import { barred, Notices } from './notices'
import { fakeSheet, show } from './testing/fake-sheet'

const refused = (code: number, waiting = 0) => ({ kind: 'refused', waiting, code, says: 'You may not.' }) as const

describe('notices', () => {
  it('shut the sheet for whoever may not see it any more, link holders with a dead ticket included', () => {
    expect(barred(refused(CLOSE.noRight), false)).toBe(true)
    expect(barred(refused(CLOSE.gone), true)).toBe(true)
    expect(barred(refused(CLOSE.ticket), true)).toBe(true)
    // Signed out is not shut out: what was drawn stays to be seen and saved.
    expect(barred(refused(CLOSE.ticket), false)).toBe(false)
    expect(barred(refused(CLOSE.epoch), false)).toBe(false)
    expect(barred({ kind: 'offline', waiting: 4 }, true)).toBe(false)
  })
  it('tell the holder of a revoked link so', () => {
    show(<Notices surround={{ site: null, token: 'abc' }} />, fakeSheet({ link: refused(CLOSE.gone), may: 'read' }))
    expect(screen.getByRole('alert')).toHaveTextContent('This link leads nowhere any more')
    expect(screen.getByRole('alert')).toHaveTextContent('revoked or has expired')
  })
  it('keep unstored edits within reach', () => {
    show(<Notices surround={{ site: null, token: null }} />, fakeSheet({ link: refused(CLOSE.ticket, 2) }))
    expect(screen.getByRole('link', { name: 'Sign in' })).toBeInTheDocument()
    expect(screen.getByRole('button', { name: 'Save what is here as a file' })).toBeInTheDocument()
  })
  it('are not there while all is well', () => {
    show(<Notices surround={{ site: null, token: null }} />, fakeSheet())
    expect(screen.queryByRole('alert')).toBeNull()
  })
})
