import { z } from 'zod'

const port = z.coerce.number().int().min(0).max(65535)
const secret = z.string().min(32, 'needs at least 32 characters')
const flag = z.enum(['yes', 'no'])

const schema = z.object({
  NODE_ENV: z.enum(['development', 'production', 'test']).default('development'),
  DATABASE_URL: z.string().regex(/^(mysql|mariadb):\/\//, 'must begin with mysql://'),
  PORT: port.default(3000),
  HOST: z.string().optional(),
  REALTIME_PORT: port.default(3001),
  REALTIME_URL: z.url().optional(),
  APP_URL: z.url().default('http://localhost:3000'),
  AUTH_SECRET: secret,
  LIVE_SECRET: secret,
  SMTP_URL: z.url().optional(),
  MAIL_FROM: z.string().default('Doab <doab@localhost.example>'),
  REDIS_URL: z.url().optional(),
  /** Hops, "loopback" or addresses of the reverse proxy in front (express's "trust proxy"). */
  TRUST_PROXY: z.string().optional(),
  /** "yes" on a machine of one's own: /mailbox may show caught mail. The starter says "no" in production. */
  DOAB_LOCAL: flag.default('no'),
  LOG_LEVEL: z.enum(['trace', 'debug', 'info', 'warn', 'error', 'silent']).default('info'),
})

export type Env = z.infer<typeof schema>

/** Reads the settings; the error names every wrong one and how to mend it. */
export function readEnv(source: NodeJS.ProcessEnv): Env {
  // An empty setting means "not set": KEY= in a settings file.
  const given = Object.fromEntries(Object.entries(source).filter(([, value]) => value !== ''))
  const read = schema.safeParse(given)
  if (read.success) return read.data
  const wrong = read.error.issues.map((issue) => `  ${issue.path.join('.')}: ${issue.message}`).join('\n')
  throw new Error(`These settings are missing or wrong:\n${wrong}\nStart Doab with npm start or npm run dev.`)
}

export const env = readEnv(process.env)
