import type { At, State, Surface } from '../types'

/** Everything rubbed in one stroke is one step to undo. */
export function rubbing(surface: Surface, from: At, back: () => State): State {
  const { sheet } = surface
  const gone = new Set<string>()
  function rub(at: At) {
    const path = surface.hit(at)?.path
    if (!path?.startsWith('marks.')) return
    const id = path.slice('marks.'.length)
    const mark = sheet.stored().markup.marks.find((one) => one.id === id)
    if (!mark || gone.has(id)) return
    if (sheet.stored().markup.layers.find((layer) => layer.id === mark.layer)?.locked) {
      sheet.say('That mark-up layer is locked.')
      return
    }
    gone.add(id)
    sheet.gesture.show([...gone].map((one) => ({ do: 'remove-mark', id: one })))
  }
  return {
    name: 'eraser.rubbing',
    busy: true,
    cursor: 'cell',
    enter() {
      sheet.gesture.start()
      rub(from)
    },
    move(at) {
      rub(at)
      return undefined
    },
    up() {
      sheet.gesture.finish()
      return back()
    },
    cancel() {
      sheet.gesture.cancel()
      return back()
    },
  }
}
