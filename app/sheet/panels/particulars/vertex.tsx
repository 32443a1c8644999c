import type { LineId } from '~/live'
import type { Point } from '~/section'
import { useSheet, useSheetState } from '../../shell/use-sheet'
import { useUnits } from '../fields/quantities'
import { QuantityField } from '../fields/quantity-field'
import { freshKey } from '../ids'
import { lineIn } from '../lines'
import { outOfOrder } from '../table/vertex-table'
import { Deeds } from './deeds'

/** One vertex: where it stands, typed exactly. */
export function VertexParticulars({ line, vertex }: { line: LineId; vertex: string }) {
  const sheet = useSheet()
  const units = useUnits()
  const may = useSheetState((state) => state.may)
  const live = useSheetState((state) => state.live)
  const { points, keys } = lineIn(live, line)
  const at = keys.indexOf(vertex)
  const point = points[at]
  if (!point) return <p className="quiet">It is no longer there.</p>
  const move = (to: Point) =>
    sheet.edit([{ do: 'move-vertex', line, key: vertex, to }]) ? null : 'This section may only be read.'
  const outline = line.startsWith('bodies.')
  const end = !outline && (at === 0 || at === points.length - 1)
  const insert = () => {
    const next = points[(at + 1) % points.length] ?? points[at - 1]
    if (!next) return
    const key = freshKey()
    const middle: Point = [(point[0] + next[0]) / 2, (point[1] + next[1]) / 2]
    if (sheet.edit([{ do: 'insert-vertex', line, key, at: middle, after: vertex }]))
      sheet.set({ picked: [`${line}.v:${key}`] })
  }
  return (
    <div className="particulars">
      <p className="quiet">
        {at + 1} of {points.length}
      </p>
      <QuantityField
        label="Distance"
        kind="distance"
        units={units}
        value={point[0]}
        disabled={may === 'read' || end}
        hint={end ? 'An end of the line stands at the bank; move the bank.' : undefined}
        refuse={(x) => outOfOrder(points, at, x, outline)}
        onCommit={(x) => (x === null ? null : move([x, point[1]]))}
      />
      <QuantityField
        label="Elevation"
        kind="elevation"
        units={units}
        value={point[1]}
        disabled={may === 'read'}
        onCommit={(z) => (z === null ? null : move([point[0], z]))}
      />
      {may === 'write' ? (
        <div className="buttons">
          <button
            type="button"
            className="button small"
            onClick={insert}
            disabled={!outline && at === points.length - 1}
          >
            Add one after it
          </button>
        </div>
      ) : null}
      <Deeds path={`${line}.v:${vertex}`} />
    </div>
  )
}
