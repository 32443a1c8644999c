import type { LineId } from '~/live'
import type { Point } from '~/section'
import { IconButton } from '../../shell/icon-button'
import { useSheet, useSheetState } from '../../shell/use-sheet'
import { show, useUnits } from '../fields/quantities'
import { QuantityField } from '../fields/quantity-field'
import { freshKey } from '../ids'
import { lineIn } from '../lines'
import { cannotRemove } from '../particulars/deeds'
import { nameOf } from '../paths'

/** Every vertex of a line or outline as a row that can be typed. */
export function VertexTable({ line }: { line: LineId }) {
  const sheet = useSheet()
  const units = useUnits()
  const may = useSheetState((state) => state.may)
  const live = useSheetState((state) => state.live)
  const { points, keys } = lineIn(live, line)
  const name = nameOf(live.section, line)
  const outline = line.startsWith('bodies.')
  const write = may === 'write'
  const insert = (at: number) => {
    const here = points[at]
    const next = points[(at + 1) % points.length]
    const after = keys[at]
    if (!here || !next || after === undefined) return
    const middle: Point = [(here[0] + next[0]) / 2, (here[1] + next[1]) / 2]
    if (sheet.edit([{ do: 'insert-vertex', line, key: freshKey(), at: middle, after }]))
      sheet.say(`A vertex was added to ${name}, halfway to the next.`)
  }
  return (
    <table className="figures cells">
      <caption>{outline ? 'Outline' : `${name}: vertices`}</caption>
      <thead>
        <tr>
          <th scope="col">No.</th>
          <th scope="col">distance, {show.unit('distance', units)}</th>
          <th scope="col">elevation, {show.unit('elevation', units)}</th>
          {write ? (
            <th scope="col">
              <span className="sr-only">Add or remove</span>
            </th>
          ) : null}
        </tr>
      </thead>
      <tbody>
        {points.map((point, at) => {
          const key = keys[at] ?? String(at)
          const path = `${line}.v:${key}`
          const end = !outline && (at === 0 || at === points.length - 1)
          const refusal = cannotRemove(sheet, path)
          const move = (to: Point) =>
            sheet.edit([{ do: 'move-vertex', line, key, to }]) ? null : 'This section may only be read.'
          return (
            <tr key={key} onFocus={() => sheet.set({ reading: inStrip(point[0], live.section) })}>
              <th scope="row">{at + 1}</th>
              <td>
                <QuantityField
                  label={`${name}, vertex ${at + 1}: distance`}
                  hideLabel
                  bare
                  kind="distance"
                  units={units}
                  value={point[0]}
                  disabled={!write || end}
                  hint={end ? 'An end of the line stands at the bank.' : undefined}
                  refuse={(x) => outOfOrder(points, at, x, outline)}
                  onCommit={(x) => (x === null ? null : move([x, point[1]]))}
                />
              </td>
              <td>
                <QuantityField
                  label={`${name}, vertex ${at + 1}: elevation`}
                  hideLabel
                  bare
                  kind="elevation"
                  units={units}
                  value={point[1]}
                  disabled={!write}
                  onCommit={(z) => (z === null ? null : move([point[0], z]))}
                />
              </td>
              {write ? (
                <td className="row-deeds">
                  <IconButton
                    name="add"
                    label={`Add a vertex after vertex ${at + 1} of ${name}`}
                    disabled={!outline && at === points.length - 1}
                    onPress={() => insert(at)}
                  />
                  <IconButton
                    name="remove"
                    label={`Remove vertex ${at + 1} of ${name}`}
                    disabled={refusal !== null}
                    onPress={() => {
                      if (sheet.edit([{ do: 'remove-vertex', line, key }]))
                        sheet.say(`Vertex ${at + 1} of ${name} is gone.`)
                    }}
                  />
                </td>
              ) : null}
            </tr>
          )
        })}
      </tbody>
    </table>
  )
}

/** Distances grow along ground and base; outlines may go any way. */
export function outOfOrder(points: Point[], at: number, x: number, outline: boolean): string | null {
  if (outline) return null
  const before = points[at - 1]
  const after = points[at + 1]
  return (before && x <= before[0]) || (after && x >= after[0])
    ? 'It would pass its neighbour; distances grow along the line.'
    : null
}

const inStrip = (x: number, { left, right }: { left: { x: number }; right: { x: number } }) =>
  x >= left.x && x <= right.x ? x : null
