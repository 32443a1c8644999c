import type { Rect } from '../plot'
import type { Hatch } from '../scene'

/**
 * Strokes and dots of a hatch over a box, device units. Patterns follow the idea of the open standards (FGDC-STD-013-2006 sec. 37,
 * adapted: dots for sand, rings for gravel, dashes for silt, lines for clay, bricks for limestone) and are explained in the
 * legend. They hang on `origin`, so that they move with the ground when the sheet is moved.
 */
export function hatchMarks(
  hatch: Hatch,
  box: Rect,
  unit: number,
  origin: { x: number; y: number },
): { marks: string; dots: string } {
  if (hatch === 'none') return { marks: '', dots: '' }
  const key = `${hatch} ${unit} ${origin.x} ${origin.y} ${box.x} ${box.y} ${box.width} ${box.height}`
  let made = kept.get(key)
  if (!made) {
    if (kept.size >= KEPT) kept.clear()
    made = makeMarks(hatch, box, unit, origin)
    kept.set(key, made)
  }
  return made
}
/** Hatches of the boxes drawn last: while something is dragged, nearly all stay as they are. */
const kept = new Map<string, { marks: string; dots: string }>()
const KEPT = 96

function makeMarks(
  hatch: Hatch,
  box: Rect,
  unit: number,
  origin: { x: number; y: number },
): { marks: string; dots: string } {
  const marks: string[] = []
  const dots: string[] = []
  const f = (value: number) => String(Math.round(value * 10) / 10)
  const line = (x1: number, y1: number, x2: number, y2: number) => marks.push(`M${f(x1)} ${f(y1)}L${f(x2)} ${f(y2)}`)
  const dot = (x: number, y: number, r: number) =>
    dots.push(`M${f(x - r)} ${f(y)}a${f(r)} ${f(r)} 0 1 0 ${f(2 * r)} 0a${f(r)} ${f(r)} 0 1 0 ${f(-2 * r)} 0`)

  /** Rows of a staggered grid; `seed` varies size a little without chance. */
  const grid = (dx: number, dy: number, at: (x: number, y: number, seed: number) => void) => {
    const stepX = dx * unit
    const stepY = dy * unit
    const firstRow = Math.floor((box.y - origin.y) / stepY) - 1
    const rows = Math.ceil(box.height / stepY) + 3
    const firstCol = Math.floor((box.x - origin.x) / stepX) - 1
    const cols = Math.ceil(box.width / stepX) + 3
    if (rows * cols > 40_000) return
    for (let r = firstRow; r < firstRow + rows; r++)
      for (let c = firstCol; c < firstCol + cols; c++) {
        const seed = (((r * 73856093) ^ (c * 19349663)) >>> 0) % 7
        at(origin.x + (c + (r % 2 === 0 ? 0 : 0.5)) * stepX, origin.y + r * stepY, seed)
      }
  }
  const u = unit
  switch (hatch) {
    case 'none':
      break
    case 'sand':
      grid(3.4, 2.4, (x, y, s) => dot(x + (s - 3) * 0.12 * u, y + (s % 3) * 0.18 * u, 0.2 * u))
      break
    case 'gravel':
      grid(3.6, 2.8, (x, y, s) => {
        const r = (0.45 + s * 0.05) * u
        marks.push(
          `M${f(x - r)} ${f(y)}a${f(r)} ${f(r * 0.8)} 0 1 0 ${f(2 * r)} 0a${f(r)} ${f(r * 0.8)} 0 1 0 ${f(-2 * r)} 0`,
        )
      })
      break
    case 'silt':
      grid(3.2, 1.7, (x, y, s) => line(x - 0.7 * u, y, x + (0.5 + (s % 3) * 0.1) * u, y))
      break
    case 'clay':
      grid(6, 1.5, (x, y) => line(x - 2.4 * u, y, x + 2.4 * u, y))
      break
    case 'loam':
      grid(4.2, 2.1, (x, y) => {
        line(x - 0.8 * u, y, x + 0.6 * u, y)
        dot(x + 1.5 * u, y, 0.18 * u)
      })
      break
    case 'peat':
      grid(3.8, 2.6, (x, y) => {
        line(x, y, x, y - 1.1 * u)
        line(x, y, x - 0.7 * u, y - 0.8 * u)
        line(x, y, x + 0.7 * u, y - 0.8 * u)
      })
      break
    case 'till':
      grid(4.4, 3, (x, y, s) => {
        if (s % 2)
          marks.push(
            `M${f(x)} ${f(y - 0.6 * u)}L${f(x + 0.6 * u)} ${f(y + 0.4 * u)}L${f(x - 0.6 * u)} ${f(y + 0.4 * u)}Z`,
          )
        else dot(x, y, 0.2 * u)
        dot(x + 1.6 * u, y + 0.7 * u, 0.16 * u)
      })
      break
    case 'limestone':
      grid(6, 2.2, (x, y) => {
        line(x - 3 * u, y, x + 3 * u, y)
        line(x, y, x, y + 2.2 * u)
      })
      break
    case 'sandstone':
      grid(6, 2.6, (x, y) => {
        line(x - 3 * u, y, x + 3 * u, y)
        dot(x - 1.2 * u, y + 1.2 * u, 0.18 * u)
        dot(x + 1.4 * u, y + 1.3 * u, 0.18 * u)
      })
      break
    case 'rock':
      grid(4.6, 3.4, (x, y) => {
        line(x - 0.6 * u, y, x + 0.6 * u, y)
        line(x, y - 0.6 * u, x, y + 0.6 * u)
      })
      break
    case 'fill':
      grid(4, 3, (x, y, s) => {
        line(x - 0.6 * u, y - 0.6 * u, x + 0.6 * u, y + 0.6 * u)
        if (s % 2) line(x - 0.6 * u, y + 0.6 * u, x + 0.6 * u, y - 0.6 * u)
      })
      break
    case 'base': {
      // Lines x + y = constant, hung on the origin.
      const step = 2.2 * u
      const reach = box.height
      const from = box.x + box.y - origin.x - origin.y
      const first = Math.floor(from / step)
      const last = Math.ceil((from + box.width + reach) / step)
      if (last - first > 4000) break
      for (let i = first; i <= last; i++) {
        const x = origin.x + origin.y + i * step - box.y
        line(x, box.y, x - reach, box.y + reach)
      }
      break
    }
    default:
      hatch satisfies never
  }
  return { marks: marks.join(''), dots: dots.join('') }
}
