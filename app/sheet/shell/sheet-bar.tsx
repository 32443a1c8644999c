import { IconButton } from './icon-button'
import { PenChoices } from './pen-choices'
import { MARKING_TOOLS } from './tools'
import { useSheet, useSheetState } from './use-sheet'
import { ViewButtons } from './view-buttons'

export type Showing = 'drawing' | 'table'

/** The slim bar on top of the drawing: drawing or table, steps back and forth, what is shown, how it is seen. */
export function SheetBar({ showing, onShow }: { showing: Showing; onShow: (next: Showing) => void }) {
  const sheet = useSheet()
  const may = useSheetState((state) => state.may)
  const canUndo = useSheetState((state) => state.canUndo)
  const canRedo = useSheetState((state) => state.canRedo)
  const marking = useSheetState((state) => MARKING_TOOLS.has(state.tool))
  return (
    <div className="sheet-bar">
      <fieldset className="choice" aria-label="Show the section as">
        <button type="button" aria-pressed={showing === 'drawing'} onClick={() => onShow('drawing')}>
          Drawing
        </button>
        <button type="button" aria-pressed={showing === 'table'} onClick={() => onShow('table')}>
          Table
        </button>
      </fieldset>
      {may === 'write' ? (
        <fieldset className="bar-group" aria-label="Steps">
          <IconButton name="undo" label="Undo my last step (Ctrl Z)" disabled={!canUndo} onPress={() => sheet.undo()} />
          <IconButton name="redo" label="Redo (Ctrl Shift Z)" disabled={!canRedo} onPress={() => sheet.redo()} />
        </fieldset>
      ) : null}
      <StatusLine />
      {may === 'write' && marking ? <PenChoices /> : null}
      {showing === 'drawing' ? (
        <>
          <Toggles />
          <ViewButtons />
        </>
      ) : null}
    </div>
  )
}

/** What the tool asks for, or what was just done. */
function StatusLine() {
  const hint = useSheetState((state) => state.hint ?? null)
  const says = useSheetState((state) => state.says ?? null)
  return (
    <p className="status-line" data-tone={says?.tone} role="status">
      {says?.text ?? hint ?? ''}
    </p>
  )
}

const TOGGLES = [
  ['snap', 'snap', 'Snap to grid and vertices'],
  ['grid', 'grid', 'Grid'],
  ['showArrows', 'arrows', 'Flow arrows'],
  ['showFlowLines', 'lines', 'Flow lines'],
  ['showMarkup', 'markup', 'Mark-up'],
] as const

function Toggles() {
  const sheet = useSheet()
  const on = {
    snap: useSheetState((state) => state.snap),
    grid: useSheetState((state) => state.grid),
    showArrows: useSheetState((state) => state.showArrows),
    showFlowLines: useSheetState((state) => state.showFlowLines),
    showMarkup: useSheetState((state) => state.showMarkup),
  }
  const may = useSheetState((state) => state.may)
  return (
    <fieldset className="bar-group toggles" aria-label="Shown on the drawing">
      {TOGGLES.filter(([key]) => key !== 'snap' || may === 'write').map(([key, name, label]) => (
        <IconButton
          key={key}
          name={name}
          label={label}
          pressed={on[key]}
          onPress={() => sheet.set({ [key]: !on[key] })}
        />
      ))}
    </fieldset>
  )
}
