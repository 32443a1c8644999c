import { betterAuth } from 'better-auth'
import { drizzleAdapter } from 'better-auth/adapters/drizzle'
import { organization, twoFactor } from 'better-auth/plugins'
import { asc, eq } from 'drizzle-orm'
import * as schema from '../../drizzle/schema'
import { accessControl, roles } from './accounts/roles.server'
import { db } from './db.server'
import { env } from './env.server'
import { CLIENT_ADDRESS } from './http/address.server'
import { log } from './log.server'
import { queueMail } from './mail/queue.server'

const MINUTE = 60
const DAY = 24 * 60 * MINUTE
export const RESET_MINUTES = 30
export const PASSWORD_MIN = 10
export const PASSWORD_MAX = 128

/** The first practice somebody belongs to: the one a new session opens in. */
async function firstPractice(userId: string): Promise<string | null> {
  const [row] = await db
    .select({ id: schema.member.organizationId })
    .from(schema.member)
    .where(eq(schema.member.userId, userId))
    .orderBy(asc(schema.member.createdAt))
    .limit(1)
  return row?.id ?? null
}

/** On one's own machine the same server is also reached as 127.0.0.1. */
function trustedOrigins(): string[] {
  const app = new URL(env.APP_URL)
  if (app.hostname !== 'localhost') return [app.origin]
  return [app.origin, `${app.protocol}//127.0.0.1:${app.port}`]
}

export const auth = betterAuth({
  appName: 'Doab',
  baseURL: env.APP_URL,
  basePath: '/api/auth',
  secret: env.AUTH_SECRET,
  trustedOrigins: trustedOrigins(),
  database: drizzleAdapter(db, { provider: 'mysql', schema, transaction: true }),
  telemetry: { enabled: false },
  logger: {
    level: 'warn',
    log: (level, message) => log[level === 'error' ? 'error' : 'warn']({ from: 'better-auth' }, message),
  },
  emailAndPassword: {
    enabled: true,
    minPasswordLength: PASSWORD_MIN,
    maxPasswordLength: PASSWORD_MAX,
    autoSignIn: true,
    resetPasswordTokenExpiresIn: RESET_MINUTES * MINUTE,
    // Whoever resets a password may be shutting out somebody who knows the old one.
    revokeSessionsOnPasswordReset: true,
    sendResetPassword: async ({ user, token }) => {
      const link = new URL('/reset', env.APP_URL)
      link.searchParams.set('token', token)
      await queueMail(db, { kind: 'reset', to: user.email, name: user.name, link: link.href, minutes: RESET_MINUTES })
    },
  },
  session: { expiresIn: 14 * DAY, updateAge: DAY, cookieCache: { enabled: false } },
  rateLimit: {
    enabled: env.NODE_ENV === 'production',
    storage: 'database',
    window: 60,
    max: 120,
    // Also keeps better-auth from pruning the rows of our own form limits (same table) before 15 minutes are over.
    customRules: {
      '/sign-in/email': { window: 15 * MINUTE, max: 20 },
      '/request-password-reset': { window: 15 * MINUTE, max: 10 },
    },
  },
  advanced: {
    cookiePrefix: 'doab',
    ipAddress: { ipAddressHeaders: [CLIENT_ADDRESS] },
    database: { generateId: () => crypto.randomUUID() },
  },
  databaseHooks: {
    session: {
      create: {
        before: async (session) => ({
          data: { ...session, activeOrganizationId: await firstPractice(session.userId) },
        }),
      },
    },
  },
  plugins: [
    organization({ ac: accessControl, roles, creatorRole: 'principal', invitationExpiresIn: 7 * DAY }),
    twoFactor({ issuer: 'Doab' }),
  ],
})
