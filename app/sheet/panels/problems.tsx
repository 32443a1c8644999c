import { useSheet, useSheetState } from '../shell/use-sheet'
import { Box } from './box'
import { goTo } from './go-to'
import { nameOf, pickFor } from './paths'

/** What is missing or contradictory in the drawing, where, and how to mend it. */
export function Problems() {
  const sheet = useSheet()
  const problems = useSheetState((state) => state.problems)
  const live = useSheetState((state) => state.live)
  if (problems.length === 0) return null
  return (
    <Box title="To look at" remark={`${problems.length}`}>
      <ol className="problems">
        {problems.map((problem) => {
          const pick = pickFor(problem.path, live)
          return (
            <li key={problem.path + problem.message}>
              <button type="button" className="problem" onClick={() => goTo(sheet, problem)}>
                {pick ? <strong>{nameOf(live.section, pick)}</strong> : null}
                <span>{problem.message}</span>
              </button>
            </li>
          )
        })}
      </ol>
    </Box>
  )
}
