import { useSheet, useSheetState } from '../../shell/use-sheet'
import { useCaseValue } from '../fields/in-case'
import { MaterialChoice } from '../fields/material-choice'
import { show, useUnits } from '../fields/quantities'
import { TextField } from '../fields/text-field'

/** What holds for the whole section. */
export function SectionParticulars() {
  const sheet = useSheet()
  const units = useUnits()
  const may = useSheetState((state) => state.may)
  const section = useSheetState((state) => state.live.section)
  const seepage = useCaseValue('surfaceSeepage').value === true
  const read = may === 'read'
  const set = (path: string, value: unknown) => sheet.edit([{ do: 'set', path, value }])
  return (
    <div className="particulars">
      <TextField label="Title" value={section.title} disabled={read} onCommit={(text) => text && set('title', text)} />
      <TextField label="Datum" value={section.datum} disabled={read} onCommit={(text) => set('datum', text)} />
      <MaterialChoice path="host" label="The ground is" />
      <label className="check">
        <input
          type="checkbox"
          checked={seepage}
          disabled={read}
          onChange={(event) => set('surfaceSeepage', event.target.checked)}
        />
        Water seeps out where it would rise above the ground
      </label>
      <p className="quiet">
        {show(section.right.x - section.left.x, 'distance', units)} between the banks.
        {read ? '' : ' Pick anything on the drawing to see and type its values.'}
      </p>
      {read && !section.note ? null : (
        <TextField
          label="Note"
          value={section.note ?? ''}
          disabled={read}
          maxLength={500}
          onCommit={(text) => set('note', text || undefined)}
        />
      )}
    </div>
  )
}
