import { useSheetState } from '../../shell/use-sheet'
import { show, useUnits } from '../fields/quantities'
import { SourceNote } from '../fields/source-note'
import { VertexTable } from '../table/vertex-table'

/** Ground or base as a whole: its extent and its vertices. */
export function LineParticulars({ line }: { line: 'ground' | 'base' }) {
  const units = useUnits()
  const points = useSheetState((state) => state.live.section[line])
  const z = points.map(([, height]) => height)
  return (
    <div className="particulars">
      <p className="quiet">
        {points.length} vertices, {show(Math.min(...z), 'elevation', units, false)} to{' '}
        {show(Math.max(...z), 'elevation', units)}
      </p>
      <SourceNote path={line} label={line === 'ground' ? 'the ground line' : 'the base'} />
      <VertexTable line={line} />
    </div>
  )
}
