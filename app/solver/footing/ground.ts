import { usualRange } from './ranges'
import { type FootingLine, type Ground, graded, SOURCES } from './types'

/** A ditch or drain without a resistance is taken to reach the base. */
export function penetration({ section, row }: Ground): FootingLine | null {
  const works = section.features.filter((feature) => feature.kind === 'ditch' || feature.kind === 'drain')
  if (works.length === 0) return null
  let deepest = 0
  let at = works[0]?.x ?? 0
  let bare = 0
  for (const work of works) {
    if (work.conductance !== null) continue
    bare++
    const station = row.reduce((best, next) => (Math.abs(next.x - work.x) < Math.abs(best.x - work.x) ? next : best))
    if (station.saturated >= deepest) {
      deepest = station.saturated
      at = work.x
    }
  }
  return {
    key: 'penetration',
    assumes: 'Ditches and drains take water over the whole depth, or carry an entry resistance',
    value: bare === 0 ? 0 : deepest,
    unit: 'm',
    bound: 0,
    source: `${SOURCES.common}; radial entry after Ernst (1962)`,
    verdict: bare === 0 ? 'holds' : 'doubtful',
    place: bare === 0 ? undefined : { x: at },
    says:
      bare === 0
        ? 'Every ditch and drain has a conductance.'
        : `${bare === 1 ? 'One stands' : `${bare} stand`} in ground saturated to this depth without a conductance: too much water is drawn. Give a conductance (bed, entry, radial flow).`,
  }
}

/** The water table stays between base and ground. */
export function staysBetween({ solution, row, section }: Ground): FootingLine[] {
  const lines: FootingLine[] = []
  const dry = solution.dry.reduce((sum, { from, to }) => sum + (to - from), 0)
  lines.push({
    key: 'dry',
    assumes: 'The aquifer carries water everywhere',
    value: dry,
    unit: 'm',
    bound: 0,
    source: SOURCES.common,
    verdict: dry > 0 ? 'doubtful' : 'holds',
    place: spot(solution.dry[0]),
    says:
      dry > 0
        ? 'Here the base stands dry or carries only a film; heads there are the base itself.'
        : 'No reach runs dry.',
  })
  let above = 0
  let at: number | undefined
  let closest = Number.POSITIVE_INFINITY
  for (const station of row) {
    const ground = heightAt(section.ground, station.x)
    closest = Math.min(closest, ground - station.head)
    if (station.head > ground + 1e-9 && station.head - ground > above) {
      above = station.head - ground
      at = station.x
    }
  }
  const wet = solution.seepage.reduce((sum, { from, to }) => sum + (to - from), 0)
  const springs = solution.seepage.length
  const flooded = above > 1e-6
  lines.push({
    key: 'flooded',
    assumes: 'The ground stays dry',
    value: flooded ? -above : springs ? wet : closest,
    unit: 'm',
    bound: 0,
    source: SOURCES.common,
    verdict: flooded ? 'fails' : springs ? 'doubtful' : 'holds',
    place: flooded && at !== undefined ? { x: at } : spot(solution.seepage[0]),
    says: flooded
      ? 'The computed water table stands above the ground. Let the ground seep, or lower the load.'
      : springs
        ? 'Water comes out at the surface over this length; what runs off there is counted as seepage.'
        : 'Least depth from ground to water.',
  })
  return lines
}

/** Each material's conductivity lies within what is usual for soil of its name. */
export function usual({ section }: Ground): FootingLine[] {
  const used = new Set([section.host, ...section.bodies.map(({ material }) => material)])
  return section.materials
    .filter(({ id }) => used.has(id))
    .flatMap((material): FootingLine[] => {
      const range = usualRange(material.name ?? '')
      if (!range) return []
      const off =
        material.k < range.low ? range.low / material.k : material.k > range.high ? material.k / range.high : 1
      const verdict = graded(off, 1, 10)
      return [
        {
          key: `range.${material.id}`,
          assumes: `${material.name ?? material.id}: conductivity usual for ${range.soil}`,
          value: material.k,
          unit: 'm/d',
          bound: material.k > range.high ? range.high : range.low,
          source: `${range.source} (${range.basis})`,
          verdict,
          says:
            verdict === 'holds'
              ? 'Within the published range.'
              : `Outside the published range for ${range.soil} by a factor of ${off >= 10 ? Math.round(off) : off.toFixed(1)}. Check the unit and the test.`,
        },
      ]
    })
}

/** A tight body under recharge does not hold water up above the water table drawn. */
export function perching({ section, row }: Ground): FootingLine | null {
  let worst = 0
  let at: number | undefined
  let blocked = false
  for (const station of row) {
    const rate = section.recharge
      .filter(({ from, to }) => station.x >= from && station.x < to)
      .reduce((sum, zone) => sum + zone.rate, 0)
    if (rate <= 0) continue
    const ground = heightAt(section.ground, station.x)
    let from = station.base
    for (const layer of station.stack) {
      const to = Math.min(layer.to, ground)
      if (to <= from) continue
      const material = section.materials.find(({ id }) => id === layer.material)
      const vertical = layer.k / (material?.anisotropy ?? 1)
      if (rate >= vertical) blocked = true
      const wetFrom = Math.min(to, station.head)
      const loss = ((wetFrom - from) * rate) / vertical
      if (loss > worst || (rate >= vertical && at === undefined)) {
        worst = Math.max(worst, loss)
        at = station.x
      }
      from = to
    }
  }
  if (at === undefined) return null
  const bound = 0.1
  const verdict = blocked ? 'fails' : worst <= bound ? 'holds' : worst <= 5 * bound ? 'doubtful' : 'fails'
  return {
    key: 'perching',
    assumes: 'Head does not change with depth; nothing holds recharge up',
    value: worst,
    unit: 'm',
    bound,
    source: `${SOURCES.common}; loss = w·thickness/Kv`,
    verdict,
    place: { x: at },
    says: blocked
      ? 'Recharge exceeds the vertical conductivity of a layer here: water would stand on top of it, above the line drawn.'
      : 'Largest head lost by recharge sinking through the layers below the water table.',
  }
}

/** A thin, steep, tight sheet blocks flow in fact, but not in a vertical sum (METHODS §2a.17). */
export function steepSheets({ section }: Ground): FootingLine | null {
  const host = section.materials.find(({ id }) => id === section.host)
  if (!host) return null
  const culprits = section.bodies.filter((body) => {
    const material = section.materials.find(({ id }) => id === body.material)
    if (!material || material.k > host.k / 10) return false
    const xs = body.outline.map(([x]) => x)
    const zs = body.outline.map(([, z]) => z)
    const wide = Math.max(...xs) - Math.min(...xs)
    const high = Math.max(...zs) - Math.min(...zs)
    const area = Math.abs(
      body.outline.reduce((sum, [x, z], i) => {
        const next = body.outline[(i + 1) % body.outline.length] ?? [x, z]
        return sum + x * next[1] - next[0] * z
      }, 0) / 2,
    )
    const diagonal = Math.hypot(wide, high)
    const thickness = area / diagonal
    // Fills less than half of its own box and leans: a slanted sheet rather than a block or a flat layer.
    return thickness < 0.25 * Math.min(high, wide) && high > 0.25 * wide
  })
  if (culprits.length === 0) return null
  const first = culprits[0]
  return {
    key: 'steep-sheets',
    assumes: 'Tight bodies are blocks or flat layers',
    value: culprits.length,
    unit: '',
    bound: 0,
    source: 'follows from the vertical integral T = ∫K dz',
    verdict: 'doubtful',
    place: first?.outline[0] ? { x: first.outline[0][0] } : undefined,
    says: 'A thin slanted tight body holds water back more than this method shows. A two-dimensional check is called for.',
  }
}

const spot = (reach: { from: number; to: number } | undefined) => reach && { x: reach.from, to: reach.to }

function heightAt(line: [number, number][], x: number): number {
  const i = Math.max(
    1,
    line.findIndex(([px]) => px >= x),
  )
  const a = line[i - 1] ?? [0, 0]
  const b = line[i] ?? a
  return b[0] === a[0] ? a[1] : a[1] + ((x - a[0]) / (b[0] - a[0])) * (b[1] - a[1])
}
