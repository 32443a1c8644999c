import { index, int, mediumtext, mysqlTable, text, varchar } from 'drizzle-orm/mysql-core'
import { at, id } from './auth'

/** Mail on its way out. Without SMTP settings the local fake marks it "caught" and /mailbox shows it. */
export const outbox = mysqlTable(
  'outbox',
  {
    id: id().primaryKey(),
    kind: varchar({ length: 40 }).notNull(),
    to: varchar({ length: 255 }).notNull(),
    subject: varchar({ length: 255 }).notNull(),
    text: mediumtext().notNull(),
    html: mediumtext().notNull(),
    state: varchar({ length: 16 })
      .$type<'waiting' | 'sending' | 'sent' | 'caught' | 'failed'>()
      .notNull()
      .default('waiting'),
    tries: int().notNull().default(0),
    nextTryAt: at().notNull().defaultNow(),
    error: text(),
    sentAt: at(),
    createdAt: at().notNull().defaultNow(),
  },
  (t) => [index('outbox_due').on(t.state, t.nextTryAt), index('outbox_created').on(t.createdAt)],
)
