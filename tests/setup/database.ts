import { rmSync } from 'node:fs'
import path from 'node:path'
import { startMariadb } from '../../app/run/parts/mariadb.mjs'
import { migrate } from '../../drizzle/migrate'
import { temporaryFolder } from './temporary'

/**
 * Before the integration tests: a MariaDB of their own, on its own port and folder, migrated once; removed afterwards.
 * What the server's modules read from the environment is set here, so a test may import `~/server/…` directly.
 */
export default async function setup() {
  const folder = temporaryFolder('test')
  const database = await startMariadb({
    data: path.join(folder, 'db'),
    run: path.join(folder, 'run'),
    password: 'test-only',
    rootPassword: 'test-only-root',
    database: 'doab_test',
    every: true,
    // Nothing here outlives the run, so nothing waits for the disk.
    settings: ['--innodb-flush-log-at-trx-commit=0', '--skip-innodb-doublewrite', '--sync-frm=0'],
  })
  await migrate(database.url)
  Object.assign(process.env, {
    NODE_ENV: 'test',
    DATABASE_URL: database.url,
    AUTH_SECRET: 'the-auth-secret-of-the-tests-000000000000',
    LIVE_SECRET: 'the-live-secret-of-the-tests-000000000000',
    APP_URL: 'http://localhost:3000',
    DOAB_LOCAL: 'yes',
    LOG_LEVEL: 'silent',
  })
  return async () => {
    await database.stop()
    rmSync(folder, { recursive: true, force: true })
  }
}
