import { bigint, boolean, index, int, mysqlTable, text, timestamp, uniqueIndex, varchar } from 'drizzle-orm/mysql-core'

// Tables of better-auth (1.7) and its organization and two-factor plugins, written by hand: its generators need Node 22.
// Property names are better-auth's field names; columns are snake_case. An organization is a practice.
export const id = () => varchar({ length: 36 })
export const at = () => timestamp({ fsp: 3, mode: 'date' })

export const user = mysqlTable(
  'user',
  {
    id: id().primaryKey(),
    name: varchar({ length: 255 }).notNull(),
    email: varchar({ length: 255 }).notNull(),
    emailVerified: boolean().notNull().default(false),
    image: text(),
    twoFactorEnabled: boolean().default(false),
    createdAt: at().notNull().defaultNow(),
    updatedAt: at().notNull().defaultNow(),
  },
  (t) => [uniqueIndex('user_email').on(t.email)],
)

export const session = mysqlTable(
  'session',
  {
    id: id().primaryKey(),
    userId: id()
      .notNull()
      .references(() => user.id, { onDelete: 'cascade' }),
    token: varchar({ length: 255 }).notNull(),
    expiresAt: at().notNull(),
    ipAddress: varchar({ length: 64 }),
    userAgent: text(),
    activeOrganizationId: id(),
    createdAt: at().notNull().defaultNow(),
    updatedAt: at().notNull().defaultNow(),
  },
  (t) => [uniqueIndex('session_token').on(t.token), index('session_user').on(t.userId)],
)

export const account = mysqlTable(
  'account',
  {
    id: id().primaryKey(),
    userId: id()
      .notNull()
      .references(() => user.id, { onDelete: 'cascade' }),
    accountId: varchar({ length: 255 }).notNull(),
    providerId: varchar({ length: 255 }).notNull(),
    accessToken: text(),
    refreshToken: text(),
    idToken: text(),
    accessTokenExpiresAt: at(),
    refreshTokenExpiresAt: at(),
    scope: text(),
    password: text(),
    createdAt: at().notNull().defaultNow(),
    updatedAt: at().notNull().defaultNow(),
  },
  (t) => [index('account_user').on(t.userId)],
)

export const verification = mysqlTable(
  'verification',
  {
    id: id().primaryKey(),
    identifier: varchar({ length: 255 }).notNull(),
    value: text().notNull(),
    expiresAt: at().notNull(),
    createdAt: at().notNull().defaultNow(),
    updatedAt: at().notNull().defaultNow(),
  },
  (t) => [index('verification_identifier').on(t.identifier)],
)

export const organization = mysqlTable(
  'organization',
  {
    id: id().primaryKey(),
    name: varchar({ length: 255 }).notNull(),
    slug: varchar({ length: 255 }).notNull(),
    logo: text(),
    metadata: text(),
    createdAt: at().notNull().defaultNow(),
  },
  (t) => [uniqueIndex('organization_slug').on(t.slug)],
)

export const member = mysqlTable(
  'member',
  {
    id: id().primaryKey(),
    organizationId: id()
      .notNull()
      .references(() => organization.id, { onDelete: 'cascade' }),
    userId: id()
      .notNull()
      .references(() => user.id, { onDelete: 'cascade' }),
    role: varchar({ length: 32 }).notNull(),
    createdAt: at().notNull().defaultNow(),
  },
  (t) => [uniqueIndex('member_org_user').on(t.organizationId, t.userId), index('member_user').on(t.userId)],
)

export const invitation = mysqlTable(
  'invitation',
  {
    id: id().primaryKey(),
    organizationId: id()
      .notNull()
      .references(() => organization.id, { onDelete: 'cascade' }),
    email: varchar({ length: 255 }).notNull(),
    role: varchar({ length: 32 }),
    status: varchar({ length: 32 }).notNull().default('pending'),
    expiresAt: at().notNull(),
    inviterId: id()
      .notNull()
      .references(() => user.id, { onDelete: 'cascade' }),
    createdAt: at().notNull().defaultNow(),
  },
  (t) => [index('invitation_org').on(t.organizationId), index('invitation_email').on(t.email)],
)

export const twoFactor = mysqlTable(
  'two_factor',
  {
    id: id().primaryKey(),
    userId: id()
      .notNull()
      .references(() => user.id, { onDelete: 'cascade' }),
    secret: text().notNull(),
    backupCodes: text().notNull(),
    verified: boolean().default(true),
    failedVerificationCount: int().default(0),
    lockedUntil: at(),
  },
  (t) => [index('two_factor_user').on(t.userId)],
)

export const rateLimit = mysqlTable(
  'rate_limit',
  {
    id: id().primaryKey(),
    key: varchar({ length: 255 }).notNull(),
    count: int().notNull(),
    lastRequest: bigint({ mode: 'number' }).notNull(),
  },
  (t) => [uniqueIndex('rate_limit_key').on(t.key)],
)
