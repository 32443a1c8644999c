import { travelTime } from '~/solver'
import { sameMembers, useSheet, useSheetState } from '../shell/use-sheet'
import type { SheetState } from '../state'
import { Box, Line } from './box'
import { show, showTime, useUnits } from './fields/quantities'
import { readingOf } from './reading-of'

/** The numbers at the reading line; where there is none, at the highest point of the water table. */
export function Readings() {
  const sheet = useSheet()
  const units = useUnits()
  const solution = useSheetState((state) => state.solution)
  const reading = useSheetState(readingPart, sameMembers)
  if (solution.status !== 'solved' || !reading.read) return null
  const { read, own } = reading
  const time = travelTime(solution, read.x)
  const sides = read.left && read.right ? { left: read.left, right: read.right } : null
  const off = read.head - read.straight
  return (
    <Box
      title={own ? `Readings at ${show(read.x, 'distance', units)}` : 'Readings at the highest point'}
      remark={
        own ? (
          <button type="button" className="link-button" onClick={() => sheet.set({ reading: null })}>
            let go
          </button>
        ) : (
          show(read.x, 'distance', units)
        )
      }
    >
      <dl className="lines">
        <Line label="Water table">
          {sides && Math.abs(sides.left.head - sides.right.head) > 1e-6
            ? `${show(sides.left.head, 'elevation', units)} | ${show(sides.right.head, 'elevation', units)}`
            : show(read.head, 'elevation', units)}
        </Line>
        <Line label="Depth below ground" tone={read.depth < 0 ? 'bad' : undefined}>
          {show(read.depth, 'length', units)}
        </Line>
        <Line label="Discharge">
          {sides
            ? `${flowWords(sides.left.flow, units)} | ${flowWords(sides.right.flow, units)}`
            : flowWords(read.flow, units)}
        </Line>
        <Line label="Saturated thickness">{show(read.saturated, 'length', units)}</Line>
        <Line label="Straight line is off by">{show(off, 'length', units)}</Line>
        <Line label={time.exit ? `Travel time to ${exitWords(time.exit, sheet.get())}` : 'Travel time out'}>
          {time.days === null ? <span className="why">{time.why ?? 'never leaves'}</span> : showTime(time.days)}
        </Line>
      </dl>
    </Box>
  )
}

const readingPart = (state: SheetState) => ({ read: readingOf(state), own: state.read !== null })

/** Amount and direction: a sign alone is read wrongly in a meeting. */
export function flowWords(flow: number, units: SheetState['units']): string {
  if (Math.abs(flow) < 1e-9) return show(0, 'flow', units)
  return `${show(Math.abs(flow), 'flow', units)} ${flow > 0 ? 'to the right' : 'to the left'}`
}

function exitWords(exit: string, { live: { section } }: SheetState): string {
  if (exit === 'left' || exit === 'right') return section[exit].name ?? `the ${exit} bank`
  const id = exit.replace(/^features\./, '')
  return section.features.find((feature) => feature.id === id)?.name ?? exit
}
