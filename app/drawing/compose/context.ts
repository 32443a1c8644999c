import type { LiveSection } from '~/live'
import { formatQuantity, lineAt, type QuantityKind, type Section, type UnitSet } from '~/section'
import { readAt, type Solution } from '~/solver'
import type { Item, Scene, TitleBlock, World } from '../scene'

/** What the sheet asks to see. */
export type ComposeView = {
  live?: LiveSection
  units?: UnitSet
  grid?: boolean
  arrows?: boolean
  flowLines?: boolean
  markup?: boolean
  strips?: boolean
  title?: Partial<TitleBlock>
}

export type Spot = World
/** One place along the strip with the answer there; two at a jump, left then right. */
export type Sample = { x: number; head: number; flow: number; base: number; ground: number }

/** Everything the subjects compose from. */
export type Context = {
  section: Section
  solution: Solution
  view: ComposeView
  units: UnitSet
  /** Drawn range, m. */
  x: { min: number; max: number }
  z: { min: number; max: number }
  left: number
  right: number
  /** Width of the open water drawn beside a bank, m. */
  apron: number
  samples: Sample[]
  materialName(id: string): string
  say(value: number, kind: QuantityKind, unit?: boolean): string
  items: Item[]
  clips: Scene['clips']
  keys: Scene['keys']
}

const SAMPLES = 180

/** The answer sampled for drawing: evenly, and at every break and jump. */
function sample(section: Section, solution: Solution): Sample[] {
  if (solution.status !== 'solved') return []
  const { left, right, profile } = solution
  const xs = new Set<number>()
  for (let i = 0; i <= SAMPLES; i++) xs.add(left + ((right - left) * i) / SAMPLES)
  for (const [x] of [...section.ground, ...section.base]) if (x > left && x < right) xs.add(x)
  for (const feature of section.features) xs.add(feature.x)
  // A coarse mesh has nodes where something happens; a fine one is dense there.
  const stride = Math.max(1, Math.floor(profile.x.length / 240))
  for (let i = 0; i < profile.x.length; i += stride) xs.add(profile.x[i] ?? left)
  return [...xs]
    .sort((a, b) => a - b)
    .flatMap((x): Sample[] => {
      const { head, flow, base, ground, left: before, right: after } = readAt(solution, x)
      if (!before || !after) return [{ x, head, flow, base, ground }]
      return [
        { x, base, ground, ...before },
        { x, base, ground, ...after },
      ]
    })
}

export function contextOf(section: Section, solution: Solution, view: ComposeView): Context {
  const units = view.units ?? 'si'
  const left = section.left.x
  const right = section.right.x
  const length = right - left
  const apron = length * 0.06
  const samples = sample(section, solution)
  const lows = section.base.map(([, z]) => z)
  const highs = section.ground.map(([, z]) => z)
  for (const side of ['left', 'right'] as const) {
    const bank = section[side]
    if (bank.kind === 'water') highs.push(bank.stage)
  }
  for (const { head } of samples) if (Number.isFinite(head)) highs.push(head)
  for (const { level } of section.limits) {
    highs.push(level)
    lows.push(level)
  }
  const low = Math.min(...lows)
  const high = Math.max(...highs)
  const tall = Math.max(high - low, length * 1e-4, 0.01)
  const names = new Map(section.materials.map((material) => [material.id, material.name ?? material.id]))
  return {
    section,
    solution,
    view,
    units,
    x: { min: left - apron, max: right + apron },
    z: {
      min: low - tall * 0.14,
      max: high + tall * (section.recharge.length > 0 ? 0.22 + 0.14 * rowsOf(section) : 0.2),
    },
    left,
    right,
    apron,
    samples,
    materialName: (id) => names.get(id) ?? id,
    say: (value, kind, unit = true) => formatQuantity(value, kind, units, { unit }),
    items: [],
    clips: [],
    keys: {},
  }
}

/** Rows that overlapping recharge zones are drawn in, at most three. */
function rowsOf({ recharge }: Section): number {
  const over = (x: number) => recharge.filter(({ from, to }) => from <= x && x < to).length
  return Math.min(3, Math.max(1, ...recharge.map(({ from }) => over(from))))
}

export const groundAt = (section: Section, x: number) => lineAt(section.ground, x)
export const baseAt = (section: Section, x: number) => lineAt(section.base, x)
export const spots = (line: readonly (readonly [number, number])[]): Spot[] => line.map(([x, z]) => ({ x, z }))
