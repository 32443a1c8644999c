import { rmSync } from 'node:fs'

/** The data folder of the run. The server may still be letting go of it: it goes once the process that holds it is gone. */
export default function teardown() {
  const folder = process.env.DOAB_E2E_VAR
  if (folder) process.once('exit', () => rmSync(folder, { recursive: true, force: true }))
}
