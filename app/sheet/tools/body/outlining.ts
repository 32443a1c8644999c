import type { Edit } from '~/live'
import type { Material } from '~/section'
import { neat } from '../moves'
import { spotLine, stretchLine } from '../readout'
import { drawn } from '../start'
import type { At, Spot, State, Surface } from '../types'
import { area2, crossing } from './simple'

/** How near the first corner a click must be to close the outline, px. */
const CLOSE = { mouse: 9, pen: 12, touch: 22 } as const

/** Corners are being set; a click on the first one, Enter or a double click closes the body. */
export function outlining(surface: Surface, first: Spot, back: () => State): State {
  const { sheet } = surface
  const corners: Spot[] = [first]

  function next(at: At): Spot {
    const snap = surface.snap(at, { free: at.alt })
    return snap.to === null ? surface.tidy(at) : { x: snap.x, z: snap.z }
  }
  function closes(at: At): boolean {
    const scale = surface.scale()
    return corners.length >= 3 && Math.hypot((at.x - first.x) / scale.x, (at.z - first.z) / scale.z) < CLOSE[at.kind]
  }
  function show(to?: Spot) {
    const last = corners.at(-1)
    surface.show({
      line: to ? [...corners, to] : corners,
      closed: corners.length + (to ? 1 : 0) >= 3,
      readout: to && last ? { at: to, lines: [spotLine(surface, to), stretchLine(surface, last, to)] } : undefined,
    })
  }
  function finish(): State | undefined {
    if (corners.length < 3) {
      sheet.say('A body needs three corners at least.', 'trouble')
      return undefined
    }
    const at = crossing(corners)
    if (at !== null || Math.abs(area2(corners)) < 1e-9) {
      sheet.say(
        at === null
          ? 'These corners lie on one line; a body needs some height.'
          : 'The outline crosses itself. Take corners back with Backspace until it does not.',
        'trouble',
      )
      return undefined
    }
    const id = surface.id('b')
    const { edits, material } = materialFor(surface)
    edits.push({
      do: 'add',
      list: 'bodies',
      object: { id, material, outline: corners.map(({ x, z }) => [neat(x), neat(z)]) },
    })
    sheet.edit(edits, undefined, [`bodies.${id}`])
    drawn(surface, [`bodies.${id}`], false)
    return back()
  }

  return {
    name: 'body.outlining',
    cursor: 'crosshair',
    hint: 'Click the next corner. A click on the first corner, Enter or a double click closes it; Backspace takes one back.',
    enter: () => show(),
    move(at) {
      show(closes(at) ? first : next(at))
      return undefined
    },
    down(at) {
      if (closes(at)) return finish()
      corners.push(next(at))
      show()
      return undefined
    },
    double: finish,
    key({ key }) {
      if (key === 'Enter') return finish() ?? this
      if (key !== 'Backspace') return undefined
      corners.pop()
      if (corners.length === 0) return back()
      show()
      return this
    },
    cancel: back,
    exit: () => surface.show(null),
  }
}

/** The material of the body drawn last, else any but the host, else a silt to start from. */
function materialFor({ sheet, id }: Surface): { edits: Edit[]; material: string } {
  const { section } = sheet.stored()
  const known = (one: string | undefined) => section.materials.some((material) => material.id === one)
  const last = section.bodies.at(-1)?.material
  if (last !== undefined && known(last)) return { edits: [], material: last }
  const other = section.materials.find((material) => material.id !== section.host)
  if (other) return { edits: [], material: other.id }
  const silt: Material = { id: id('m'), name: 'Silt', k: 0.05, anisotropy: 10, porosity: 0.4, specificYield: 0.08 }
  return { edits: [{ do: 'add', list: 'materials', object: silt }], material: silt.id }
}
