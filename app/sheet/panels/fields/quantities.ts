import { formatQuantity, formatTime, plainNumber, type QuantityKind, shapeOf } from '~/section'
import { useSheetState } from '../../shell/use-sheet'
import type { UnitSet } from '../../state'

export type Kind = QuantityKind

/** Value with its unit, as read on the sheet. `show.unit` the unit alone, `show.signed` with its sign and no unit. */
export const show = Object.assign(
  (value: number, kind: Kind, units: UnitSet, withUnit = true): string =>
    formatQuantity(value, kind, units, { unit: withUnit }),
  {
    unit: (kind: Kind, units: UnitSet): string => shapeOf(kind, units).unit,
    signed: (value: number, kind: Kind, units: UnitSet): string =>
      formatQuantity(value, kind, units, { unit: false, signed: true }),
  },
)

/** The value as it stands in a field being typed in: all its figures, in the unit shown. */
export const editable = (value: number, kind: Kind, units: UnitSet): string =>
  formatQuantity(value, kind, units, { exact: true })

export { formatTime as showTime, plainNumber as plain, shapeOf }

export const useUnits = (): UnitSet => useSheetState((state) => state.units)
