import type { ReactNode } from 'react'
import type { Divide, Solved, Unsolved } from '~/solver'
import { ShellSymbol } from '../shell/symbols'
import { useSheet, useSheetState } from '../shell/use-sheet'
import type { UnitSet } from '../state'
import { Box, Line } from './box'
import { show, useUnits } from './fields/quantities'
import { goTo } from './go-to'
import { nameOf } from './paths'

/** The answer in a few lines: how high, where it parts, how it was found and how good it is. */
export function Answer() {
  const solution = useSheetState((state) => state.solution)
  return solution.status === 'solved' ? <SolvedAnswer solution={solution} /> : <NoAnswer solution={solution} />
}

const stretch = (from: number, to: number, units: UnitSet) =>
  to - from < 1e-6
    ? show(from, 'distance', units)
    : `${show(from, 'distance', units, false)} to ${show(to, 'distance', units)}`

function SolvedAnswer({ solution }: { solution: Solved }) {
  const units = useUnits()
  const { highest, divides, seepage, dry, straight, error, method } = solution
  return (
    <Box title="Answer" remark={method.kind === 'exact' ? 'exact' : 'computed'}>
      <dl className="lines">
        <Line label="Highest water">
          <Place x={highest.x}>
            {show(highest.head, 'elevation', units)} at {stretch(highest.x, highest.to, units)}
          </Place>
        </Line>
        {divides.length === 0 ? <Line label="Divide">none in the strip</Line> : null}
        {divides.map((divide) => (
          <Line key={`${divide.kind}${divide.from}`} label={divideWord(divide)}>
            <Place x={divide.from}>{stretch(divide.from, divide.to, units)}</Place>
          </Line>
        ))}
        {seepage.map((reach) => (
          <Line key={reach.from} label="Seeps out" tone="bad">
            <Place x={reach.from}>
              {stretch(reach.from, reach.to, units)}, {show(reach.rate, 'flow', units)}
            </Place>
          </Line>
        ))}
        {dry.map((reach) => (
          <Line key={reach.from} label="Runs dry">
            <Place x={reach.from}>{stretch(reach.from, reach.to, units)}</Place>
          </Line>
        ))}
        <Line label="Straight line off by">
          <Place x={straight.at}>
            {show(Math.abs(straight.worst), 'length', units)} at {show(straight.at, 'distance', units)}
          </Place>
        </Line>
        <Line label="Own error">{ownError(error.head, units)}</Line>
      </dl>
      <p className="quiet method">
        {capital(method.reason)}
        {method.kind === 'general' ? ` (${error.nodes} nodes)` : ''}.
      </p>
    </Box>
  )
}

function Place({ x, children }: { x: number; children: ReactNode }) {
  const sheet = useSheet()
  return (
    <button type="button" className="plain-link" onClick={() => goTo(sheet, { place: { x } })}>
      {children}
    </button>
  )
}

/** Below a tenth of a millimetre a figure would only pretend to mean something. */
function ownError(head: number, units: UnitSet): string {
  if (head === 0) return 'round-off only'
  return head < 1e-4 ? `under ${show(1e-4, 'small-length', units)}` : `± ${show(head, 'small-length', units)}`
}

const divideWord = ({ kind }: Divide) => (kind === 'divide' ? 'Divide' : 'Trough')
const capital = (text: string) => text.charAt(0).toUpperCase() + text.slice(1).replace(/\.$/, '')

function NoAnswer({ solution }: { solution: Unsolved }) {
  const sheet = useSheet()
  const units = useUnits()
  const section = useSheetState((state) => state.live.section)
  return (
    <Box title="No answer yet">
      <div className="no-answer">
        <ShellSymbol name="caution" />
        <div>
          {solution.reason.map((reason) => (
            <p key={reason.path + reason.message}>
              <button type="button" className="plain-link" onClick={() => goTo(sheet, reason)}>
                {reason.message}
              </button>
            </p>
          ))}
          <p className="mend">{solution.mend}</p>
          {solution.canGive ? (
            <p>
              The most the strip can give to {nameOf(section, solution.canGive.of)} is{' '}
              {show(solution.canGive.rate, 'flow', units)}.
            </p>
          ) : null}
        </div>
      </div>
    </Box>
  )
}
