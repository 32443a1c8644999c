import { useSheet, useSheetState } from './use-sheet'

/** Where the pen writes. Ink and width are the pen's own and live with the tool. */
export function PenChoices() {
  const sheet = useSheet()
  const layers = useSheetState((state) => state.live.markup.layers)
  const layerId = useSheetState((state) => state.layerId)
  const open = layers.filter(({ locked }) => !locked)
  return (
    <label className="pen-choices" title="Mark-up lies over the model and is never read by the calculation.">
      <span>On layer</span>
      <select value={layerId ?? ''} onChange={(event) => sheet.set({ layerId: event.target.value || null })}>
        <option value="">today’s</option>
        {open.map((layer) => (
          <option key={layer.id} value={layer.id}>
            {layer.name.includes(layer.date) ? layer.name : `${layer.name} · ${layer.date}`}
          </option>
        ))}
      </select>
    </label>
  )
}
