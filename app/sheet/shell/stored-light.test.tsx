import { screen } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { describe, expect, it, vi } from 'vitest'
import { lightOf, StoredLight } from './stored-light'
import { fakeSheet, show } from './testing/fake-sheet'

describe('the stored light', () => {
  it('says "stored" only in the one state in which the server has said so', () => {
    const others = [
      { kind: 'connecting' },
      { kind: 'storing', waiting: 1 },
      { kind: 'stalled', waiting: 1, says: 'The database does not answer.' },
      { kind: 'offline', waiting: 0 },
      { kind: 'refused', waiting: 0, code: 4403, says: 'You no longer have access to this section.' },
    ] as const
    expect(lightOf({ kind: 'stored' }, 'write').short).toBe('stored')
    for (const link of others) expect(lightOf(link, 'write').short).not.toMatch(/^stored/)
  })
  it('counts the edits kept here', () => {
    expect(lightOf({ kind: 'offline', waiting: 1 }, 'write').short).toBe('offline, 1 edit kept here')
    expect(lightOf({ kind: 'offline', waiting: 7 }, 'write').short).toBe('offline, 7 edits kept here')
    expect(lightOf({ kind: 'storing', waiting: 2 }, 'write').short).toBe('storing 2')
  })
  it('says nothing of storing to those who cannot write', () => {
    expect(lightOf({ kind: 'stored' }, 'read').short).toBe('live')
    expect(lightOf({ kind: 'offline', waiting: 0 }, 'read').short).toBe('offline')
  })
  it('announces a change of state in words, and keeps quiet while edits stream', () => {
    const sheet = fakeSheet({ link: { kind: 'offline', waiting: 3 } })
    const { unmount } = show(<StoredLight />, sheet)
    expect(screen.getByRole('status')).toHaveTextContent('3 edits kept on this machine')
    unmount()
    show(<StoredLight />, fakeSheet({ link: { kind: 'storing', waiting: 3 } }))
    expect(screen.getByRole('status')).toBeEmptyDOMElement()
  })
  it('offers to try at once when offline', async () => {
    const retry = vi.fn()
    show(<StoredLight onRetry={retry} />, fakeSheet({ link: { kind: 'offline', waiting: 0 } }))
    await userEvent.click(screen.getByRole('button', { name: 'try now' }))
    expect(retry).toHaveBeenCalledOnce()
  })
})
