import type { Edit } from '~/live'
import { anchorOf, moveEdits, neat } from '../moves'
import { vertexPath } from '../paths'
import { shiftLine, spotLine } from '../readout'
import type { At, Hit, Spot, State, Surface } from '../types'

/**
 * A drag. Start plus total shift, never shift upon shift: the gesture is given a function of the stored document, so when
 * somebody else moves the same thing meanwhile, the shift carries on from where it then is.
 */
export function dragging(surface: Surface, from: At, first: At, hit: Hit, back: () => State): State {
  const { sheet } = surface
  const { handle } = hit
  const newKey = handle?.shape === 'mid' ? surface.id('v') : null
  const line = handle?.shape === 'mid' ? handle.of : null
  const made = line !== null && newKey !== null ? vertexPath(line as 'ground', newKey) : null
  const paths = handle && handle.shape !== 'mid' && !sheet.get().picked.includes(hit.path) ? [handle.of] : grabbed()
  const anchor = startOf()
  const lock = axis()

  function grabbed() {
    if (handle && handle.shape !== 'mid' && handle.of !== hit.path) return [handle.of]
    const { picked } = sheet.get()
    return picked.includes(hit.path) ? picked : [hit.path]
  }
  function startOf(): Spot {
    if (handle) return { x: handle.x, z: handle.z }
    return anchorOf(hit.path, sheet.stored(), sheet.get().caseId) ?? { x: from.x, z: from.z }
  }
  /** A bank either goes along or its stage goes up: whichever way the drag sets out. An end keeps its level, a level its place. */
  function axis(): 'x' | 'z' | null {
    if (handle?.shape === 'end') return 'x'
    if (handle?.shape === 'level') return 'z'
    if (hit.path === 'left' || hit.path === 'right')
      return Math.abs(first.px - from.px) >= Math.abs(first.py - from.py) ? 'x' : 'z'
    return null
  }

  function show(at: At) {
    let shift: Spot = { x: at.x - from.x, z: at.z - from.z }
    // Shift keeps a drag straight, along the way it has gone further on the screen.
    const straight = lock ?? (at.shift ? (Math.abs(at.px - from.px) >= Math.abs(at.py - from.py) ? 'x' : 'z') : null)
    const level = Number.isNaN(anchor.z) ? from.z : anchor.z
    const wanted = { x: anchor.x + shift.x, z: level + shift.z }
    const caught = surface.snap(wanted, { except: made ? [made] : paths, free: at.alt })
    const spot = caught.to === null ? surface.tidy(wanted) : caught
    shift = { x: spot.x - anchor.x, z: spot.z - level }
    if (straight === 'x') shift.z = 0
    if (straight === 'z') shift.x = 0
    const { caseId } = sheet.get()
    const target = { x: neat(anchor.x + shift.x), z: neat(level + shift.z) }
    if (line !== null && newKey !== null && handle) {
      const insert: Edit = {
        do: 'insert-vertex',
        line: line as 'ground',
        key: newKey,
        at: [target.x, target.z],
        after: handle.after ?? null,
      }
      sheet.gesture.show([insert])
    } else sheet.gesture.show((stored) => moveEdits(paths, stored, caseId, shift))
    surface.show({
      snap: caught.to === null || straight !== null ? null : caught,
      readout: { at: { x: at.x, z: at.z }, lines: [spotLine(surface, target), shiftLine(surface, shift)] },
    })
  }

  return {
    name: 'pick.dragging',
    busy: true,
    cursor: lock === 'x' ? 'ew-resize' : lock === 'z' ? 'ns-resize' : 'grabbing',
    hint: 'Shift keeps it straight, Alt lets go of the grid, Escape puts it back.',
    enter() {
      sheet.gesture.start()
      show(first)
    },
    move(at) {
      show(at)
      return undefined
    },
    up(at) {
      show(at)
      // Picked before the step is written, so that redo brings the new vertex back picked.
      if (made) sheet.set({ picked: [made] })
      sheet.gesture.finish()
      return back()
    },
    cancel() {
      sheet.gesture.cancel()
      return back()
    },
    exit: () => surface.show(null),
  }
}
