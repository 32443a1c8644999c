import { existsSync, mkdtempSync, readdirSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import path from 'node:path'

/**
 * A temporary folder that carries the number of the process it belongs to. Those of processes that are gone (a run that was
 * killed could not remove its own) are removed on the way.
 */
export function temporaryFolder(kind: string): string {
  const start = `doab-${kind}-`
  for (const name of readdirSync(tmpdir())) {
    const pid = name.startsWith(start) ? /^\d+/.exec(name.slice(start.length))?.[0] : undefined
    if (pid && !existsSync(`/proc/${pid}`)) rmSync(path.join(tmpdir(), name), { recursive: true, force: true })
  }
  return mkdtempSync(path.join(tmpdir(), `${start}${process.pid}-`))
}
