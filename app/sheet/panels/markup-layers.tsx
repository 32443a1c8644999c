import type { MarkupLayer } from '~/live'
import { IconButton } from '../shell/icon-button'
import { useSheet, useSheetState } from '../shell/use-sheet'
import { Box } from './box'
import { TextField } from './fields/text-field'
import { freshId } from './ids'

export const today = () => new Date().toISOString().slice(0, 10)

/** Layers of pen and notes: shown, locked, renamed; a new one carries today's date. */
export function MarkupLayers() {
  const sheet = useSheet()
  const { layers, marks } = useSheetState((state) => state.live.markup)
  const may = useSheetState((state) => state.may)
  const layerId = useSheetState((state) => state.layerId)
  const write = may === 'write'
  if (layers.length === 0 && !write) return null
  const change = (id: string, what: Partial<Omit<MarkupLayer, 'id'>>) =>
    sheet.edit([{ do: 'set-layer', id, change: what }])
  const add = () => {
    const id = freshId('layer', layers)
    const date = today()
    // Layers lie in the order of this word; a later one lies on top.
    const order = `${date}-${String(layers.length).padStart(4, '0')}`
    const layer = { id, name: 'Mark-up', date, hidden: false, locked: false, order }
    if (sheet.edit([{ do: 'add-layer', layer }])) sheet.set({ layerId: id })
  }
  return (
    <Box title="Mark-up" remark={layers.length === 0 ? null : `${marks.length} marks`}>
      {layers.length === 0 ? (
        <p className="quiet">Pen and notes lie on dated layers over the drawing, apart from the model.</p>
      ) : null}
      <ul className="layers">
        {layers.map((layer) => (
          <li key={layer.id} data-current={layer.id === layerId || undefined}>
            {write ? (
              <input
                type="radio"
                name="mark-up-layer"
                aria-label={`Write on ${layer.name}, ${layer.date}`}
                checked={layer.id === layerId}
                disabled={layer.locked}
                onChange={() => sheet.set({ layerId: layer.id })}
              />
            ) : null}
            <span className="layer-name">
              {write && !layer.locked ? (
                <TextField
                  label={`Name of the layer of ${layer.date}`}
                  hideLabel
                  value={layer.name}
                  onCommit={(name) => change(layer.id, { name: name || 'Mark-up' })}
                />
              ) : (
                layer.name
              )}
              <small>
                {layer.date} · {marks.filter((mark) => mark.layer === layer.id).length} marks
              </small>
            </span>
            {write ? (
              <>
                <IconButton
                  name={layer.hidden ? 'shut' : 'eye'}
                  label={`${layer.hidden ? 'Show' : 'Hide'} ${layer.name}, ${layer.date}`}
                  pressed={!layer.hidden}
                  onPress={() => change(layer.id, { hidden: !layer.hidden })}
                />
                <IconButton
                  name={layer.locked ? 'lock' : 'free'}
                  label={`${layer.locked ? 'Unlock' : 'Lock'} ${layer.name}, ${layer.date}`}
                  pressed={layer.locked}
                  onPress={() => change(layer.id, { locked: !layer.locked })}
                />
                <IconButton
                  name="remove"
                  label={`Remove ${layer.name}, ${layer.date}, with its marks`}
                  disabled={layer.locked}
                  onPress={() => sheet.edit([{ do: 'remove-layer', id: layer.id }])}
                />
              </>
            ) : null}
          </li>
        ))}
      </ul>
      {write ? (
        <button type="button" className="button small" onClick={add}>
          New layer of today
        </button>
      ) : null}
    </Box>
  )
}
