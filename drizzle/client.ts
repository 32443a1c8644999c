import { drizzle } from 'drizzle-orm/mysql2'
import mysql from 'mysql2/promise'
import * as schema from './schema'

/** A pool and its Drizzle database for one address. Times are UTC; bytes come as Buffers. */
export function connect(url: string, options: { connectionLimit?: number } = {}) {
  const pool = mysql.createPool({
    uri: url,
    timezone: 'Z',
    charset: 'utf8mb4',
    connectionLimit: options.connectionLimit ?? 10,
    enableKeepAlive: true,
  })
  const db = drizzle(pool, { schema, casing: 'snake_case', mode: 'default' })
  return { db, pool, close: () => pool.end() }
}

export type Connection = ReturnType<typeof connect>
export type Database = Connection['db']
export type Transaction = Parameters<Parameters<Database['transaction']>[0]>[0]
/** Where a query may run: the database itself or a transaction of it. */
export type Executor = Database | Transaction
