import mysql, { type RowDataPacket } from 'mysql2/promise'
import { connect } from '../../drizzle/client'
import { migrate } from '../../drizzle/migrate'

const url = () => {
  const given = process.env.DATABASE_URL
  if (!given)
    throw new Error(
      'No DATABASE_URL: run this file in the integration project (npx vitest run --project integration …).',
    )
  return given
}

/** Empties every table of the shared test database (not the notes of the migrations). For beforeAll or beforeEach. */
export async function cleanDatabase(): Promise<void> {
  const connection = await mysql.createConnection(url())
  try {
    const [tables] = await connection.query<RowDataPacket[]>(
      "select table_name as name from information_schema.tables where table_schema = database() and table_name <> '__drizzle_migrations'",
    )
    await connection.query('set foreign_key_checks = 0')
    // DELETE on a small table is many times faster than TRUNCATE, which makes the file anew.
    for (const { name } of tables) await connection.query('delete from ??', [name])
  } finally {
    await connection.end()
  }
}

/** A pool on the shared test database. Close it in afterAll. */
export const testConnection = (connectionLimit = 5) => connect(url(), { connectionLimit })

/** A database without any table beside the shared one. */
export async function emptyDatabase(): Promise<{ url: string; drop: () => Promise<void> }> {
  const name = `doab_test_${crypto.randomUUID().slice(0, 8)}`
  const run = async (sql: string) => {
    const connection = await mysql.createConnection(url())
    try {
      await connection.query(sql, [name])
    } finally {
      await connection.end()
    }
  }
  await run('create database ?? character set utf8mb4 collate utf8mb4_unicode_ci')
  const own = new URL(url())
  own.pathname = `/${name}`
  return { url: own.href, drop: () => run('drop database if exists ??') }
}

/** A migrated, empty database beside the shared one, for a test that needs one to itself (a server process, a restore). */
export async function ownDatabase(): Promise<{ url: string; drop: () => Promise<void> }> {
  const database = await emptyDatabase()
  await migrate(database.url)
  return database
}
