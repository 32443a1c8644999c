import { connect, createServer } from 'node:net'
import { Failure } from './say.mjs'

/**
 * Whether something answers on a port of this machine.
 * @param {number} port
 * @returns {Promise<boolean>}
 */
export function answers(port, host = '127.0.0.1') {
  return new Promise((resolve) => {
    const socket = connect({ port, host })
    const done = (/** @type {boolean} */ yes) => {
      socket.destroy()
      resolve(yes)
    }
    socket.setTimeout(1000, () => done(false))
    socket.once('connect', () => done(true))
    socket.once('error', () => done(false))
  })
}

/**
 * Whether a port can be listened on, on this host (undefined: every address).
 * @param {number} port @param {string} [host]
 * @returns {Promise<boolean>}
 */
export function isFree(port, host) {
  return new Promise((resolve, reject) => {
    const server = createServer()
    server.once('error', (/** @type {NodeJS.ErrnoException} */ error) => {
      if (error.code === 'EADDRINUSE' || error.code === 'EACCES') resolve(false)
      else reject(error)
    })
    server.listen({ port, host }, () => server.close(() => resolve(true)))
  })
}

/** A port nobody uses on 127.0.0.1. @returns {Promise<number>} */
export function freePort() {
  return new Promise((resolve, reject) => {
    const server = createServer()
    server.once('error', reject)
    server.listen(0, '127.0.0.1', () => {
      const address = server.address()
      const port = typeof address === 'object' && address ? address.port : 0
      server.close(() => resolve(port))
    })
  })
}

/**
 * Reads a port from a setting.
 * @param {string} name @param {number} fallback
 */
export function portSetting(name, fallback) {
  const text = process.env[name]
  if (!text) return fallback
  const port = Number(text)
  if (!Number.isInteger(port) || port < 1 || port > 65535)
    throw new Failure(`${name} is "${text}"; it must be a port number from 1 to 65535.`)
  return port
}

/**
 * Stops with one clear line when a port is taken.
 * @param {string} name the setting that changes it @param {number} port @param {string} what
 */
export async function mustBeFree(name, port, what) {
  const free = (await isFree(port)) && !(await answers(port))
  if (!free)
    throw new Failure(
      `Port ${port} for ${what} is taken by another program. Stop that program, or choose another port: ${name}=${port + 10} npm start`,
    )
}
