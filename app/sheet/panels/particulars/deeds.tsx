import type { Edit, ListObject } from '~/live'
import { ShellSymbol } from '../../shell/symbols'
import { useSheet, useSheetState } from '../../shell/use-sheet'
import type { Sheet } from '../../state'
import { freshId } from '../ids'
import { nameOf, subjectOf } from '../paths'

/** Why a thing cannot be taken off the sheet, or null. */
export function cannotRemove(sheet: Sheet, path: string): string | null {
  const { section, keys } = sheet.get().live
  const subject = subjectOf(path)
  if (subject.kind === 'line' || subject.kind === 'bank' || subject.kind === 'section')
    return 'Every section has it; change it instead.'
  if (subject.kind === 'vertex') {
    const list =
      subject.line === 'ground' || subject.line === 'base'
        ? keys[subject.line]
        : (keys.bodies[subject.line.slice(7)] ?? [])
    const least = subject.line.startsWith('bodies.') ? 3 : 2
    if (list.length <= least) return `A ${least === 3 ? 'body needs three' : 'line needs two'} vertices.`
    const at = list.indexOf(subject.key)
    if (least === 2 && (at === 0 || at === list.length - 1)) return 'The ends stand at the banks.'
  }
  if (subject.kind === 'object' && subject.list === 'materials') {
    if (section.host === subject.id) return 'It is the material of the ground; choose another for that first.'
    const used = section.bodies.filter(({ material }) => material === subject.id)
    if (used.length > 0) return `${used.length === 1 ? '1 body is' : `${used.length} bodies are`} made of it.`
  }
  return null
}

export function removeEdit(path: string): Edit | null {
  const subject = subjectOf(path)
  switch (subject.kind) {
    case 'vertex':
      return { do: 'remove-vertex', line: subject.line, key: subject.key }
    case 'object':
      return { do: 'remove', list: subject.list, id: subject.id }
    case 'mark':
      return { do: 'remove-mark', id: subject.id }
    default:
      return null
  }
}

/** The same thing once more, a little to the right so that both can be seen. */
export function twin(object: ListObject, id: string, shift: number): ListObject {
  const copy: ListObject = { ...structuredClone(object), id }
  if (copy.name) copy.name = `${copy.name}, copy`
  if ('x' in copy) copy.x += shift
  if ('from' in copy) {
    copy.from += shift
    copy.to += shift
  }
  if ('outline' in copy) copy.outline = copy.outline.map(([x, z]) => [x + shift, z])
  return copy
}

/** Duplicate and remove, below the particulars. */
export function Deeds({ path }: { path: string }) {
  const sheet = useSheet()
  const may = useSheetState((state) => state.may)
  const section = useSheetState((state) => state.live.section)
  const subject = subjectOf(path)
  if (may === 'read') return null
  const refusal = cannotRemove(sheet, path)
  const remove = () => {
    const edit = removeEdit(path)
    if (edit && sheet.edit([edit])) sheet.set({ picked: [] })
  }
  const duplicate = () => {
    if (subject.kind !== 'object') return
    const object = section[subject.list].find(({ id }) => id === subject.id)
    if (!object) return
    const id = freshId(subject.list.slice(0, 3), section[subject.list])
    const shift = subject.list === 'materials' ? 0 : Math.round((section.right.x - section.left.x) / 20)
    if (sheet.edit([{ do: 'add', list: subject.list, object: twin(object, id, shift), after: subject.id }]))
      sheet.set({ picked: [`${subject.list}.${id}`] })
  }
  return (
    <div className="buttons">
      {subject.kind === 'object' ? (
        <button type="button" className="button small" onClick={duplicate}>
          <ShellSymbol name="twice" /> Duplicate
        </button>
      ) : null}
      <button
        type="button"
        className="button small danger"
        onClick={remove}
        disabled={refusal !== null}
        title={refusal ?? undefined}
        aria-label={`Remove ${nameOf(section, path)}`}
      >
        <ShellSymbol name="remove" /> Remove
      </button>
      {refusal ? <small className="quiet">{refusal}</small> : null}
    </div>
  )
}
