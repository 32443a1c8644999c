/** A failure with words for the person at the terminal: shown alone, without a stack. */
export class Failure extends Error {}

const colour = process.stdout.isTTY && !process.env.NO_COLOR
/** @param {string} code @param {string} text */
const paint = (code, text) => (colour ? `\u001b[${code}m${text}\u001b[0m` : text)

export const bold = (/** @type {string} */ text) => paint('1', text)
export const dim = (/** @type {string} */ text) => paint('2', text)

/** @param {string} text */
export function say(text) {
  process.stdout.write(`${paint('36', 'doab')}  ${text}\n`)
}

/** @param {string} text */
export function complain(text) {
  process.stderr.write(`${paint('31', 'doab')}  ${text}\n`)
}

/**
 * Runs a whole command: a Failure becomes one clear error and exit code 1, anything else (our own mistake) shows its stack.
 * @param {() => Promise<number | undefined>} work gives the exit code
 */
export async function command(work) {
  try {
    process.exitCode = (await work()) ?? 0
  } catch (error) {
    if (error instanceof Failure) complain(error.message)
    else console.error(error)
    process.exitCode = 1
  }
  // A watcher may still be listening.
  process.exit()
}
