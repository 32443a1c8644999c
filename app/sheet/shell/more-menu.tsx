import { Button, Dialog, DialogTrigger, Popover } from 'react-aria-components'
import type { UnitSet } from '../state'
import { Keys } from './keys'
import { usePopClass } from './pop'
import { ShellSymbol } from './symbols'
import { useSheet, useSheetState } from './use-sheet'

/** Units, light or dark, and help. */
export function MoreMenu() {
  const sheet = useSheet()
  const popClass = usePopClass()
  const units = useSheetState((state) => state.units)
  const theme = useSheetState((state) => state.theme)
  const may = useSheetState((state) => state.may)
  return (
    <DialogTrigger>
      <Button className="button bar-button" aria-label="Units, theme and help">
        <ShellSymbol name="more" />
      </Button>
      <Popover className={popClass('more-pop')} placement="bottom end">
        <Dialog aria-label="Units, theme and help">
          <Choice<UnitSet>
            legend="Units shown"
            value={units}
            options={[
              ['si', 'metres, m/d'],
              ['us', 'feet, ft/d'],
            ]}
            onChoose={(value) => sheet.set({ units: value })}
          />
          <Choice<'light' | 'dark'>
            legend="Sheet"
            value={theme}
            options={[
              ['light', 'paper'],
              ['dark', 'night'],
            ]}
            onChoose={(value) => sheet.set({ theme: value })}
          />
          <Keys may={may} />
        </Dialog>
      </Popover>
    </DialogTrigger>
  )
}

function Choice<T extends string>({
  legend,
  value,
  options,
  onChoose,
}: {
  legend: string
  value: T
  options: [value: T, label: string][]
  onChoose: (value: T) => void
}) {
  return (
    <fieldset className="choice">
      <legend>{legend}</legend>
      {options.map(([option, label]) => (
        <button key={option} type="button" aria-pressed={option === value} onClick={() => onChoose(option)}>
          {label}
        </button>
      ))}
    </fieldset>
  )
}
