import { randomBytes } from 'node:crypto'
import { existsSync, readFileSync, renameSync, writeFileSync } from 'node:fs'
import { Failure } from './say.mjs'

const make = () => randomBytes(32).toString('base64url')
const NAMES = /** @type {const} */ (['auth', 'live', 'database', 'databaseRoot'])

/** @typedef {Record<typeof NAMES[number], string>} Secrets */

/**
 * The secrets of this folder, made on the first start and readable by nobody else.
 * @param {string} file
 * @returns {Secrets}
 */
export function readSecrets(file) {
  /** @type {Partial<Secrets>} */
  let kept = {}
  if (existsSync(file)) {
    try {
      kept = JSON.parse(readFileSync(file, 'utf8'))
    } catch {
      throw new Failure(
        `${file} cannot be read as JSON. Mend it or put back a copy; deleting it locks the database out.`,
      )
    }
  }
  const secrets = /** @type {Secrets} */ ({})
  for (const name of NAMES) secrets[name] = kept[name] ?? make()
  if (NAMES.some((name) => kept[name] === undefined)) {
    // Written aside and renamed: a start killed half-way must not leave half a file.
    writeFileSync(`${file}.new`, `${JSON.stringify(secrets, null, 2)}\n`, { mode: 0o600 })
    renameSync(`${file}.new`, file)
  }
  return secrets
}
