import { spawn } from 'node:child_process'
import { openSync, rmSync, writeFileSync } from 'node:fs'

// Stands between the starter and MariaDB, in a process group of its own so that Ctrl-C reaches the starter alone. Stops the
// database cleanly when told to, and also when the starter is gone, however it went (its end of our stdin closes).
// argv: file for the process number, file for the output, file to remove once the database is up or over, then the command.
const [pidFile = '', logFile = '', secretFile = '', file = '', ...args] = process.argv.slice(2)
const out = openSync(logFile, 'a')
const database = spawn(file, args, { stdio: ['ignore', out, out] })
if (database.pid) writeFileSync(pidFile, String(database.pid))

const stop = () => database.kill('SIGTERM')
process.stdin.on('data', (text) => {
  if (text.toString().includes('up')) rmSync(secretFile, { force: true })
})
process.stdin.once('end', stop)
process.stdin.once('error', stop)
for (const signal of /** @type {const} */ (['SIGINT', 'SIGTERM', 'SIGHUP'])) process.on(signal, stop)

database.once('error', () => process.exit(1))
database.once('exit', (code, signal) => {
  rmSync(pidFile, { force: true })
  rmSync(secretFile, { force: true })
  process.exit(signal ? 1 : (code ?? 1))
})
