import { useSheet, useSheetState } from '../shell/use-sheet'
import { Box, VerdictMark } from './box'
import { show, useUnits } from './fields/quantities'
import { goTo } from './go-to'

/** Every limit with the room left under it. People and property stand on these, so the caution stands beside the number. */
export function Limits() {
  const sheet = useSheet()
  const units = useUnits()
  const solution = useSheetState((state) => state.solution)
  if (solution.status !== 'solved' || solution.limits.length === 0) return null
  const broken = solution.limits.filter(({ holds }) => !holds).length
  return (
    <Box title="Limits" remark={broken === 0 ? 'all hold' : `${broken} broken`}>
      <ul className="verdicts">
        {solution.limits.map((limit) => (
          <li key={limit.id}>
            <VerdictMark verdict={limit.holds ? 'holds' : 'fails'} word={limit.holds ? 'holds' : 'broken'} />
            <button
              type="button"
              className="plain-link"
              onClick={() => goTo(sheet, { path: `limits.${limit.id}`, place: { x: limit.at } })}
            >
              {limit.name}
            </button>
            <span className="number" data-tone={limit.holds ? undefined : 'bad'}>
              {limit.holds
                ? `${show(limit.margin, 'length', units)} to spare`
                : `${show(-limit.margin, 'length', units)} too high`}
            </span>
            <small className="at">tightest at {show(limit.at, 'distance', units)}, clearance counted</small>
          </li>
        ))}
      </ul>
      <p className="caution-line">
        Screening only. Before anybody lives, digs or builds by this margin: site investigation, the local code, and a
        licensed professional.
      </p>
    </Box>
  )
}
