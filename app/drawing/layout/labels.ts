import { fitText, textWidth } from '../fonts/measure'
import type { PanelFrame, Plot, PlotText, Rect } from '../plot'
import type { Item, Role, TextItem } from '../scene'
import { inkOf, palette, type Theme } from '../styles'
import type { Device } from './frames'
import { deviceX, deviceY } from './path'

/** Text heights in mm by the classes of the scene. */
export const TEXT_SIZE = { 1.8: 2.5, 2.5: 2.9, 3.5: 3.5, 5: 4.6 } as const

/** How much it costs a label to lie over a millimetre of a line, by what the line stands for; others cost nothing. */
const DEAR: Partial<Record<Role, number>> = {
  'water-table': 5,
  ground: 5,
  stage: 3,
  recharge: 4,
  'recharge-loss': 4,
  'limit-broken': 4,
  'limit-holds': 4,
  limit: 4,
  observation: 2,
  base: 1.5,
  wall: 2,
  ditch: 2,
  drain: 4,
  trench: 2,
  divide: 1.5,
  seepage: 2,
  arrow: 0.8,
  'bank-no-flow': 3,
  'bank-inflow': 3,
  'ground-edge': 1.5,
  'body-edge': 0.6,
  problem: 6,
  'straight-line': 0.4,
}

/** A coarse map of what is drawn where: one cell a millimetre. */
class Ground {
  private readonly cells: Float32Array
  private readonly columns: number
  private readonly rows: number
  constructor(
    private readonly device: Device,
    private readonly step: number,
  ) {
    this.columns = Math.ceil(device.width / step) + 1
    this.rows = Math.ceil(device.height / step) + 1
    this.cells = new Float32Array(this.columns * this.rows)
  }
  private put(x: number, y: number, cost: number) {
    const c = Math.floor(x / this.step)
    const r = Math.floor(y / this.step)
    if (c < 0 || r < 0 || c >= this.columns || r >= this.rows) return
    const i = r * this.columns + c
    this.cells[i] = Math.max(this.cells[i] ?? 0, cost)
  }
  line(x1: number, y1: number, x2: number, y2: number, cost: number) {
    const far = Math.max(this.device.width, this.device.height) * 3
    if (Math.max(Math.abs(x1), Math.abs(y1), Math.abs(x2), Math.abs(y2)) > far) return
    const steps = Math.max(1, Math.ceil(Math.max(Math.abs(x2 - x1), Math.abs(y2 - y1)) / this.step))
    for (let i = 0; i <= steps; i++) this.put(x1 + ((x2 - x1) * i) / steps, y1 + ((y2 - y1) * i) / steps, cost)
  }
  box(x: number, y: number, half: number, cost: number) {
    for (let dy = -half; dy <= half; dy += this.step)
      for (let dx = -half; dx <= half; dx += this.step) this.put(x + dx, y + dy, cost)
  }
  under({ x, y, width, height }: Rect): number {
    let sum = 0
    const c1 = Math.min(this.columns - 1, Math.floor((x + width) / this.step))
    const r1 = Math.min(this.rows - 1, Math.floor((y + height) / this.step))
    for (let r = Math.max(0, Math.floor(y / this.step)); r <= r1; r++)
      for (let c = Math.max(0, Math.floor(x / this.step)); c <= c1; c++) sum += this.cells[r * this.columns + c] ?? 0
    return sum
  }
}

function groundOf(items: readonly Item[], frames: readonly PanelFrame[], device: Device): Ground {
  const u = device.unit
  const ground = new Ground(device, u)
  const byId = new Map(frames.map((frame) => [frame.id, frame]))
  for (const item of items) {
    const cost = DEAR[item.role]
    const frame = byId.get(item.panel)
    if (!cost || !frame) continue
    if (item.kind === 'path') {
      for (let i = 1; i < item.points.length; i++) {
        const [a, b] = [item.points[i - 1], item.points[i]]
        if (a && b)
          ground.line(deviceX(frame, a.x), deviceY(frame, a.z), deviceX(frame, b.x), deviceY(frame, b.z), cost)
      }
    } else if (item.kind === 'symbol')
      ground.box(
        deviceX(frame, item.at.x) + (item.shift?.dx ?? 0) * u,
        deviceY(frame, item.at.z) + (item.shift?.dy ?? 0) * u + (item.symbol.endsWith('-arrow') ? 2.2 * u : 0),
        (item.symbol === 'holds' || item.symbol === 'broken' ? 0.6 : 1.4) * u,
        cost,
      )
  }
  return ground
}

const UP_DOWN = [0, -1.2, 1.2, -2.4, 2.4, -3.6, 3.6]
const ASIDE = [0, -0.35, 0.35, -0.75, 0.75, -1.1, 1.1]

/**
 * Places texts by their priority: inside the panel, clear of every text already placed, and where they cover the least of what
 * matters, not far from what they name. A text that finds no room is left out rather than drawn over another or cut.
 */
export function placeTexts(
  texts: readonly TextItem[],
  items: readonly Item[],
  frames: readonly PanelFrame[],
  device: Device,
  theme: Theme,
): Plot[] {
  const u = device.unit
  const ground = groundOf(items, frames, device)
  const taken: Rect[] = []
  const plots: PlotText[] = []
  const halo = palette(theme).sheet
  for (const item of [...texts].sort((a, b) => b.priority - a.priority || (a.id < b.id ? -1 : 1))) {
    const frame = frames.find(({ id }) => id === item.panel)
    if (!frame) continue
    const { box } = frame
    const size = TEXT_SIZE[item.size] * u
    const anchorX = deviceX(frame, item.at.x)
    const anchorY = deviceY(frame, item.at.z)
    // What hangs on something out of sight is out of sight.
    if (anchorX < box.x - 2 || anchorX > box.x + box.width + 2) continue
    if (anchorY < box.y - 2 || anchorY > box.y + box.height + 2) continue
    const text = fitText(item.text, box.width * 0.6, size, item.weight)
    const width = textWidth(text, size, item.weight)
    if (text === '' || width > box.width - 1.2 * u) continue
    const at = anchorX + (item.shift?.dx ?? 0) * u
    const left = item.anchor === 'start' ? at : item.anchor === 'end' ? at - width : at - width / 2
    const top =
      anchorY + (item.shift?.dy ?? 0) * u - (item.base === 'bottom' ? size : item.base === 'middle' ? size / 2 : 0)
    let best: { rect: Rect; cost: number } | null = null
    for (const lines of UP_DOWN)
      for (const part of ASIDE) {
        const far = Math.abs(lines) * 5 + Math.abs(part) * Math.min(width / u, 30) * 0.6
        if (best && far >= best.cost) continue
        const wanted = left + part * width
        const x = Math.min(Math.max(wanted, box.x + 0.6 * u), box.x + box.width - width - 0.6 * u)
        const rect: Rect = { x, y: top + lines * size, width, height: size }
        if (rect.y < box.y || rect.y + size > box.y + box.height) continue
        if (taken.some((other) => overlap(rect, other, u))) continue
        const cost = far + ground.under(rect) * 0.55
        if (!best || cost < best.cost) best = { rect, cost }
      }
    if (!best) continue
    const { rect } = best
    taken.push(rect)
    plots.push({
      kind: 'text',
      id: item.id,
      of: item.of,
      role: item.role,
      layer: item.layer,
      x: Math.round(rect.x * 100) / 100,
      y: Math.round((rect.y + size * 0.8) * 100) / 100,
      text,
      size,
      weight: item.weight,
      family: 'sans',
      anchor: 'start',
      fill: inkOf(item.role, theme, u).fill ?? palette(theme).ink,
      halo: 0.6 * u,
      haloColour: halo,
    })
  }
  // Painted in the order of the scene, so that lists compare.
  const order = new Map(texts.map(({ id }, i) => [id, i]))
  return plots.sort((a, b) => (order.get(a.id) ?? 0) - (order.get(b.id) ?? 0))
}

/** Do two labels touch, with half a millimetre between lines and one between words? */
export const overlap = (a: Rect, b: Rect, u: number): boolean =>
  a.x < b.x + b.width + u && b.x < a.x + a.width + u && a.y < b.y + b.height + 0.3 * u && b.y < a.y + a.height + 0.3 * u
