import { published } from './all'
import { caseTitle } from './types'

/** `npm run checks`: one table of ours against theirs. Ends with 1 when a value is off by more than its tolerance. */
const figure = (value: number) => String(Number(value.toPrecision(8)))
const rows = published.flatMap((example) =>
  example.compare().map((row, i) => ({
    case: i === 0 ? caseTitle(example) : '',
    quantity: `${row.name}, ${row.unit}`,
    theirs: figure(row.theirs),
    ours: figure(row.ours),
    within: figure(row.tolerance),
    agrees: Math.abs(row.ours - row.theirs) <= row.tolerance * (1 + 1e-9) ? 'yes' : 'NO',
  })),
)
const heads = ['case', 'quantity', 'theirs', 'ours', 'within', 'agrees'] as const
const widths = heads.map((head) => Math.max(head.length, ...rows.map((row) => row[head].length)))
const line = (cells: readonly string[]) =>
  cells
    .map((cell, i) => cell.padEnd(widths[i] ?? 0))
    .join('  ')
    .trimEnd()
console.log(line(heads))
console.log(widths.map((width) => '-'.repeat(width)).join('  '))
for (const row of rows) console.log(line(heads.map((head) => row[head])))
console.log('\nSources')
for (const { id, source, kind, fromMemory } of published) {
  console.log(`${id}  ${source} (${kind}${fromMemory ? '; value from memory' : ''})`)
}
const off = rows.filter(({ agrees }) => agrees === 'NO').length
console.log(`\n${rows.length} values of ${published.length} cases, ${off === 0 ? 'all agree' : `${off} off`}`)
if (off > 0) process.exitCode = 1
