import type { Edit, Mark, MarkupLayer } from '~/live'
import type { Surface } from './types'

/**
 * The edits that put a mark on the mark-up layer in use. The first mark of a day starts a layer with that date, so that
 * mark-ups stay apart from the model and from one another.
 */
export function onLayer(surface: Surface, make: (layer: string) => Mark): Edit[] {
  const { layer, edits } = layerFor(surface)
  return [...edits, { do: 'add-mark', mark: make(layer) }]
}

let started: { today: string; sheet: object; id: string } | null = null

function layerFor(surface: Surface): { layer: string; edits: Edit[] } {
  const { sheet } = surface
  const { layers } = sheet.stored().markup
  const usable = (one: MarkupLayer) => !one.locked && !one.hidden
  const chosen = layers.find((one) => one.id === sheet.get().layerId && usable(one))
  if (chosen) return { layer: chosen.id, edits: [] }
  const today = surface.today()
  const todays = layers.find((one) => one.date === today && usable(one))
  if (todays) return { layer: todays.id, edits: [] }
  // One id for all frames of the gesture that starts the layer.
  if (started?.today !== today || started.sheet !== sheet || layers.some((one) => one.id === started?.id))
    started = { today, sheet, id: surface.id('layer') }
  const layer: MarkupLayer = {
    id: started.id,
    name: `Mark-up ${today}`,
    date: today,
    hidden: false,
    locked: false,
    order: surface.order(),
  }
  return { layer: layer.id, edits: [{ do: 'add-layer', layer }] }
}
