import { insertOn } from '../insert'
import type { At, State, Surface } from '../types'
import { pressed } from './pressed'

/** Waits for a press: on a thing, on a handle, on bare paper. */
export function idle(surface: Surface): State {
  const { sheet } = surface
  return {
    name: 'pick.idle',
    down: (at) => pressed(surface, at, surface.hit(at), () => idle(surface)),
    doubleUp(at: At) {
      const hit = surface.hit(at)
      if (!hit) return undefined
      if (hit.path.startsWith('marks.')) rewrite(surface, hit.path)
      else insertOn(surface, hit.path, at)
      return undefined
    },
    cancel() {
      if (sheet.get().picked.length > 0) sheet.set({ picked: [] })
      return undefined
    },
  }
}

/** A note is read and changed where it stands. */
async function rewrite(surface: Surface, path: string) {
  const { sheet } = surface
  const id = path.slice('marks.'.length)
  const mark = sheet.get().live.markup.marks.find((one) => one.id === id)
  const [first] = mark?.points ?? []
  if (!mark || !first || mark.kind === 'pen' || mark.kind === 'highlight' || sheet.get().may !== 'write') return
  const text = await surface.askText({ x: first[0], z: first[1] }, mark.text ?? '')
  if (text !== null && text !== mark.text) sheet.edit([{ do: 'set-mark', id, change: { text } }])
}
