import type { Decision } from '~/access/decide'

/** Every way Doab refuses, and the status it answers with. */
export const STATUS = {
  invalid: 400,
  'signed-out': 401,
  forbidden: 403,
  'not-found': 404,
  'wrong-method': 405,
  conflict: 409,
  gone: 410,
  'too-large': 413,
  unreadable: 422,
  'too-many': 429,
  broken: 500,
  unavailable: 503,
} as const
export type ErrorCode = keyof typeof STATUS
/** What a page's error boundary or an API caller receives. */
export type ErrorBody = { code: ErrorCode; message: string }

/**
 * A refusal with a code and words for the person. Services throw it. React Router takes anything shaped like its own `data()`
 * reply when thrown, so `throw new AppError('not-found', '…')` in a loader, an action or anything they call reaches the error
 * boundary (or the API caller, as JSON) with the right status, and stays an Error with a stack for tests and the log.
 */
export class AppError extends Error {
  readonly type = 'DataWithResponseInit'
  readonly data: ErrorBody
  readonly init: { status: number; headers?: HeadersInit }

  constructor(
    readonly code: ErrorCode,
    message: string,
    headers?: HeadersInit,
  ) {
    super(message)
    this.name = 'AppError'
    this.data = { code, message }
    this.init = { status: STATUS[code], headers }
  }

  get status(): number {
    return this.init.status
  }
}

/** Passes when the decision is yes; throws 403 or 404 as it says otherwise. */
export function must(decision: Decision): asserts decision is { yes: true } {
  if (!decision.yes) throw new AppError(decision.status === 403 ? 'forbidden' : 'not-found', decision.why)
}

/** The refusal for what does not exist or is not shared: the two look alike. */
export const notFound = () => new AppError('not-found', 'There is nothing here, or it is not shared with you.')
