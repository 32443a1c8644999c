import { index, int, mysqlTable, uniqueIndex, varchar } from 'drizzle-orm/mysql-core'
import { at, id, user } from './auth'
import { section } from './section'

/** A read-only link to one section. Only the SHA-256 of the token is stored. */
export const link = mysqlTable(
  'link',
  {
    id: id().primaryKey(),
    sectionId: id()
      .notNull()
      .references(() => section.id, { onDelete: 'cascade' }),
    tokenHash: varchar({ length: 64 }).notNull(),
    label: varchar({ length: 200 }).notNull(),
    createdBy: id()
      .notNull()
      .references(() => user.id),
    shows: varchar({ length: 16 }).$type<'draft' | 'issued'>().notNull().default('draft'),
    passphraseHash: varchar({ length: 255 }),
    expiresAt: at(),
    revokedAt: at(),
    lastUsedAt: at(),
    uses: int().notNull().default(0),
    createdAt: at().notNull().defaultNow(),
  },
  (t) => [uniqueIndex('link_token').on(t.tokenHash), index('link_section').on(t.sectionId, t.createdAt)],
)
