import { createRequire } from 'node:module'
import type { Section } from '~/section'

/** The parts of odex (Hairer and Wanner's extrapolation code) used here; the package ships only its own source, not types. */
type Integrator = {
  absoluteTolerance: number
  relativeTolerance: number
  maxSteps: number
  initialStepSize: number
  denseOutput: boolean
  solve(f: (x: number, y: number[]) => number[], x: number, y: number[], xEnd: number): { y: number[]; outcome: number }
}
// By require: an import would pull the package's TypeScript source into our type check.
const { Solver } = createRequire(import.meta.url)('odex') as { Solver: new (n: number) => Integrator }

/**
 * A second opinion that shares nothing with the solver: the section's own lines and outlines are read point by point, and
 * dh/dx = −q/T is integrated across the strip by a general-purpose code (odex), shooting from the left bank for what the right
 * bank asks. For strips without ditches held at a level, seepage or dry reaches.
 */
export type Reference = { at: { x: number; head: number; flow: number }[] }

const onLine = (line: [number, number][], x: number): number => {
  for (let i = 1; i < line.length; i++) {
    const [xa, za] = line[i - 1] ?? [0, 0]
    const [xb, zb] = line[i] ?? [0, 0]
    if (x <= xb) return za + ((zb - za) * (x - xa)) / (xb - xa)
  }
  return line[line.length - 1]?.[1] ?? Number.NaN
}

/** Heights where a vertical line at x enters and leaves an outline, in pairs. */
function pierced(outline: [number, number][], x: number): number[] {
  const z: number[] = []
  outline.forEach(([xa, za], i) => {
    const [xb, zb] = outline[(i + 1) % outline.length] ?? [0, 0]
    if ((xa <= x && xb > x) || (xb <= x && xa > x)) z.push(za + ((zb - za) * (x - xa)) / (xb - xa))
  })
  return z.sort((a, b) => a - b)
}

/** ∫ K dz from the base to h at x, from the outlines themselves. */
export function plainTransmissivity(section: Section, x: number, h: number): number {
  const base = onLine(section.base, x)
  const ground = onLine(section.ground, x)
  const k = new Map(section.materials.map((material) => [material.id, material.k]))
  const host = k.get(section.host) ?? Number.NaN
  const spans = section.bodies.map((body) => ({ z: pierced(body.outline, x), k: k.get(body.material) ?? Number.NaN }))
  const cuts = [base, h, ground, ...spans.flatMap(({ z }) => z)]
    .filter((z) => z >= base && z <= h)
    .sort((a, b) => a - b)
  let total = 0
  for (let i = 1; i < cuts.length; i++) {
    const low = cuts[i - 1] ?? 0
    const high = cuts[i] ?? 0
    if (high <= low) continue
    // The material at the ground continues upward.
    const mid = Math.min((low + high) / 2, ground - 1e-9)
    let here = host
    for (const span of spans) {
      for (let j = 0; j + 1 < span.z.length; j += 2) {
        if (mid > (span.z[j] ?? 0) && mid < (span.z[j + 1] ?? 0)) here = span.k
      }
    }
    total += here * (high - low)
  }
  return total
}

const gainAt = (section: Section, x: number): number =>
  section.recharge.reduce((sum, { from, to, rate }) => (x >= from && x < to ? sum + rate : sum), 0)

/** Crosses the strip from the left with a head and a flow. Null with the way it failed when the water ran out. */
function shoot(section: Section, stops: number[], head: number, flow: number) {
  const at: Reference['at'] = []
  let h = head
  let q = flow
  for (let i = 1; i < stops.length; i++) {
    const xa = stops[i - 1] ?? 0
    const xb = stops[i] ?? 0
    const w = gainAt(section, (xa + xb) / 2)
    const start = q
    let dry = false
    const solver = new Solver(1)
    solver.absoluteTolerance = 1e-8
    solver.relativeTolerance = 1e-8
    solver.initialStepSize = (xb - xa) / 20
    solver.maxSteps = 3000
    const thin = 1e-7
    const inside = (x: number) => Math.min(Math.max(x, xa + (xb - xa) * 1e-12), xb - (xb - xa) * 1e-12)
    const result = solver.solve(
      (x, y) => {
        const place = inside(x)
        const floor = onLine(section.base, place)
        const s = (y[0] ?? 0) - floor
        if (s < thin) dry = true
        return [-(start + w * (x - xa)) / plainTransmissivity(section, place, floor + Math.max(s, thin))]
      },
      xa,
      [h],
      xb,
    )
    h = result.y[0] ?? Number.NaN
    q = start + w * (xb - xa)
    if (dry || result.outcome !== 0 || !Number.isFinite(h)) return { at, h, q, dry: true }
    at.push({ x: xb, head: h, flow: q })
    const feature = section.features.find(({ x }) => x === xb)
    if (!feature) continue
    if (feature.kind === 'trench') q -= feature.rate
    else if (feature.kind === 'ditch') q -= (feature.conductance ?? 0) * (h - feature.level)
    else if (feature.kind === 'drain') q -= (feature.conductance ?? 0) * Math.max(0, h - feature.level)
    else {
      const base = onLine(section.base, xb)
      const square = (h - base) ** 2 - (2 * q * feature.thickness) / feature.k
      if (square <= 0) return { at, h, q, dry: true }
      h = base + Math.sqrt(square)
    }
  }
  return { at, h, q, dry: false }
}

/** Flow out of a bank at head h minus what arrives: 0 at the answer. + means too much head or flow came across. */
function surplus(section: Section, end: { h: number; q: number; dry: boolean }): number {
  const bank = section.right
  if (end.dry) return -1
  if (bank.kind === 'no-flow') return end.q
  if (bank.kind === 'inflow') return end.q + bank.rate
  if (bank.conductance === null) return end.h - bank.stage
  return bank.conductance * (Math.max(end.h, bank.bed ?? Number.NEGATIVE_INFINITY) - bank.stage) - end.q
}

/**
 * The answer by bisection on what the left bank leaves open (its flow when it holds the head, else its head). `low` and `high`
 * must hold it. More head at the left, or more flow from a held head's view less, arrives as more head at the right.
 */
export function reference(section: Section, low: number, high: number): Reference | null {
  const { left, right } = section
  const vertices = section.bodies.flatMap(({ outline }) => outline.map(([x]) => x))
  const stops = [
    ...new Set([
      left.x,
      right.x,
      ...section.base.map(([x]) => x),
      ...section.ground.map(([x]) => x),
      ...vertices,
      ...section.recharge.flatMap(({ from, to }) => [from, to]),
      ...section.features.map(({ x }) => x),
      ...Array.from({ length: 9 }, (_, i) => left.x + ((right.x - left.x) * (i + 1)) / 10),
    ]),
  ]
    .filter((x) => x >= left.x && x <= right.x)
    .sort((a, b) => a - b)
  const held = left.kind === 'water' && left.conductance === null
  const run = (value: number) => {
    if (left.kind === 'water' && left.conductance === null) return shoot(section, stops, left.stage, value)
    if (left.kind === 'no-flow') return shoot(section, stops, value, 0)
    if (left.kind === 'inflow') return shoot(section, stops, value, left.rate)
    return shoot(
      section,
      stops,
      value,
      -(left.conductance ?? 0) * (Math.max(value, left.bed ?? Number.NEGATIVE_INFINITY) - left.stage),
    )
  }
  // With a water bank on the right more head left over is +; with a flow asked there, more head sheds more on the way: −.
  const byFlow = right.kind === 'no-flow' || right.kind === 'inflow'
  let a = low
  let b = high
  for (let k = 0; k < 60; k++) {
    const mid = (a + b) / 2
    const end = run(mid)
    const over = surplus(section, end)
    // A larger head at the left is a larger head everywhere; a larger flow to the right a smaller head.
    const tooMuchHead = end.dry ? false : byFlow ? over < 0 : over > 0
    if (tooMuchHead !== held) b = mid
    else a = mid
    if (b - a < 1e-10 * (Math.abs(a) + Math.abs(b))) break
  }
  const end = run(held ? a : b)
  return end.dry ? null : { at: end.at }
}
