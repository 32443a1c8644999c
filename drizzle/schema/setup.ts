import { mysqlTable, varchar } from 'drizzle-orm/mysql-core'
import { at } from './auth'

/** What was set up once in this database ("demo"), so that no later start does it again. */
export const setup = mysqlTable('setup', {
  name: varchar({ length: 60 }).primaryKey(),
  at: at().notNull().defaultNow(),
})
