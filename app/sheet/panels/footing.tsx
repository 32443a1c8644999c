import type { FootingLine } from '~/solver'
import { useSheet, useSheetState } from '../shell/use-sheet'
import { Box, VerdictMark } from './box'
import { plain } from './fields/quantities'
import { goTo } from './go-to'

const ORDER = { fails: 0, doubtful: 1, holds: 2 }

/** Which assumptions the answer stands on, and how firmly: what does not hold comes first. */
export function Footing() {
  const lines = useSheetState((state) => state.footing)
  if (lines.length === 0) return null
  const sorted = [...lines].sort((a, b) => ORDER[a.verdict] - ORDER[b.verdict])
  const firm = lines.filter(({ verdict }) => verdict === 'holds').length
  return (
    <Box title="Footing" remark={`${firm} of ${lines.length} hold`}>
      <ul className="footing">
        {sorted.map((line) => (
          <FootingRow key={line.key} line={line} />
        ))}
      </ul>
    </Box>
  )
}

function FootingRow({ line }: { line: FootingLine }) {
  const sheet = useSheet()
  return (
    <li>
      <details>
        <summary>
          <VerdictMark verdict={line.verdict} />
          <span className="assumes">{line.assumes}</span>
          <span className="number">{figure(line)}</span>
        </summary>
        <p>{line.says}</p>
        <p className="quiet">
          {line.bound === null ? '' : `Bound ${withUnit(line.bound, line.unit)}. `}
          {line.source}
        </p>
        {line.place ? (
          <button type="button" className="link-button" onClick={() => goTo(sheet, { place: line.place })}>
            show where
          </button>
        ) : null}
      </details>
    </li>
  )
}

const withUnit = (value: number, unit: string) => `${plain(value)}${unit ? ` ${unit}` : ''}`
const figure = ({ value, unit }: FootingLine) => (value === null ? '' : withUnit(value, unit))
