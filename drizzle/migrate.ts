import path from 'node:path'
import { drizzle } from 'drizzle-orm/mysql2'
import { migrate as apply } from 'drizzle-orm/mysql2/migrator'
import mysql, { type RowDataPacket } from 'mysql2/promise'

export class MigrationError extends Error {}

export type MigrateOptions = {
  /** Folder of the generated migrations; default: drizzle/migrations under the working folder. */
  folder?: string
  /** The database is ours alone (under var/): what a first migration that was killed half-way left behind is removed. */
  own?: boolean
}

const LOCK = 'doab-migrate'

/**
 * Brings a database to the present schema. One connection does it under a server-wide lock, because MariaDB's DDL knows no
 * transactions and two servers may start at once. Throws MigrationError with a sentence for the person at the terminal.
 */
export async function migrate(url: string, { folder = 'drizzle/migrations', own = false }: MigrateOptions = {}) {
  const connection = await mysql.createConnection({ uri: url, timezone: 'Z', charset: 'utf8mb4' })
  try {
    const [locked] = await connection.query<RowDataPacket[]>('select get_lock(?, 60) as got', [LOCK])
    if (locked[0]?.got !== 1)
      throw new MigrationError(
        'Another process has been migrating this database for a minute. Start again when it is done.',
      )
    await clearHalfMade(connection, own)
    try {
      await apply(drizzle(connection), { migrationsFolder: path.resolve(folder) })
    } catch (error) {
      throw new MigrationError(`A migration of the database failed: ${reason(error)}`)
    }
  } finally {
    // Closing the connection frees the lock.
    await connection.end()
  }
}

async function clearHalfMade(connection: mysql.Connection, own: boolean) {
  const [tables] = await connection.query<RowDataPacket[]>(
    'select table_name as name from information_schema.tables where table_schema = database()',
  )
  const names = tables.map((row) => String(row.name))
  if (names.includes('__drizzle_migrations')) {
    const [done] = await connection.query<RowDataPacket[]>('select count(*) as n from __drizzle_migrations')
    if (done[0]?.n > 0) return
  }
  const strange = names.filter((name) => name !== '__drizzle_migrations')
  if (strange.length === 0) return
  if (!own)
    throw new MigrationError(
      `The database holds ${strange.length} tables that are not from Doab (${strange.slice(0, 3).join(', ')} …). Give Doab an empty database of its own.`,
    )
  await connection.query('set foreign_key_checks = 0')
  for (const name of strange) await connection.query('drop table ??', [name])
  await connection.query('set foreign_key_checks = 1')
}

/** The innermost message: drizzle wraps the server's words in the whole query. */
export function reason(error: unknown): string {
  let inner = error
  while (inner instanceof Error && inner.cause instanceof Error) inner = inner.cause
  if (!(inner instanceof Error)) return String(inner)
  const code = 'code' in inner && typeof inner.code === 'string' ? inner.code : ''
  // A refused connection on several addresses comes as an AggregateError without words.
  return inner.message || code || inner.name
}
