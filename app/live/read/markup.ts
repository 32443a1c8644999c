import { isId } from '~/section'
import { isMarkPoints, LAYER_FIELDS, MARK_FIELDS, MARKUP } from '../edit/markup'
import type { Mark, MarkupLayer } from '../types'
import { type Held, listOf, type Say } from './context'

type Fits = ((value: unknown) => boolean) & { optional?: boolean }

function readOne<T>(id: string, held: Held, fields: Record<string, Fits>): T | null {
  const values: Record<string, unknown> = { id }
  for (const [name, fits] of Object.entries(fields)) {
    const value = name === 'points' ? pointsOf(held.get(name)) : held.get(name)
    if (value !== undefined && (name === 'points' || fits(value))) values[name] = value
    else if (!fits.optional) return null
  }
  // Every field was tried by its own rule just now.
  return values as T
}

/** Points are written once and never changed, so a list tried before need not be tried again. */
const tried = new WeakMap<object, Mark['points']>()
function pointsOf(value: unknown): Mark['points'] | undefined {
  if (typeof value !== 'object' || value === null) return undefined
  const known = tried.get(value)
  if (known) return known
  if (!isMarkPoints(value)) return undefined
  const copy: Mark['points'] = value.map((point) =>
    point.length === 3 ? [point[0], point[1], point[2]] : [point[0], point[1]],
  )
  tried.set(value, copy)
  return copy
}

/** Layers and marks, in order. Marks whose layer is gone are kept out of sight. */
export function readMarkup(layersHeld: Held, marksHeld: Held, say: Say): { layers: MarkupLayer[]; marks: Mark[] } {
  const read = <T>(held: Held, list: 'layers' | 'marks', most: number, fields: Record<string, Fits>): T[] => {
    let lost = 0
    const objects = listOf(held, list, most, say).flatMap(([id, one]): T[] => {
      const whole = isId(id) ? readOne<T>(id, one, fields) : null
      if (!whole) lost++
      return whole ? [whole] : []
    })
    if (lost > 0) say(list, `${lost} of the mark-up’s ${list} could not be read and are left out.`)
    return objects
  }
  const layers = read<MarkupLayer>(layersHeld, 'layers', MARKUP.layers, LAYER_FIELDS)
  const known = new Set(layers.map(({ id }) => id))
  const marks = read<Mark>(marksHeld, 'marks', MARKUP.marks, MARK_FIELDS).filter(({ layer }) => known.has(layer))
  return { layers, marks }
}
