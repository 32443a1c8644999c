/**
 * Conductance G of a water's bed, from what a site visit can tell. Per metre of bank: q = G·(stage − h), G in m/d.
 *
 * Two resistances in series, d/m, for all the water that reaches the channel:
 * - the bed: c = d / (K_bed·u), with bed thickness d (m), bed conductivity K_bed (m/d), wetted perimeter u (m);
 * - the bending of flow towards a channel that does not reach the base: R = ln(a·D/u) / (π·√(K_h·K_v)), a = 1 for one layer
 *   (Ernst 1962, as in van Beers, ILRI Bulletin 15), D the saturated thickness in which the flow bends (m). R is 0 where the
 *   channel is as wide as the layer is thick (u ≥ a·D).
 *
 * A bank takes water from one side only and so half of the perimeter: its resistances count double.
 */
export type Bed = {
  /** Wetted perimeter of the whole channel, m. */
  perimeter: number
  /** Bed thickness, m; 0: no bed. */
  thickness: number
  /** Bed conductivity, m/d. */
  k: number
}
export type Radial = {
  /** Saturated thickness in which the flow bends, m. */
  depth: number
  /** Horizontal conductivity of the aquifer, m/d. */
  k: number
  /** K_h / K_v. */
  anisotropy: number
}
export type Conductance = {
  /** m/d, or null when nothing stands between water and aquifer. */
  g: number | null
  /** d/m, both counted for the sides the water comes from. */
  bed: number
  radial: number
}

export const ERNST = 'Ernst (1962), one layer; van Beers, ILRI Bulletin 15, sections 3.1–3.2'

/**
 * @param sides 2 for a ditch or drain inside the strip, 1 for a bank.
 * @throws RangeError naming the value that cannot be.
 */
export function conductanceOf(bed: Bed, radial: Radial | null, sides: 1 | 2): Conductance {
  if (!(bed.perimeter > 0)) throw new RangeError('The wetted perimeter must be more than 0.')
  if (!(bed.thickness >= 0)) throw new RangeError('The bed cannot be thinner than 0.')
  if (bed.thickness > 0 && !(bed.k > 0)) throw new RangeError('The conductivity of the bed must be more than 0.')
  const times = sides === 1 ? 2 : 1
  const through = bed.thickness === 0 ? 0 : (times * bed.thickness) / (bed.k * bed.perimeter)
  const bending = radial === null ? 0 : times * radialResistance(bed.perimeter, radial)
  const total = through + bending
  return { g: total > 0 ? 1 / total : null, bed: through, radial: bending }
}

/** Ernst's radial resistance for all the flow to a channel, d/m. */
export function radialResistance(perimeter: number, { depth, k, anisotropy }: Radial): number {
  if (!(depth > 0)) throw new RangeError('The saturated thickness must be more than 0.')
  if (!(k > 0)) throw new RangeError('The conductivity of the aquifer must be more than 0.')
  if (!(anisotropy > 0)) throw new RangeError('The ratio of conductivities must be more than 0.')
  return Math.max(0, Math.log(depth / perimeter) / (Math.PI * (k / Math.sqrt(anisotropy))))
}
