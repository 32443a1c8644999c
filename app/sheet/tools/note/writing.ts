import { onLayer } from '../markup'
import { neat } from '../moves'
import { drawn } from '../start'
import type { At, State, Surface } from '../types'

/** The text field is open at the spot; leaving it with text makes the note. */
export function writing(surface: Surface, at: At, back: () => State): State {
  const { sheet } = surface
  let open = true
  return {
    name: 'note.writing',
    hint: 'Ctrl+Enter or a click beside the note sets it, Escape leaves it.',
    enter() {
      void surface.askText(at, '').then((text) => {
        if (!open || !text?.trim()) return
        const id = surface.id('n')
        const spot = surface.tidy(at)
        sheet.edit(
          onLayer(surface, (layer) => ({
            id,
            layer,
            kind: 'note',
            points: [[neat(spot.x), neat(spot.z)]],
            text: text.trim(),
            ink: 'ink',
            width: 0.35,
            by: surface.who() ?? undefined,
            order: surface.order(),
          })),
        )
        drawn(surface, [`marks.${id}`], false)
      })
    },
    down: back,
    cancel() {
      open = false
      return back()
    },
  }
}
