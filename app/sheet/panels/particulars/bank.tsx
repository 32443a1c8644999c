import type { Edit } from '~/live'
import type { Bank, Section } from '~/section'
import { useSheet, useSheetState } from '../../shell/use-sheet'
import type { Sheet } from '../../state'
import { endWithBank } from '../../tools/moves'
import { plain, useUnits } from '../fields/quantities'
import { QuantityField } from '../fields/quantity-field'
import { SelectField } from '../fields/select-field'
import { specsOf } from '../fields/specs'
import { ValueField } from '../fields/value-field'
import { ConductanceHelper } from './conductance-helper'
import { NameAndNote } from './name-note'

const KINDS = [
  ['water', 'open water'],
  ['no-flow', 'closed: no flow'],
  ['inflow', 'a given inflow'],
] as const

/** The bank with another kind: what the kinds share stays, the rest starts from what stands there. */
export function bankOfKind(bank: Bank, kind: Bank['kind'], stage: number): Bank {
  const { x, name, note } = bank
  const shared = { x, ...(name ? { name } : {}), ...(note ? { note } : {}) }
  if (kind === 'water') return { ...shared, kind, stage, conductance: null, bed: null }
  if (kind === 'inflow') return { ...shared, kind, rate: 0 }
  return { ...shared, kind }
}

/** The edits that move a bank: ground and base end at it and come along. */
export function moveBankTo(sheet: Sheet, side: 'left' | 'right', x: number): Edit[] {
  const live = sheet.stored()
  return [
    { do: 'set', path: `${side}.x`, value: x },
    ...endWithBank(live, 'ground', side, x),
    ...endWithBank(live, 'base', side, x),
  ]
}

/** A bank may not pass the next vertex of ground or base, nor the other bank. */
export function cannotStandAt(section: Section, side: 'left' | 'right', x: number): string | null {
  const left = side === 'left'
  for (const [line, name] of [
    [section.ground, 'ground line'],
    [section.base, 'base'],
  ] as const) {
    const next = left ? line[1] : line.at(-2)
    if (next && line.length > 2 && (left ? x >= next[0] : x <= next[0]))
      return `The next vertex of the ${name} stands at ${plain(next[0])} m; move or remove it first.`
  }
  const other = section[left ? 'right' : 'left'].x
  return (left ? x < other : x > other) ? null : 'The left bank stands left of the right bank.'
}

export function BankParticulars({ side }: { side: 'left' | 'right' }) {
  const sheet = useSheet()
  const units = useUnits()
  const may = useSheetState((state) => state.may)
  const section = useSheetState((state) => state.live.section)
  const solution = useSheetState((state) => state.solution)
  const bank = section[side]
  const read = may === 'read'
  const change = (kind: Bank['kind']) => {
    // The water that stands there already is the first guess for a stage.
    const end = side === 'left' ? 0 : solution.status === 'solved' ? solution.profile.head.length - 1 : 0
    const head = solution.status === 'solved' ? solution.profile.head[end] : undefined
    const ground = side === 'left' ? section.ground[0] : section.ground.at(-1)
    const stage = Math.round((head ?? (ground ? ground[1] - 1 : 0)) * 100) / 100
    sheet.edit([{ do: 'set-bank', side, bank: bankOfKind(bank, kind, stage) }])
  }
  return (
    <div className="particulars">
      <NameAndNote path={side}>
        <SelectField label="It is" value={bank.kind} options={KINDS} disabled={read} onChange={change} />
        <QuantityField
          label="Distance"
          kind="distance"
          units={units}
          value={bank.x}
          disabled={read}
          hint="Ground and base end here and follow."
          refuse={(x) => cannotStandAt(section, side, x)}
          onCommit={(x) =>
            x === null || sheet.edit(moveBankTo(sheet, side, x)) ? null : 'This section may only be read.'
          }
        />
        {specsOf(section, { kind: 'bank', side }).specs.map((spec) => (
          <ValueField key={spec.field} spec={spec} bases={[side]} />
        ))}
        {bank.kind === 'water' ? <ConductanceHelper path={side} /> : null}
      </NameAndNote>
    </div>
  )
}
