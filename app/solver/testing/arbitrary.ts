import fc from 'fast-check'
import type { Bank, Body, Feature, Point, Section } from '~/section'
import { lineAt } from '../ground/breaks'
import { sectionOf } from '../testing'

// Without fast-check's leaning to 0 and to extremes: a section should look like one somebody drew.
const unit = fc.noBias(fc.integer({ min: 0, max: 1_000_000 })).map((n) => n / 1_000_000)
const units = (count: number) => fc.array(unit, { minLength: count, maxLength: count })
const pick = fc.noBias(fc.nat({ max: 999 }))

type Raw = {
  size: number[]
  base: number[]
  ground: number[]
  banks: number[][]
  bankKinds: number[]
  ks: number[]
  bodies: { kind: number; at: number[]; material: number }[]
  recharge: number[][]
  features: { kind: number; at: number[] }[]
  seepage: boolean
  flat: boolean
}

const raw: fc.Arbitrary<Raw> = fc.record({
  size: units(3),
  base: fc.array(unit, { minLength: 2, maxLength: 6 }),
  ground: fc.array(unit, { minLength: 2, maxLength: 7 }),
  banks: fc.tuple(units(4), units(4)).map((pair) => [...pair]),
  bankKinds: fc.tuple(pick, pick).map((pair) => [...pair]),
  ks: units(4),
  bodies: fc.array(fc.record({ kind: pick, at: units(10), material: pick }), { maxLength: 4 }),
  recharge: fc.array(units(3), { maxLength: 3 }),
  features: fc.array(fc.record({ kind: pick, at: units(4) }), { maxLength: 4 }),
  seepage: fc.boolean(),
  flat: fc.boolean(),
})

const log = (u: number, low: number, high: number) => low * (high / low) ** u

/** Any section a person could draw: all banks, features and bodies, broken bases with humps, seepage on or off. */
export const drawable: fc.Arbitrary<Section> = raw.map(build)

/** As drawable, over a level base with full-height bands or level sheets only, so that the exact path applies. */
export const level: fc.Arbitrary<Section> = raw.map((r) =>
  build({ ...r, flat: true, seepage: false, bodies: r.bodies.map((body) => ({ ...body, kind: body.kind % 2 })) }),
)

function build(r: Raw): Section {
  const length = log(r.size[0] ?? 0, 20, 3000)
  const depth = log(r.size[1] ?? 0, 2, 40)
  const relief = depth * (r.size[2] ?? 0)
  const along = (values: number[]): number[] => values.map((_, i) => (length * i) / (values.length - 1))
  const bases = r.flat ? [0, 0] : r.base.map((u) => u * relief)
  const base: Point[] = along(bases).map((x, i) => [x, bases[i] ?? 0])
  const ground: Point[] = along(r.ground).map((x, i) => [x, lineAt(base, x) + depth * (0.3 + 0.7 * (r.ground[i] ?? 0))])
  // The ground may cut the base between its own vertices: lift it clear.
  const lift = Math.max(0, ...base.map(([x, z]) => z + depth * 0.02 - lineAt(ground, x)))
  for (const point of ground) point[1] += lift
  const bank = (side: 0 | 1): Bank => {
    const x = side === 0 ? 0 : length
    const u = r.banks[side] ?? []
    const kind = (r.bankKinds[side] ?? 0) % 7
    const b = lineAt(base, x)
    const top = lineAt(ground, x)
    if (kind === 0) return { kind: 'no-flow', x }
    if (kind === 1) return { kind: 'inflow', x, rate: ((u[0] ?? 0) - 0.2) * 0.5 }
    // Now and then a stage below the base: a free outfall.
    const stage = kind === 6 ? b - 1 : b + (top - b) * (u[1] ?? 0)
    if (kind <= 3) return { kind: 'water', x, stage, conductance: null, bed: null }
    return {
      kind: 'water',
      x,
      stage,
      conductance: log(u[2] ?? 0, 1e-3, 10),
      bed: kind === 5 ? stage - 0.2 - depth * 0.2 * (u[3] ?? 0) : null,
    }
  }
  const materials = r.ks.map((u, i) => ({ id: `m${i}`, k: log(u, 1e-3, 100), porosity: 0.3 }))
  const bodies: Body[] = r.bodies.map(({ kind, at, material }, i) => ({
    id: `b${i}`,
    material: `m${material % 4}`,
    outline: outlineOf(kind % 5, at, length, depth + relief),
  }))
  const taken = new Set<number>()
  const features = r.features.flatMap(({ kind, at }, i): Feature[] => {
    const x = length * (0.02 + 0.96 * (at[0] ?? 0))
    if (taken.has(x)) return []
    taken.add(x)
    const id = `f${i}`
    const b = lineAt(base, x)
    const levelAt = b + (lineAt(ground, x) - b) * (1.1 * (at[1] ?? 0) - 0.1)
    const conductance = (at[2] ?? 0) < 0.4 ? null : log(at[3] ?? 0, 1e-3, 10)
    if (kind % 4 === 0) return [{ id, kind: 'ditch', x, level: levelAt, conductance }]
    if (kind % 4 === 1) return [{ id, kind: 'drain', x, level: levelAt, conductance }]
    if (kind % 4 === 2) return [{ id, kind: 'trench', x, rate: ((at[1] ?? 0) - 0.2) * log(at[2] ?? 0, 1e-3, 1) }]
    return [{ id, kind: 'wall', x, thickness: 0.1 + (at[1] ?? 0), k: log(at[2] ?? 0, 1e-6, 1) }]
  })
  return sectionOf({
    ground,
    base,
    left: bank(0),
    right: bank(1),
    materials,
    host: 'm0',
    bodies,
    recharge: r.recharge.map(([a = 0, b = 0, c = 0], i) => ({
      id: `r${i}`,
      from: length * Math.min(a, b),
      to: length * Math.max(a, b),
      rate: (c - 0.15) * 0.004,
    })),
    features,
    surfaceSeepage: r.seepage,
  })
}

/** 0 band over the full height, 1 level sheet, 2 lens, 3 slanted sheet, 4 any triangle. */
function outlineOf(kind: number, at: number[], length: number, height: number): Point[] {
  const [a = 0, b = 0, c = 0, d = 0, e = 0, f = 0] = at
  const xl = length * (1.2 * Math.min(a, b) - 0.1)
  const xr = length * (1.2 * Math.max(a, b) - 0.1) + length * 0.01
  const z0 = height * (1.2 * c - 0.1)
  const z1 = z0 + height * (0.01 + 0.4 * d)
  if (kind === 0) return rectangle(xl, xr, -10, 3 * height + 10)
  if (kind === 1) return rectangle(-0.1 * length, 1.1 * length, z0, z1)
  if (kind === 2) {
    return Array.from({ length: 8 }, (_, i): Point => {
      const angle = (i / 8) * 2 * Math.PI
      return [(xl + xr) / 2 + ((xr - xl) / 2) * Math.cos(angle), (z0 + z1) / 2 + ((z1 - z0) / 2) * Math.sin(angle)]
    })
  }
  const slant = height * (e - 0.5)
  if (kind === 3) {
    return [
      [xl, z0],
      [xr, z0 + slant],
      [xr, z1 + slant],
      [xl, z1],
    ]
  }
  return [
    [xl, z0],
    [xr, height * e],
    [xl + (xr - xl) * f, z1 + height * 0.3],
  ]
}

const rectangle = (xl: number, xr: number, z0: number, z1: number): Point[] => [
  [xl, z0],
  [xr, z0],
  [xr, z1],
  [xl, z1],
]
