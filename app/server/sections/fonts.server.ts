import { readFile } from 'node:fs/promises'
import { createRequire } from 'node:module'
import { log } from '../log.server'

export type Fonts = { regular: Uint8Array; semibold: Uint8Array }

let kept: Promise<Fonts | null> | undefined

/** Work Sans for exported sheets, read once. null when the files are not there: the sheet then only names the family. */
export function fonts(): Promise<Fonts | null> {
  kept ??= read().catch((error: unknown) => {
    log.warn({ err: error }, 'the font for exported sheets cannot be read')
    return null
  })
  return kept
}

async function read(): Promise<Fonts> {
  const require = createRequire(import.meta.url)
  const file = (weight: number) =>
    readFile(require.resolve(`@fontsource/work-sans/files/work-sans-latin-${weight}-normal.woff2`))
  const [regular, semibold] = await Promise.all([file(400), file(600)])
  return { regular, semibold }
}
