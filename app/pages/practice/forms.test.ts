import { describe, expect, it } from 'vitest'
import { linkForm } from './forms'

describe('the last day of a link', () => {
  it.each(['2027-02-31', '2027-13-40', 'soon', '31.3.2027'])(
    '%s is no day of the calendar, and is told so',
    (expires) => {
      const read = linkForm.safeParse({ label: 'Client', expires })
      expect(read.success).toBe(false)
      expect(read.error?.issues[0]).toMatchObject({ path: ['expires'], message: expect.stringContaining('calendar') })
    },
  )
  it('takes a real day, and none', () => {
    expect(linkForm.safeParse({ label: 'Client', expires: '2028-02-29' }).success).toBe(true)
    expect(linkForm.safeParse({ label: 'Client' }).success).toBe(true)
  })
})
