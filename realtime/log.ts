import { pino } from 'pino'

/** Structured lines on standard output; never a document, a ticket or a name. */
export const log = pino({ name: 'live', level: process.env.LOG_LEVEL || (process.env.VITEST ? 'silent' : 'info') })
export type Log = Pick<typeof log, 'info' | 'warn' | 'error' | 'debug'>
