import { useSheet, useSheetState } from '../../shell/use-sheet'
import { useCaseValue } from '../fields/in-case'
import { MaterialChoice } from '../fields/material-choice'
import { VertexTable } from '../table/vertex-table'
import { Deeds } from './deeds'
import { MaterialFields } from './materials'
import { NameAndNote } from './name-note'

/** A body: what it is made of, that material's values, its outline, and what it lies over. */
export function BodyParticulars({ id }: { id: string }) {
  const sheet = useSheet()
  const may = useSheetState((state) => state.may)
  const bodies = useSheetState((state) => state.live.section.bodies)
  const path = `bodies.${id}`
  const { value } = useCaseValue(`${path}.material`)
  const body = bodies.find((one) => one.id === id)
  if (!body) return <p className="quiet">It is no longer there.</p>
  const at = bodies.indexOf(body)
  const material = typeof value === 'string' ? value : body.material
  return (
    <div className="particulars">
      <NameAndNote path={path}>
        <MaterialChoice path={`${path}.material`} label="Material" />
        <MaterialFields id={material} />
        {bodies.length > 1 && may === 'write' ? (
          <div className="buttons">
            <button
              type="button"
              className="button small"
              disabled={at === bodies.length - 1}
              onClick={() => sheet.edit([{ do: 'reorder', list: 'bodies', id, after: bodies[at + 1]?.id ?? null }])}
            >
              Lay over the next
            </button>
            <button
              type="button"
              className="button small"
              disabled={at === 0}
              onClick={() => sheet.edit([{ do: 'reorder', list: 'bodies', id, after: bodies[at - 2]?.id ?? null }])}
            >
              Lay under the last
            </button>
          </div>
        ) : null}
        <details className="fold">
          <summary>Outline: {body.outline.length} vertices</summary>
          <VertexTable line={`bodies.${id}`} />
        </details>
      </NameAndNote>
      <Deeds path={path} />
    </div>
  )
}
