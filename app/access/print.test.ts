import { readFileSync, writeFileSync } from 'node:fs'
import { expect, it } from 'vitest'
import { tableAsMarkdown } from './print'

const FILE = new URL('../../DEVELOPERS.md', import.meta.url)
const BLOCK =
  /(<!-- permissions: printed from app\/access, run with DOAB_UPDATE=1 to renew -->\n)[\s\S]*?(\n<!-- end -->)/

it('prints the permission table of the code in DEVELOPERS.md', () => {
  const text = readFileSync(FILE, 'utf8')
  if (process.env.DOAB_UPDATE) writeFileSync(FILE, text.replace(BLOCK, `$1${tableAsMarkdown()}$2`))
  const printed = BLOCK.exec(readFileSync(FILE, 'utf8'))?.[0] ?? ''
  expect(printed).toContain(tableAsMarkdown())
})
