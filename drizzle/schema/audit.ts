import { bigint, index, json, mysqlTable, varchar } from 'drizzle-orm/mysql-core'
import { at, id } from './auth'

/** Who did what, when, from where. Written in the same transaction as the deed; the product never changes a row. */
export const audit = mysqlTable(
  'audit',
  {
    id: bigint({ mode: 'number' }).primaryKey().autoincrement(),
    practiceId: id().notNull(),
    actorId: id(),
    actorName: varchar({ length: 255 }).notNull(),
    act: varchar({ length: 60 }).notNull(),
    /** "site:<id>", "section:<id>", "link:<id>", "member:<id>". */
    on: varchar({ length: 80 }).notNull(),
    label: varchar({ length: 255 }).notNull().default(''),
    details: json(),
    address: varchar({ length: 64 }),
    at: at().notNull().defaultNow(),
  },
  (t) => [index('audit_practice').on(t.practiceId, t.at), index('audit_actor').on(t.practiceId, t.actorId, t.at)],
)
