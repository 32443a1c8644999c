import { connect } from '../../drizzle/client'
import { MigrationError, migrate, reason } from '../../drizzle/migrate'
import { demoIsThere, loadDemo } from '../../drizzle/seed/once'

// Run by the starter before anything listens: migrates, and loads the demo once. Its last line on stderr is what the person
// at the terminal reads when it fails.

const { DATABASE_URL: url = '', DOAB_DEMO: demo = 'load', DOAB_OWN_DATABASE: own } = process.env

async function prepareDemo() {
  const { db, close } = connect(url, { connectionLimit: 4 })
  try {
    const there = await demoIsThere(db)
    if (demo === 'refuse' && there)
      throw new MigrationError(
        'This database holds the demo, whose passwords everybody knows. In production give Doab an empty database (DATABASE_URL).',
      )
    if (demo === 'refuse' || there) return
    process.stdout.write('seeding\n')
    await loadDemo(db)
  } finally {
    await close()
  }
}

async function main() {
  try {
    await migrate(url, { own: own === 'yes' })
  } catch (error) {
    if (error instanceof MigrationError) throw error
    const { host } = new URL(url)
    throw new MigrationError(`The database at ${host} cannot be reached: ${reason(error)}`)
  }
  await prepareDemo()
}

main().catch((error: unknown) => {
  if (error instanceof MigrationError) console.error(error.message)
  else console.error(`The demo could not be loaded: ${reason(error)}\n${error instanceof Error ? error.stack : ''}`)
  process.exitCode = 1
})
