import { createStaticHandler, isRouteErrorResponse } from 'react-router'
import { describe, expect, it } from 'vitest'
import { AppError, must, notFound, STATUS } from './errors.server'

/** What React Router makes of an error thrown in a loader, with its real handler. */
async function thrownInLoader(error: unknown) {
  const handler = createStaticHandler([
    {
      id: 'page',
      path: '/',
      hasErrorBoundary: true,
      loader: () => {
        throw error
      },
    },
  ])
  const context = await handler.query(new Request('http://localhost/'))
  if (context instanceof Response) throw new Error('a page was expected')
  return { status: context.statusCode, error: context.errors?.page }
}

describe('a refusal', () => {
  it('reaches the error boundary with its status and words', async () => {
    const { status, error } = await thrownInLoader(new AppError('gone', 'This link was revoked.'))
    expect(status).toBe(410)
    expect(isRouteErrorResponse(error) && error.data).toEqual({ code: 'gone', message: 'This link was revoked.' })
  })

  it('looks the same for what is absent and what is not shared', () => {
    const refused = { yes: false, status: 404, why: notFound().message } as const
    expect(() => must(refused)).toThrow(notFound().message)
    expect(() => must({ yes: false, status: 403, why: 'Not with your role.' })).toThrow(
      expect.objectContaining({ code: 'forbidden', status: STATUS.forbidden }),
    )
    expect(() => must({ yes: true })).not.toThrow()
  })

  it('is an error like any other to a test or a log', () => {
    const error = new AppError('conflict', 'Somebody renamed it first.')
    expect(error).toBeInstanceOf(Error)
    expect(error.message).toBe('Somebody renamed it first.')
    expect(error.stack).toContain('errors.test')
  })
})
