import { type FootingLine, type Ground, graded, SOURCES, stretchAt } from './types'

const SLOPE_HOLDS = 0.1
const SLOPE_DOUBTFUL = 0.3

/** Flow is horizontal: the water table's slope stays small. */
export function slope({ row }: Ground): FootingLine {
  let worst = 0
  let at = row[0]?.x ?? 0
  for (let i = 1; i < row.length; i++) {
    const a = row[i - 1]
    const b = row[i]
    if (!a || !b || !(a.saturated > 0 || b.saturated > 0)) continue
    // Darcy's slope rather than a difference of heads, so that a wall's jump is not taken for a slope.
    const steep =
      b.transmissivity > 0 ? (Math.abs(b.flow) * b.saturated) / (b.transmissivity * Math.max(b.saturated, 1e-9)) : 0
    if (steep > worst) {
      worst = steep
      at = b.x
    }
  }
  const verdict = graded(worst, SLOPE_HOLDS, SLOPE_DOUBTFUL)
  const percent = Math.round(worst * worst * 100)
  return {
    key: 'slope',
    assumes: 'Flow is horizontal; the water table lies flat',
    value: worst,
    unit: 'm/m',
    bound: SLOPE_HOLDS,
    source: SOURCES.bear,
    verdict,
    place: { x: at },
    says:
      verdict === 'holds'
        ? 'The steepest reach is flat enough for horizontal flow.'
        : `The water table is steep here; heads near it may be off by about ${Math.max(1, percent)} % of the depth.`,
  }
}

/** Water falling from above turns to flow sideways within a thin top: recharge is small against conductivity. */
export function rechargeAgainstK({ section, row }: Ground): FootingLine {
  let worst = 0
  let at = section.left.x
  for (const station of row) {
    const rate = section.recharge
      .filter(({ from, to }) => station.x >= from && station.x < to)
      .reduce((sum, zone) => sum + zone.rate, 0)
    const mean = station.saturated > 0 ? station.transmissivity / station.saturated : Number.POSITIVE_INFINITY
    const share = Math.abs(rate) / mean
    if (share > worst) {
      worst = share
      at = station.x
    }
  }
  const verdict = graded(worst, 0.01, 0.1)
  return {
    key: 'recharge-against-k',
    assumes: 'Recharge is small against the conductivity',
    value: worst,
    unit: '',
    bound: 0.01,
    source: SOURCES.common,
    verdict,
    place: { x: at },
    says:
      verdict === 'holds'
        ? 'Recharge spreads sideways without a steep mound.'
        : 'So much recharge needs a downward gradient that this method leaves out; the true water table stands higher.',
  }
}

/** Flow bends near banks and works; away from them it is horizontal. */
export function ends({ section, solution, row }: Ground): FootingLine {
  const length = solution.right - solution.left
  const edges = [
    ...(['left', 'right'] as const).filter((side) => section[side].kind !== 'no-flow').map((side) => section[side].x),
    ...section.features.filter(({ kind }) => kind !== 'wall').map(({ x }) => x),
  ]
  const bent = (station: Ground['row'][number]) =>
    edges.some((x) => Math.abs(station.x - x) < 2 * station.saturated * stretchAt(section, station))
  const share = row.filter(bent).length / row.length
  const verdict = graded(share, 0.1, 0.5)
  return {
    key: 'ends',
    assumes: 'Flow bends only close to banks and works',
    value: share * length,
    unit: 'm',
    bound: 0.1 * length,
    source: `${SOURCES.haitjema}; the shares of the length (10 %, 50 %) are our choice`,
    verdict,
    place: edges[0] === undefined ? undefined : { x: edges[0] },
    says: `${Math.round(share * 100)} % of the strip lies within 2·s·√(Kh/Kv) of a bank or work; heads there are less sure than the flows.`,
  }
}

/** The strip is long against its depth. */
export function length({ section, solution, row }: Ground): FootingLine {
  const long = solution.right - solution.left
  const deep = row.reduce((most, station) => Math.max(most, station.saturated * stretchAt(section, station)), 0)
  const ratio = deep > 0 ? long / deep : Number.POSITIVE_INFINITY
  const verdict = ratio >= 5 ? 'holds' : ratio >= 2 ? 'doubtful' : 'fails'
  return {
    key: 'length',
    assumes: 'The strip is long against its saturated depth',
    value: Number.isFinite(ratio) ? ratio : null,
    unit: '× s·√(Kh/Kv)',
    bound: 5,
    source: SOURCES.haitjemaLength,
    verdict,
    says:
      verdict === 'holds'
        ? 'Long enough for horizontal flow to settle in.'
        : 'Short and deep: flow bends over much of the strip. A two-dimensional check is called for.',
  }
}

/** Water leaves a bank below its surface: the face above the stage is small. */
export function outletFace({ section, row }: Ground): FootingLine | null {
  let worst: { face: number; share: number; x: number } | null = null
  for (const side of ['left', 'right'] as const) {
    const bank = section[side]
    const station = side === 'left' ? row[0] : row[row.length - 1]
    if (bank.kind !== 'water' || !station) continue
    const leaving = side === 'left' ? -station.flow : station.flow
    if (leaving <= 0 || !(station.saturated > 0) || !(station.transmissivity > 0)) continue
    const face = (0.742 * leaving * station.saturated) / station.transmissivity
    const share = face / station.saturated
    if (!worst || share > worst.share) worst = { face, share, x: bank.x }
  }
  if (!worst) return null
  const verdict = graded(worst.share, 0.1, 0.5)
  return {
    key: 'outlet-face',
    assumes: 'Water leaves the ground below the surface of the water it drains to',
    value: worst.face,
    unit: 'm',
    bound: (0.1 * worst.face) / worst.share,
    source: `${SOURCES.charny}; the share of the depth (10 %) is our choice`,
    verdict,
    place: { x: worst.x },
    says:
      verdict === 'holds'
        ? 'Even without water standing against it the wet face would be low; the flow is exact between vertical faces.'
        : 'Water may weep from the bank above its stage, at most this high; the true water table lies above the line near it. The flow is exact between vertical faces.',
  }
}
