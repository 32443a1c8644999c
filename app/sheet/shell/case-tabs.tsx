import { freshId } from '../panels/ids'
import { ShellSymbol } from './symbols'
import { useSheet, useSheetState } from './use-sheet'

/** The cases as tabs: the strip as drawn, and each named set of changed values. */
export function CaseTabs() {
  const sheet = useSheet()
  const cases = useSheetState((state) => state.live.section.cases)
  const current = useSheetState((state) => state.caseId)
  const may = useSheetState((state) => state.may)
  if (cases.length === 0 && may === 'read') return null
  const add = () => {
    const id = freshId('case', cases)
    const number = cases.length + 1
    if (sheet.edit([{ do: 'add', list: 'cases', object: { id, name: `Case ${number}`, off: [], set: {} } }]))
      sheet.set({ caseId: id })
  }
  return (
    <nav className="case-tabs" aria-label="Cases">
      <button type="button" aria-pressed={current === null} onClick={() => sheet.set({ caseId: null })}>
        As drawn
      </button>
      {cases.map((one) => (
        <button
          key={one.id}
          type="button"
          aria-pressed={current === one.id}
          onClick={() => sheet.set({ caseId: one.id })}
          title={one.note}
        >
          {one.name ?? one.id}
        </button>
      ))}
      {may === 'write' ? (
        <button type="button" className="add-case" onClick={add} aria-label="Add a case" title="Add a case">
          <ShellSymbol name="add" />
        </button>
      ) : null}
    </nav>
  )
}
