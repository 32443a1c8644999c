import { cpSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import path from 'node:path'
import mysql, { type RowDataPacket } from 'mysql2/promise'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { connect } from '../../drizzle/client'
import { MigrationError, migrate } from '../../drizzle/migrate'
import { organization, setup } from '../../drizzle/schema'
import { demoIsThere, loadDemo } from '../../drizzle/seed/once'
import { emptyDatabase } from '../setup/clean'
import { temporaryFolder } from '../setup/temporary'

let database: Awaited<ReturnType<typeof emptyDatabase>>
beforeEach(async () => {
  database = await emptyDatabase()
})
afterEach(() => database.drop())

async function ask(sql: string) {
  const connection = await mysql.createConnection(database.url)
  try {
    const [rows] = await connection.query<RowDataPacket[]>(sql)
    return rows
  } finally {
    await connection.end()
  }
}

describe('migrating', () => {
  it('is safe when several servers start at the same moment, and does nothing the second time', async () => {
    await Promise.all([1, 2, 3, 4].map(() => migrate(database.url)))
    const done = await ask('select hash from __drizzle_migrations')
    expect(new Set(done.map((row) => row.hash)).size).toBe(done.length)
    await migrate(database.url)
    expect(await ask('select hash from __drizzle_migrations')).toHaveLength(done.length)
  })

  it('begins anew where a first migration was killed half-way, but only in a database of its own', async () => {
    await ask('create table user (id varchar(36) primary key)')
    await expect(migrate(database.url)).rejects.toThrow(/1 tables that are not from Doab \(user/)
    expect(await ask("show tables like 'user'")).toHaveLength(1)
    await migrate(database.url, { own: true })
    expect(await ask("show columns from user like 'email'")).toHaveLength(1)
  })

  it('says in one sentence what the server refused', async () => {
    const folder = temporaryFolder('migrations')
    cpSync('drizzle/migrations', folder, { recursive: true })
    const journalFile = path.join(folder, 'meta/_journal.json')
    const journal = JSON.parse(readFileSync(journalFile, 'utf8'))
    journal.entries.push({ idx: 99, version: '5', when: Date.now() + 1e9, tag: '0099_bad', breakpoints: true })
    writeFileSync(journalFile, JSON.stringify(journal))
    writeFileSync(path.join(folder, '0099_bad.sql'), 'alter table weir add crest int')
    try {
      const failed = migrate(database.url, { folder })
      await expect(failed).rejects.toBeInstanceOf(MigrationError)
      await expect(failed).rejects.toThrow(/^A migration of the database failed: Table '.*weir' doesn't exist$/)
    } finally {
      rmSync(folder, { recursive: true, force: true })
    }
  })
})

describe('the demo', () => {
  it('is loaded once, whole or not at all', async () => {
    await migrate(database.url)
    const { db, close } = connect(database.url, { connectionLimit: 2 })
    try {
      expect(await demoIsThere(db)).toBe(false)
      await loadDemo(db)
      expect(await demoIsThere(db)).toBe(true)
      const practices = await db.select().from(organization)
      expect(practices.length).toBeGreaterThan(0)
      await expect(loadDemo(db)).rejects.toThrow()
      expect(await db.select().from(organization)).toHaveLength(practices.length)
      expect(await db.select().from(setup)).toHaveLength(1)
    } finally {
      await close()
    }
  })
})
