import type { Section } from '~/section'
import { type Station, stationAt } from '../inside/stream'
import type { FootingLine, Solved } from '../types'

/** What every footing line is worked from: the section with the case's values in, its answer, and stations along the strip. */
export type Ground = { section: Section; solution: Solved; row: Station[] }
export type { FootingLine }

/** Stations between jumps, where differences along x mean something. */
export function rowAlong(solution: Solved, count = 160): Station[] {
  const { left, right } = solution
  return Array.from({ length: count + 1 }, (_, i) => {
    const x = left + ((right - left) * i) / count
    return stationAt(solution, x, i === count ? 'left' : 'right')
  })
}

/** √(K_h / K_v) over the saturated thickness, thickness-weighted: how much wider than deep the zone of bent flow is. */
export function stretchAt(section: Section, station: Station): number {
  const { saturated, base, head, stack } = station
  if (!(saturated > 0)) return 1
  // Flow along layers adds conductivities, flow across them adds resistances.
  let along = 0
  let across = 0
  let from = base
  for (const layer of stack) {
    const to = Math.min(layer.to, head)
    if (to <= from) continue
    const anisotropy = section.materials.find(({ id }) => id === layer.material)?.anisotropy ?? 1
    along += layer.k * (to - from)
    across += ((to - from) * anisotropy) / layer.k
    from = to
  }
  return across > 0 ? Math.max(1, Math.sqrt((along / saturated) * (across / saturated))) : 1
}

/** Verdict by two bounds: up to the first it holds, up to the second it is doubtful. */
export function graded(value: number, holds: number, doubtful: number): FootingLine['verdict'] {
  return value <= holds ? 'holds' : value <= doubtful ? 'doubtful' : 'fails'
}

const COMMON = 'common practice'
export const SOURCES = {
  bear: 'Bear (1972): error of order slope² (from memory)',
  haitjema: 'Haitjema (1995): bent flow within about 2·s·√(Kh/Kv) (from memory)',
  haitjemaLength: 'Haitjema (1995, 2006): L > about 5·s·√(Kh/Kv) (from memory)',
  charny:
    'Charny (1951): discharge exact between vertical faces; Polubarinova-Kochina (1962): long bank without tailwater, face 0.742·q/K (from memory)',
  vogel: COMMON,
  common: COMMON,
} as const
