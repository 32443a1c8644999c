import { pino } from 'pino'
import { env } from './env.server'

/** One line of JSON per event. Secrets and tokens are never handed to it. */
export const log = pino({
  name: 'web',
  level: env.LOG_LEVEL,
  redact: ['*.password', '*.token', '*.cookie', '*.authorization'],
})
