import type { Arrow, Solution } from '../types'
import { below, materialAt, shareBelow, stationAt } from './stream'
import { gainAt } from './time'

export type ArrowOptions = { columns?: number; rows?: number; from?: number; to?: number }
/** `measure`: "velocity" is seepage velocity v/n; "flux" is Darcy's, taken when a material has no porosity. `fastest` in m/d. */
export type ArrowField = { arrows: Arrow[]; measure: 'velocity' | 'flux'; fastest: number }

/**
 * Velocities on a grid of spots inside the saturated ground: v_x = q·K/T, v_z = ∂ψ/∂x = −(dq/dx)·F − q·∂F/∂x (continuity;
 * over a flat base in one material this is METHODS §3's −w(z−b)/s + v_x·(z−b)/s·dh/dx). True scale, m/d.
 */
export function arrows(solution: Solution, options: ArrowOptions = {}): ArrowField {
  if (solution.status !== 'solved') return { arrows: [], measure: 'flux', fastest: 0 }
  const { columns = 14, rows = 3, from = solution.left, to = solution.right } = options
  const step = (solution.right - solution.left) * 1e-4
  const found: (Arrow & { porosity: number | null })[] = []
  for (let c = 0; c < columns; c++) {
    const x = from + ((c + 0.5) / columns) * (to - from)
    if (!(x > solution.left && x < solution.right)) continue
    const here = stationAt(solution, x, 'right')
    if (!(here.saturated > 0) || !(here.transmissivity > 0)) continue
    const before = stationAt(solution, Math.max(solution.left, x - step), 'right')
    const after = stationAt(solution, Math.min(solution.right, x + step), 'left')
    const gain = gainAt(solution, x)
    for (let r = 0; r < rows; r++) {
      const z = here.base + ((r + 0.5) / rows) * here.saturated
      const { k, porosity } = materialAt(here, z)
      const share = shareBelow(here, z)
      const slope = (unclamped(after, z) - unclamped(before, z)) / (after.x - before.x)
      found.push({ x, z, vx: (here.flow * k) / here.transmissivity, vz: -gain * share - here.flow * slope, porosity })
    }
  }
  const known = found.every(({ porosity }) => porosity !== null)
  let fastest = 0
  const list = found.map(({ porosity, ...arrow }) => {
    const n = known ? (porosity ?? 1) : 1
    const scaled = { ...arrow, vx: arrow.vx / n, vz: arrow.vz / n }
    fastest = Math.max(fastest, Math.hypot(scaled.vx, scaled.vz))
    return scaled
  })
  return { arrows: list, measure: known ? 'velocity' : 'flux', fastest }
}

/** F continued above the water table, so that its slope is right near the top as well. */
const unclamped = (station: Parameters<typeof shareBelow>[0], z: number) =>
  station.transmissivity > 0 ? below(station.stack, station.base, z) / station.transmissivity : 0
