import { mkdirSync } from 'node:fs'
import path from 'node:path'
import { fileURLToPath } from 'node:url'

/** The clone this file is in. */
export const ROOT = path.resolve(path.dirname(fileURLToPath(import.meta.url)), '../../..')

/**
 * Where this run keeps its data. DOAB_VAR names another folder, so that several servers of one clone run side by side.
 * @param {string} [folder]
 */
export function places(folder = process.env.DOAB_VAR || path.join(ROOT, 'var')) {
  const root = path.resolve(ROOT, folder)
  mkdirSync(root, { recursive: true })
  const at = (/** @type {string[]} */ ...parts) => path.join(root, ...parts)
  return {
    root,
    /** MariaDB's data. */
    data: at('db'),
    /** Port, socket, log and process number of the database. */
    run: at('run'),
    secrets: at('secrets.json'),
    lock: at('run', 'running.json'),
    log: at('log'),
  }
}

/** @typedef {ReturnType<typeof places>} Places */
