import type { Mark } from '~/live'
import { useSheet, useSheetState } from '../../shell/use-sheet'
import { SelectField } from '../fields/select-field'
import { TextField } from '../fields/text-field'
import { Deeds } from './deeds'

export const INKS: readonly (readonly [Mark['ink'], string])[] = [
  ['ink', 'ink'],
  ['water', 'water'],
  ['trouble', 'trouble'],
  ['recharge', 'recharge'],
  ['divide', 'divide'],
]
export const WIDTHS = ['0.25', '0.35', '0.5', '0.7', '1', '2', '4'] as const

/** A mark of the mark-up: its words, ink, width and layer. */
export function MarkParticulars({ id }: { id: string }) {
  const sheet = useSheet()
  const may = useSheetState((state) => state.may)
  const { marks, layers } = useSheetState((state) => state.live.markup)
  const mark = marks.find((one) => one.id === id)
  if (!mark) return <p className="quiet">It is no longer there.</p>
  const layer = layers.find((one) => one.id === mark.layer)
  const read = may === 'read' || layer?.locked === true
  const set = (change: Partial<Omit<Mark, 'id'>>) => sheet.edit([{ do: 'set-mark', id, change }])
  const width = WIDTHS.find((one) => Number(one) === mark.width)
  return (
    <div className="particulars">
      {mark.kind === 'note' || mark.text !== undefined ? (
        <TextField
          label="Words"
          value={mark.text ?? ''}
          disabled={read}
          maxLength={500}
          onCommit={(text) => set({ text })}
        />
      ) : null}
      <SelectField label="Ink" value={mark.ink} options={INKS} disabled={read} onChange={(ink) => set({ ink })} />
      <SelectField
        label="Width"
        value={width ?? 'several'}
        options={WIDTHS.map((one) => [one, `${one} mm`] as const)}
        disabled={read}
        onChange={(next) => set({ width: Number(next) })}
      />
      <SelectField
        label="Layer"
        value={mark.layer}
        options={layers.map((one) => [one.id, `${one.name} · ${one.date}`] as const)}
        disabled={read}
        onChange={(next) => set({ layer: next })}
      />
      {mark.by ? <p className="quiet">by {mark.by}</p> : null}
      {read ? null : <Deeds path={`marks.${id}`} />}
    </div>
  )
}
