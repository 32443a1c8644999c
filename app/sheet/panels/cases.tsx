import { useState } from 'react'
import { type Case, OFF_LISTS, valueAt } from '~/section'
import { IconButton } from '../shell/icon-button'
import { useSheet, useSheetState } from '../shell/use-sheet'
import { Box } from './box'
import { CompareCases } from './compare'
import { describePath } from './fields/describe'
import { freshId } from './ids'
import { nameOf } from './paths'

/** The chosen case: its name, what it changes, what it leaves out; and all cases side by side. */
export function CasePanel() {
  const sheet = useSheet()
  const section = useSheetState((state) => state.live.section)
  const caseId = useSheetState((state) => state.caseId)
  const may = useSheetState((state) => state.may)
  const one = section.cases.find(({ id }) => id === caseId) ?? null
  const add = () => {
    const id = freshId('case', section.cases)
    const object: Case = { id, name: `Case ${section.cases.length + 1}`, off: [], set: {} }
    if (sheet.edit([{ do: 'add', list: 'cases', object }])) sheet.set({ caseId: id })
  }
  if (section.cases.length === 0 && may === 'read') return null
  return (
    <>
      <Box
        title={one ? `Case: ${one.name ?? one.id}` : 'Cases'}
        remark={one ? `${Object.keys(one.set).length + one.off.length} changes` : null}
      >
        {one ? (
          <OneCase key={one.id} one={one} />
        ) : (
          <p className="quiet">
            {section.cases.length === 0
              ? 'A case is a named set of changed values: a wet spring, a drain put in. Add one, then change values while it is chosen.'
              : 'As drawn. Choose a case above the drawing; what you change then, changes in that case only.'}
          </p>
        )}
        {may === 'write' ? (
          <div className="buttons">
            <button type="button" className="button small" onClick={add}>
              Add a case
            </button>
            {one ? (
              <>
                <button
                  type="button"
                  className="button small"
                  onClick={() => {
                    const id = freshId('case', section.cases)
                    const copy: Case = { ...structuredClone(one), id, name: `${one.name ?? one.id}, copy` }
                    if (sheet.edit([{ do: 'add', list: 'cases', object: copy, after: one.id }]))
                      sheet.set({ caseId: id })
                  }}
                >
                  Duplicate
                </button>
                <button
                  type="button"
                  className="button small danger"
                  onClick={() => {
                    if (sheet.edit([{ do: 'remove', list: 'cases', id: one.id }])) sheet.set({ caseId: null })
                  }}
                >
                  Remove
                </button>
              </>
            ) : null}
          </div>
        ) : null}
      </Box>
      {section.cases.length > 0 ? <CompareCases /> : null}
    </>
  )
}

function OneCase({ one }: { one: Case }) {
  const sheet = useSheet()
  const section = useSheetState((state) => state.live.section)
  const may = useSheetState((state) => state.may)
  const units = useSheetState((state) => state.units)
  const [name, setName] = useState<string | null>(null)
  const write = may === 'write'
  // What was observed does not change with a "what if".
  const switchable = OFF_LISTS.filter((list) => list !== 'observations').flatMap((list) =>
    section[list].map(({ id }) => `${list}.${id}`),
  )
  return (
    <>
      {write ? (
        <label className="field">
          <span className="field-label">Name</span>
          <input
            className="text-input"
            value={name ?? one.name ?? ''}
            maxLength={80}
            onChange={(event) => setName(event.target.value)}
            onBlur={() => {
              if (name?.trim() && name.trim() !== one.name)
                sheet.edit([{ do: 'set', path: `cases.${one.id}.name`, value: name.trim() }])
              setName(null)
            }}
            onKeyDown={(event) => event.key === 'Enter' && event.currentTarget.blur()}
          />
        </label>
      ) : null}
      {one.note ? <p className="quiet">{one.note}</p> : null}
      {Object.keys(one.set).length > 0 ? (
        <table className="figures changes">
          <caption>Changed in this case</caption>
          <thead>
            <tr>
              <th scope="col">Value</th>
              <th scope="col">here</th>
              <th scope="col">as drawn</th>
              {write ? (
                <th scope="col">
                  <span className="sr-only">Way back</span>
                </th>
              ) : null}
            </tr>
          </thead>
          <tbody>
            {Object.entries(one.set).map(([path, value]) => {
              const told = describePath(section, path, units)
              return (
                <tr key={path}>
                  <th scope="row">
                    {told.of}
                    <small> {told.field}</small>
                  </th>
                  <td>{told.show(value)}</td>
                  <td className="soft">{told.show(valueAt(section, path))}</td>
                  {write ? (
                    <td>
                      <IconButton
                        name="undo"
                        label={`${told.of}, ${told.field}: back to as drawn`}
                        onPress={() => sheet.edit([{ do: 'case-set', case: one.id, path, value: undefined }])}
                      />
                    </td>
                  ) : null}
                </tr>
              )
            })}
          </tbody>
        </table>
      ) : (
        <p className="quiet">No value differs from the drawing yet.</p>
      )}
      {switchable.length > 0 ? (
        <fieldset className="switches">
          <legend>Stands in this case</legend>
          {switchable.map((path) => {
            const id = path.split('.')[1] ?? ''
            return (
              <label key={path} className="check">
                <input
                  type="checkbox"
                  checked={!one.off.includes(id)}
                  disabled={!write}
                  onChange={(event) => sheet.edit([{ do: 'case-off', case: one.id, id, off: !event.target.checked }])}
                />
                {nameOf(section, path)}
              </label>
            )
          })}
        </fieldset>
      ) : null}
    </>
  )
}
