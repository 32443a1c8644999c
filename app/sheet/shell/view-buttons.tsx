import { plain } from '../panels/fields/quantities'
import type { View } from '../state'
import { IconButton } from './icon-button'
import { useSheet, useSheetState } from './use-sheet'

export const EXAGGERATIONS = [1, 2, 4, 5, 8, 10, 15, 20, 30, 50] as const

/** Zoom and vertical exaggeration. The whole strip is the view `null`; anything else starts from the strip's own extent. */
export function ViewButtons() {
  const sheet = useSheet()
  const exaggeration = useSheetState((state) => state.view?.exaggeration ?? null)
  const fitting = useSheetState((state) => (state.view ? null : (state.seen?.exaggeration ?? null)))
  const base = (): View => {
    const { view, seen, live } = sheet.get()
    const now = view ?? seen
    if (now) return now
    const { left, right, ground, base: bottom } = live.section
    const z = [...ground, ...bottom].map(([, height]) => height)
    const middle = (Math.min(...z) + Math.max(...z)) / 2
    return { x0: left.x, x1: right.x, zMid: middle, exaggeration: 10 }
  }
  const zoom = (factor: number) => {
    const view = base()
    const middle = (view.x0 + view.x1) / 2
    const half = ((view.x1 - view.x0) / 2) * factor
    sheet.set({ view: { ...view, x0: middle - half, x1: middle + half } })
  }
  const listed: number[] = [...EXAGGERATIONS]
  const rounded = exaggeration === null ? null : Math.round(exaggeration * 10) / 10
  if (rounded !== null && !listed.includes(rounded)) listed.push(rounded)
  listed.sort((a, b) => a - b)
  return (
    <fieldset className="bar-group view-buttons" aria-label="View">
      <span className="zoom-pair">
        <IconButton name="farther" label="Farther away (−)" onPress={() => zoom(1.4)} />
        <IconButton name="closer" label="Closer (+)" onPress={() => zoom(1 / 1.4)} />
      </span>
      <IconButton name="fit" label="The whole strip (0)" onPress={() => sheet.set({ view: null })} />
      <label className="exaggeration" title="Vertical exaggeration">
        <span aria-hidden="true">VE</span>
        <select
          aria-label="Vertical exaggeration"
          value={rounded ?? ''}
          onChange={(event) =>
            sheet.set({
              view: event.target.value === '' ? null : { ...base(), exaggeration: Number(event.target.value) },
            })
          }
        >
          <option value="">{fitting === null ? 'fits' : `fits: ${plain(fitting, 2)}×`}</option>
          {listed.map((times) => (
            <option key={times} value={times}>
              {times}×
            </option>
          ))}
        </select>
      </label>
    </fieldset>
  )
}
