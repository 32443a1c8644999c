import type { Section } from '~/section'
import type { SheetOptions } from '../sheet-store'
import { openTogether } from '../testing'
import { handleAt, handlesOf } from './handles'
import { TOOLS } from './index'
import { insideBox } from './inside'
import { createMachine } from './machine'
import type { At, Draft, Handle, Hit, Snapped, Spot, Surface } from './types'

/** One pixel is a metre along and a decimetre up. */
const SCALE: Spot = { x: 1, z: 0.1 }
const toPixels = ({ x, z }: Spot) => ({ x, y: 200 - z / SCALE.z })

type How = Partial<Pick<At, 'shift' | 'alt' | 'ctrl' | 'kind' | 'pressure'>>

/**
 * A sheet with a tool in hand and a pointer to move over it, in metres: `down`, `move`, `up`, `click`, `drag`, `double`, `key`.
 * Handles are found as on the canvas; other things where the test says they are (`things`).
 */
export function takeTool(
  options: { section?: Section; things?: (at: At) => string | null; sheet?: Partial<SheetOptions> } = {},
) {
  const [desk, other] = openTogether(['Ada', 'Ben'], options.sheet, options.section)
  if (!desk || !other) throw new Error('two desks')
  const { sheet } = desk
  const shown: { draft: Draft | null; pans: [number, number][] } = { draft: null, pans: [] }
  const answers: (string | null)[] = []
  let catches: (spot: Spot) => Snapped | null = () => null
  // Far from the ids of the strip (d1, b1 …).
  let ids = 100

  const handles = (): Handle[] => {
    const { picked, live, caseId } = sheet.get()
    return handlesOf(picked, live, caseId, 15)
  }
  const surface: Surface = {
    sheet,
    scale: () => SCALE,
    hit(at): Hit | null {
      const handle = handleAt(handles(), at, toPixels)
      if (handle) return { path: handle.of, handle }
      const path = options.things?.(at) ?? null
      return path === null ? null : { path }
    },
    inside: (box) => insideBox(box, sheet.get().live, sheet.get().caseId, true),
    snap: (spot, { free }) => (free ? null : catches(spot)) ?? { ...surface.tidy(spot), to: null },
    tidy: ({ x, z }) => ({ x: Math.round(x * 10) / 10, z: Math.round(z * 100) / 100 }),
    show: (draft) => {
      shown.draft = draft
    },
    askText: () => Promise.resolve(answers.shift() ?? null),
    pan: (dx, dy) => shown.pans.push([dx, dy]),
    id: (prefix) => `${prefix}${++ids}`,
    order: () => String(++ids).padStart(6, '0'),
    today: () => '2026-05-02',
    who: () => 'Ada',
    length: (metres) => `${metres.toFixed(2)} m`,
  }
  const machine = createMachine(surface, TOOLS[sheet.get().tool])
  sheet.subscribe(() => machine.use(TOOLS[sheet.get().tool]))

  const at = (x: number, z: number, how: How = {}): At => ({
    x,
    z,
    px: toPixels({ x, z }).x,
    py: toPixels({ x, z }).y,
    panel: 'section',
    kind: 'mouse',
    shift: false,
    alt: false,
    ctrl: false,
    pressure: 0.5,
    ...how,
  })
  const pointer = {
    down: (x: number, z: number, how?: How) => machine.down(at(x, z, how)),
    move: (x: number, z: number, how?: How) => {
      machine.move(at(x, z, how))
      sheet.settle()
    },
    up: (x: number, z: number, how?: How) => machine.up(at(x, z, how)),
    click(x: number, z: number, how?: How) {
      machine.move(at(x, z, how))
      machine.down(at(x, z, how))
      machine.up(at(x, z, how))
      sheet.settle()
    },
    drag(from: [number, number], to: [number, number], how?: How) {
      machine.down(at(...from, how))
      machine.move(at((from[0] + to[0]) / 2, (from[1] + to[1]) / 2, how))
      machine.move(at(...to, how))
      machine.up(at(...to, how))
      sheet.settle()
    },
    double(x: number, z: number, how?: How) {
      machine.double(at(x, z, how))
      machine.up(at(x, z, how))
      machine.doubleUp(at(x, z, how))
      sheet.settle()
    },
    key: (key: string) => machine.key({ key, shift: false, alt: false }),
    cancel: () => {
      machine.cancel()
      sheet.settle()
    },
  }
  return {
    sheet,
    other,
    sent: desk.sent,
    machine,
    pointer,
    shown,
    /** What the next text fields are answered with. */
    answers,
    snapTo: (next: typeof catches) => {
      catches = next
    },
    section: () => sheet.get().live.section,
    key: (line: 'ground' | 'base', i: number) => sheet.get().live.keys[line][i] ?? '',
  }
}
