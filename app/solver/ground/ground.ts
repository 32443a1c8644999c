// biome-ignore-all lint/style/noNonNullAssertion: the loops keep every index inside its array.
import type { Section } from '~/section'
import { breaksOf, type Edge, edgeAt, edgesOf, lineAt } from './breaks'

/**
 * The ground worked out once per section: between two neighbouring breaks (a panel) the order of the materials does not
 * change and every contact is a straight line, so a column at any x costs a few multiplications. Plain data and typed
 * arrays: it can be cloned to a worker.
 */
export type Ground = {
  /** Breaks, m; panel p lies between x[p] and x[p+1]. */
  x: Float64Array
  /** Base and ground at the breaks, m. */
  base: Float64Array
  surface: Float64Array
  /** Recharge per panel, m/d; overlaps added, from ≤ x < to. */
  recharge: Float64Array
  /** Layers of panel p are start[p] … start[p+1]−1, from the base up; the last one continues upward without end. */
  start: Int32Array
  /** Underside of each layer at the panel's left and right end, m. */
  zl: Float64Array
  zr: Float64Array
  /** Horizontal conductivity of each layer, m/d, and its material's place in section.materials. */
  k: Float64Array
  material: Int32Array
}

/** Reads a section into panels. Pure; takes any section that makes sense (see `checkSense`). */
export function prepareGround(section: Section): Ground {
  const groundEdges = edgesOf(section.ground, false, -1)
  const baseEdges = edgesOf(section.base, false, -2)
  const bodyEdges = section.bodies.flatMap((body, index) => edgesOf(body.outline, true, index))
  const x = Float64Array.from(
    breaksOf(section, section.bodies.length > 0 ? [...groundEdges, ...baseEdges, ...bodyEdges] : []),
  )
  const panels = x.length - 1
  const places = new Map(section.materials.map((material, index) => [material.id, index]))
  const host = places.get(section.host) ?? 0
  const bodyMaterial = section.bodies.map((body) => places.get(body.material) ?? host)
  const base = x.map((at) => lineAt(section.base, at))
  const surface = x.map((at) => lineAt(section.ground, at))
  const recharge = new Float64Array(panels)
  const start = new Int32Array(panels + 1)
  const zl: number[] = []
  const zr: number[] = []
  const material: number[] = []
  const inside = new Uint8Array(section.bodies.length)
  for (let p = 0; p < panels; p++) {
    const xl = x[p]!
    const xr = x[p + 1]!
    const mid = (xl + xr) / 2
    let rate = 0
    for (const zone of section.recharge) if (mid >= zone.from && mid < zone.to) rate += zone.rate
    recharge[p] = rate
    start[p] = zl.length
    const bottom = (base[p]! + base[p + 1]!) / 2
    const top = (surface[p]! + surface[p + 1]!) / 2
    inside.fill(0)
    const spanning: { z: number; edge: Edge }[] = []
    for (const edge of bodyEdges) if (edge.xl < mid && edge.xr > mid) spanning.push({ z: edgeAt(edge, mid), edge })
    spanning.sort((a, b) => a.z - b.z)
    const put = (z0: number, z1: number) => {
      // A later body lies over an earlier one.
      let above = inside.length - 1
      while (above >= 0 && inside[above] === 0) above--
      const here = above < 0 ? host : bodyMaterial[above]!
      if (zl.length > start[p]! && material[material.length - 1] === here) return
      zl.push(z0)
      zr.push(z1)
      material.push(here)
    }
    let next = 0
    // What lies below the base only opens and closes bodies. A ground that touches the base still has what is just above it.
    for (; next < spanning.length && spanning[next]!.z <= bottom; next++) inside[spanning[next]!.edge.body]! ^= 1
    put(base[p]!, base[p + 1]!)
    for (; next < spanning.length && spanning[next]!.z < top; next++) {
      const { edge } = spanning[next]!
      inside[edge.body]! ^= 1
      const following = spanning[next + 1]
      if (following && following.z === spanning[next]!.z) continue
      put(edgeAt(edge, xl), edgeAt(edge, xr))
    }
  }
  start[panels] = zl.length
  return {
    x,
    base,
    surface,
    recharge,
    start,
    zl: Float64Array.from(zl),
    zr: Float64Array.from(zr),
    k: Float64Array.from(material, (index) => section.materials[index]?.k ?? Number.NaN),
    material: Int32Array.from(material),
  }
}

/** The panel that holds x; at a break the one to the right, or to the left with `side` 'left'. */
export function panelAt(ground: Ground, x: number, side: 'left' | 'right' = 'right'): number {
  let low = 0
  let high = ground.x.length - 1
  while (high - low > 1) {
    const mid = (low + high) >> 1
    const at = ground.x[mid]!
    if (side === 'right' ? at <= x : at < x) low = mid
    else high = mid
  }
  return low
}

/** Where x lies in its panel, 0 … 1. */
export function shareOf(ground: Ground, panel: number, x: number): number {
  const xl = ground.x[panel]!
  return Math.min(1, Math.max(0, (x - xl) / (ground.x[panel + 1]! - xl)))
}

/** Base and ground surface at x, m. */
export function baseAt(ground: Ground, x: number, panel = panelAt(ground, x)): number {
  const share = shareOf(ground, panel, x)
  return ground.base[panel]! + (ground.base[panel + 1]! - ground.base[panel]!) * share
}
export function surfaceAt(ground: Ground, x: number, panel = panelAt(ground, x)): number {
  const share = shareOf(ground, panel, x)
  return ground.surface[panel]! + (ground.surface[panel + 1]! - ground.surface[panel]!) * share
}

/** Slope of the base within a panel, m/m. */
export const baseSlope = (ground: Ground, panel: number): number =>
  (ground.base[panel + 1]! - ground.base[panel]!) / (ground.x[panel + 1]! - ground.x[panel]!)
export const surfaceSlope = (ground: Ground, panel: number): number =>
  (ground.surface[panel + 1]! - ground.surface[panel]!) / (ground.x[panel + 1]! - ground.x[panel]!)

/** Whether the base is level everywhere and every contact level within its panel: then Girinskii's potential is exact. */
export function isLevel(ground: Ground): boolean {
  const level = ground.base[0]!
  const close = 1e-12 * Math.max(1, Math.abs(level))
  for (const z of ground.base) if (Math.abs(z - level) > close) return false
  for (let i = 0; i < ground.zl.length; i++) if (Math.abs(ground.zl[i]! - ground.zr[i]!) > close) return false
  return true
}
