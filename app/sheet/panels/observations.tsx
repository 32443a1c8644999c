import { useSheet, useSheetState } from '../shell/use-sheet'
import { Box } from './box'
import { show, useUnits } from './fields/quantities'
import { goTo } from './go-to'

/** Observed heads beside the computed ones. */
export function Observations() {
  const sheet = useSheet()
  const units = useUnits()
  const solution = useSheetState((state) => state.solution)
  if (solution.status !== 'solved' || solution.misfits.length === 0) return null
  const { misfits } = solution
  const rms = Math.sqrt(misfits.reduce((sum, { residual }) => sum + residual * residual, 0) / misfits.length)
  return (
    <Box title="Observed" remark={`r.m.s. ${show(rms, 'length', units)}`}>
      <table className="figures">
        <caption className="sr-only">Observed and computed heads</caption>
        <thead>
          <tr>
            <th scope="col">At</th>
            <th scope="col">observed</th>
            <th scope="col">computed</th>
            <th scope="col">higher by</th>
          </tr>
        </thead>
        <tbody>
          {misfits.map((one) => (
            <tr key={one.id}>
              <th scope="row">
                <button
                  type="button"
                  className="plain-link"
                  onClick={() => goTo(sheet, { path: `observations.${one.id}`, place: { x: one.x } })}
                >
                  {one.name}
                </button>
              </th>
              <td>{show(one.observed, 'elevation', units, false)}</td>
              <td>{show(one.computed, 'elevation', units, false)}</td>
              <td data-tone={one.sd !== null && Math.abs(one.residual) > 2 * one.sd ? 'bad' : undefined}>
                {show.signed(one.computed - one.observed, 'length', units)}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
    </Box>
  )
}
