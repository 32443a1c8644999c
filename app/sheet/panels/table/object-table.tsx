import type { ReactNode } from 'react'
import type { ListName, ListObject } from '~/live'
import { IconButton } from '../../shell/icon-button'
import { useSheet, useSheetState } from '../../shell/use-sheet'
import { show, useUnits } from '../fields/quantities'
import type { Spec } from '../fields/specs'
import { TextField } from '../fields/text-field'
import { ValueField } from '../fields/value-field'
import { cannotRemove } from '../particulars/deeds'

/** One list of the section as a table: a row an object, a column a value; rows can be added and removed. */
export function ObjectTable<T extends ListObject>(props: {
  caption: string
  list: ListName
  objects: T[]
  specs: Spec[]
  /** A row nobody may leave out without saying so: what "add" puts in. */
  fresh: () => T
  one: string
  extra?: { label: string; cell: (object: T, name: string) => ReactNode }
}) {
  const sheet = useSheet()
  const units = useUnits()
  const may = useSheetState((state) => state.may)
  const caseOf = useSheetState((state) => state.live.section.cases.find(({ id }) => id === state.caseId) ?? null)
  const write = may === 'write'
  const { list, objects, specs, one } = props
  if (objects.length === 0 && !write) return null
  const nameOf = (object: T, at: number) => object.name ?? `${one} ${at + 1}`
  return (
    <section className="table-block">
      <div className="scroll-x">
        <table className="figures cells">
          <caption>{props.caption}</caption>
          {objects.length === 0 ? null : (
            <thead>
              <tr>
                <th scope="col">Name</th>
                {props.extra ? <th scope="col">{props.extra.label}</th> : null}
                {specs.map((spec) => (
                  <th scope="col" key={spec.field}>
                    {spec.label.toLowerCase()}
                    {show.unit(spec.kind, units) ? `, ${show.unit(spec.kind, units)}` : ''}
                  </th>
                ))}
                {write ? (
                  <th scope="col">
                    <span className="sr-only">Remove</span>
                  </th>
                ) : null}
              </tr>
            </thead>
          )}
          <tbody>
            {objects.map((object, at) => {
              const path = `${list}.${object.id}`
              const name = nameOf(object, at)
              return (
                <tr key={object.id} data-off={caseOf?.off.includes(object.id) || undefined}>
                  <th scope="row">
                    <TextField
                      label={`Name of ${name}`}
                      hideLabel
                      value={object.name ?? ''}
                      placeholder={name}
                      disabled={!write}
                      maxLength={80}
                      onCommit={(text) => sheet.edit([{ do: 'set', path: `${path}.name`, value: text || undefined }])}
                    />
                  </th>
                  {props.extra ? <td>{props.extra.cell(object, name)}</td> : null}
                  {specs.map((spec) => (
                    <td key={spec.field}>
                      <ValueField spec={spec} bases={[path]} cell={name} />
                    </td>
                  ))}
                  {write ? (
                    <td className="row-deeds">
                      <IconButton
                        name="remove"
                        label={cannotRemove(sheet, path) ?? `Remove ${name}`}
                        disabled={cannotRemove(sheet, path) !== null}
                        onPress={() => {
                          if (sheet.edit([{ do: 'remove', list, id: object.id }])) sheet.say(`${name} is gone.`)
                        }}
                      />
                    </td>
                  ) : null}
                </tr>
              )
            })}
          </tbody>
        </table>
      </div>
      {write ? (
        <button
          type="button"
          className="button small"
          onClick={() => {
            const object = props.fresh()
            if (sheet.edit([{ do: 'add', list, object }])) sheet.say(`${one} was added.`)
          }}
        >
          Add {one.toLowerCase()}
        </button>
      ) : null}
    </section>
  )
}
