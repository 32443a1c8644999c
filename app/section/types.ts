/**
 * The section document, public format version 1. SI: metres and days; x to the right along the section, z up.
 * Flows are per metre of bank. This is what the API takes and gives, what the solver reads, and what snapshots
 * and revisions hold. `name` and `note` may stand on any object.
 */
export type Point = [x: number, z: number]

export type Named = { name?: string; note?: string }

/** A bank of open water. `conductance` G in m/d: null = the water stands directly against the aquifer (h = stage). */
export type WaterBank = Named & {
  kind: 'water'
  x: number
  stage: number
  conductance: number | null
  /** Elevation of the underside of the bed, m; below it the water is perched. */
  bed: number | null
}
export type NoFlowBank = Named & { kind: 'no-flow'; x: number }
/** `rate` in m²/d, positive into the aquifer at either end. */
export type InflowBank = Named & { kind: 'inflow'; x: number; rate: number }
export type Bank = WaterBank | NoFlowBank | InflowBank

export type Material = Named & {
  id: string
  /** Horizontal hydraulic conductivity, m/d. */
  k: number
  /** K horizontal / K vertical. */
  anisotropy?: number
  specificYield?: number
  /** Effective porosity. */
  porosity?: number
}

export type Body = Named & { id: string; material: string; outline: Point[] }

/** Recharge on from ≤ x < to, m/d, may be negative; overlaps add. */
export type RechargeZone = Named & { id: string; from: number; to: number; rate: number }

export type Ditch = Named & { id: string; kind: 'ditch'; x: number; level: number; conductance: number | null }
export type Drain = Named & { id: string; kind: 'drain'; x: number; level: number; conductance: number | null }
/** Pumped, m²/d, positive takes water out. */
export type Trench = Named & { id: string; kind: 'trench'; x: number; rate: number }
/** Vertical cut-off wall down to the base; thickness m, k m/d. */
export type Wall = Named & { id: string; kind: 'wall'; x: number; thickness: number; k: number }
export type Feature = Ditch | Drain | Trench | Wall

export type Observation = Named & { id: string; x: number; head: number; date?: string; sd?: number }

export type Limit = Named & { id: string; from: number; to: number; level: number; clearance: number }

/** A named set of changed values. `set` maps a path ("left.stage", "recharge.r1.rate") to its value in this case. */
export type Case = Named & { id: string; off: string[]; set: Record<string, CaseValue> }
export type CaseValue = number | string | boolean | null

export type Section = Named & {
  format: 'doab.section'
  version: 1
  title: string
  datum: string
  /** x strictly increasing, spanning left.x … right.x. */
  ground: Point[]
  /** Top of the impermeable base; same rule as the ground. */
  base: Point[]
  left: Bank
  right: Bank
  materials: Material[]
  /** Id of the material wherever no body lies. */
  host: string
  bodies: Body[]
  recharge: RechargeZone[]
  features: Feature[]
  observations: Observation[]
  limits: Limit[]
  cases: Case[]
  /** Where an input comes from, by its path: { "materials.sand.k": "slug test P-2" }. */
  sources: Record<string, string>
  /** The ground holds the water table down where it would rise above it. */
  surfaceSeepage: boolean
}

/**
 * Something wrong or doubtful in a section. `path` uses the format's own words, with ids for objects in lists
 * ("bodies.b1.outline.3", "left.stage"); `place` is a spot on the drawing, where one can be named.
 */
export type Problem = { path: string; message: string; place?: { x: number; z?: number; to?: number } }

export type ParseResult = { ok: true; section: Section } | { ok: false; errors: Problem[] }
