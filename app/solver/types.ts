import type { Bank, Feature, Problem } from '~/section'
import type { Inner } from './steady/inner'

/** How the answer was found, with the reason in words for the sheet ("solved exactly: flat base, vertical bands"). */
export type Method = { kind: 'exact' | 'general'; reason: string }

/** Water passing between the aquifer and a bank, feature, seepage reach or the recharge. m²/d, positive leaves the aquifer. */
export type Exchange = {
  /** Path of the object: "left", "right", "features.d1"; for a seepage reach "seepage.0"; for recharge "recharge.r1". */
  of: string
  label: string
  /** m²/d per metre of bank; positive = water leaves the aquifer (recharge zones: positive = water enters; see Balance). */
  rate: number
  /** Aquifer head at the object, m; at a wall the head left and right. */
  head?: number | [left: number, right: number]
  /** Where it stands, m: banks and features. */
  x?: number
  /** What it is: the bank's or feature's kind in the format's words. */
  kind?: (Bank | Feature)['kind']
  /** For walls: flow across, m²/d, + to the right. */
  across?: number
  /** Perched, fed, dry, closed … where that matters. */
  state?: string
}

export type Balance = {
  /** m²/d: each recharge zone's total, banks, features, seepage. `in` and `out` are both ≥ 0. */
  recharge: number
  in: number
  out: number
  /** out − in, m²/d. */
  residual: number
  /** |residual| / max(in, out), or 0 when nothing flows. */
  relative: number
}

/** The divide (q passes smoothly from − to +) or a trough (+ to −). A stretch with q = 0 has from < to. */
export type Divide = { kind: 'divide' | 'trough'; from: number; to: number; head: number }

export type SeepageReach = { from: number; to: number; rate: number }
export type DryReach = { from: number; to: number }
export type LimitCheck = {
  id: string
  name: string
  /** Margin = level − clearance − highest head under the limit, m; negative = broken. */
  margin: number
  /** x of the smallest margin. */
  at: number
  holds: boolean
}
export type Misfit = {
  id: string
  name: string
  x: number
  observed: number
  computed: number
  residual: number
  sd: number | null
}

/** Profile nodes. Where head or flow jumps (walls, sinks) a node is doubled: two entries with the same x, left then right. */
export type Profile = {
  x: Float64Array
  head: Float64Array
  flow: Float64Array
  base: Float64Array
  ground: Float64Array
  /** Saturated thickness h − b, m, ≥ 0. */
  saturated: Float64Array
  /** Transmissivity, m²/d. */
  transmissivity: Float64Array
}

export type Solved = {
  status: 'solved'
  method: Method
  caseId: string | null
  profile: Profile
  left: number
  right: number
  highest: { x: number; to: number; head: number }
  divides: Divide[]
  exchanges: Exchange[]
  balance: Balance
  seepage: SeepageReach[]
  dry: DryReach[]
  limits: LimitCheck[]
  misfits: Misfit[]
  /** The straight line between the banks' heads, and how far the answer lies from it. */
  straight: { left: number; right: number; worst: number; at: number }
  /** Own error estimate: head (m) and flow (m²/d); 0 with `exact` when the closed form applies (round-off only). */
  error: { head: number; flow: number; nodes: number; refinements: number }
  warnings: Problem[]
  /** Everything `readAt`, `flowLines`, `travelTime` and `footing` need besides the profile. Opaque; structured-cloneable. */
  inner: SolvedInner
}

/** No, or no unique, steady answer: why, where, and what would mend it. */
export type Unsolved = {
  status: 'unsolved'
  caseId: string | null
  reason: Problem[]
  /** What would mend it, in a sentence. */
  mend: string
  /** For abstraction beyond what can come: the most the strip can give, m²/d, and to which feature. */
  canGive?: { of: string; rate: number }
  warnings: Problem[]
}

export type Solution = Solved | Unsolved

export type Reading = {
  x: number
  head: number
  /** m²/d, + to the right. At a sink or wall `flow` is the right-hand value and `left`/`right` carry both sides. */
  flow: number
  saturated: number
  ground: number
  base: number
  depth: number
  /** Head on the straight line between the banks. */
  straight: number
  left?: { head: number; flow: number }
  right?: { head: number; flow: number }
}

/** `why` says in words why there is no time. */
export type TravelTime = { days: number | null; exit: 'left' | 'right' | string | null; why?: string }

/** One flow line as a path in metres with time since entering, days. `tube` = flow it carries, m²/d. */
export type FlowLine = {
  points: [x: number, z: number][]
  days: number[]
  born: 'water-table' | 'left' | 'right' | string
  exit: string | null
  tube: number
}
/** Arrow at a spot: seepage velocity components v/n, m/d (true scale, not exaggerated). */
export type Arrow = { x: number; z: number; vx: number; vz: number }

export type FootingLine = {
  /** Stable key: "slope", "ends", "length", "recharge-against-k", "outlet-face", "penetration", "dry", "flooded", "range.<material>", "unsourced". */
  key: string
  /** What is assumed, in words. */
  assumes: string
  /** The number for this section, formatted nowhere: value and unit. */
  value: number | null
  unit: string
  bound: number | null
  /** Where the bound comes from; says "from memory" when it does. */
  source: string
  verdict: 'holds' | 'doubtful' | 'fails'
  place?: { x: number; to?: number }
  /** One sentence: what follows. */
  says: string
}

/** Private to the solver (inside/ and footing/ read it): plain data and typed arrays, see steady/inner.ts. */
export type SolvedInner = Inner
