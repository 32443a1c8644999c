import { useSheet, useSheetState } from '../../shell/use-sheet'
import { type Spec, specsOf } from '../fields/specs'
import { ValueField } from '../fields/value-field'
import { nameOf, subjectOf } from '../paths'
import { cannotRemove, removeEdit } from './deeds'

/** The numbers that everything picked has in common; a value typed here goes to all of them. */
export function SeveralParticulars({ paths }: { paths: string[] }) {
  const sheet = useSheet()
  const may = useSheetState((state) => state.may)
  const section = useSheetState((state) => state.live.section)
  const all = paths.map((path) => specsOf(section, subjectOf(path)))
  const shared = (all[0]?.specs ?? []).filter((spec) =>
    all.every(({ specs }) => specs.some((other) => sameSpec(spec, other))),
  )
  const removable = paths.filter((path) => cannotRemove(sheet, path) === null)
  const remove = () => {
    const edits = removable.map(removeEdit).filter((edit) => edit !== null)
    if (sheet.edit(edits)) sheet.set({ picked: [] })
  }
  return (
    <div className="particulars">
      <ul className="picked-list">
        {paths.map((path) => (
          <li key={path}>
            <button type="button" className="plain-link" onClick={() => sheet.set({ picked: [path] })}>
              {nameOf(section, path)}
            </button>
          </li>
        ))}
      </ul>
      {shared.map((spec) => (
        <ValueField key={spec.field} spec={spec} bases={all.map(({ base }) => base)} />
      ))}
      {shared.length === 0 ? <p className="quiet">They have no number in common.</p> : null}
      {may === 'write' && removable.length > 0 ? (
        <div className="buttons">
          <button type="button" className="button small danger" onClick={remove}>
            Remove {removable.length === paths.length ? 'them all' : `${removable.length} of them`}
          </button>
        </div>
      ) : null}
    </div>
  )
}

const sameSpec = (a: Spec, b: Spec) => a.field === b.field && a.kind === b.kind && a.label === b.label
