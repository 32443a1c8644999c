import { index, mysqlTable, primaryKey, text, varchar } from 'drizzle-orm/mysql-core'
import { at, id, organization, user } from './auth'

/** A site is one job of a practice. */
export const site = mysqlTable(
  'site',
  {
    id: id().primaryKey(),
    practiceId: id()
      .notNull()
      .references(() => organization.id, { onDelete: 'cascade' }),
    name: varchar({ length: 200 }).notNull(),
    number: varchar({ length: 60 }).notNull().default(''),
    place: varchar({ length: 200 }).notNull().default(''),
    client: varchar({ length: 200 }).notNull().default(''),
    note: text(),
    /** Owns the site: may share it, make and revoke links. */
    ownerId: id()
      .notNull()
      .references(() => user.id),
    archivedAt: at(),
    createdAt: at().notNull().defaultNow(),
    updatedAt: at().notNull().defaultNow(),
  },
  (t) => [index('site_practice').on(t.practiceId, t.archivedAt, t.name)],
)

/** People outside the practice with whom one site is shared. */
export const siteShare = mysqlTable(
  'site_share',
  {
    siteId: id()
      .notNull()
      .references(() => site.id, { onDelete: 'cascade' }),
    userId: id()
      .notNull()
      .references(() => user.id, { onDelete: 'cascade' }),
    role: varchar({ length: 16 }).$type<'editor' | 'reader'>().notNull(),
    createdBy: id().notNull(),
    createdAt: at().notNull().defaultNow(),
  },
  (t) => [primaryKey({ columns: [t.siteId, t.userId] }), index('site_share_user').on(t.userId)],
)
