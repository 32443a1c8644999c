import { type Section, shapeOf, type UnitSet } from '~/section'
import { readAt, type Solution, travelTime } from '~/solver'

/** A cell: numbers as they are, text quoted, and never read as a formula by a spreadsheet. */
export function csvField(value: string | number | null): string {
  if (value === null) return ''
  if (typeof value === 'number') return Number.isFinite(value) ? String(value) : ''
  const safe = /^[=+\-@\t\r]/.test(value) ? `'${value}` : value
  return /[",\n\r']/.test(safe) ? `"${safe.replaceAll('"', '""')}"` : safe
}

/** The profile along the strip, one row a spot (two at a jump, left then right); units stand in the header. */
export function profileCsv(
  section: Section,
  solution: Solution,
  { units = 'si', rows = 200 }: { units?: UnitSet; rows?: number } = {},
): string {
  const distance = shapeOf('distance', units)
  const length = shapeOf('length', units)
  const flow = shapeOf('flow', units)
  const head = [
    `x [${distance.unit}]`,
    `ground [${length.unit}]`,
    `base [${length.unit}]`,
    `water table [${length.unit}]`,
    `saturated thickness [${length.unit}]`,
    `depth to water [${length.unit}]`,
    `discharge, + to the right [${flow.unit}]`,
    `straight line [${length.unit}]`,
    'time to leave [d]',
  ]
  const lines = [head.map(csvField).join(',')]
  if (solution.status === 'solved') {
    const { left, right, profile } = solution
    const xs = new Set<number>([
      ...section.features.map(({ x }) => x),
      ...section.ground.map(([x]) => x),
      ...section.base.map(([x]) => x),
    ])
    for (let i = 0; i <= rows; i++) xs.add(left + ((right - left) * i) / rows)
    for (let i = 1; i < profile.x.length; i++) if (profile.x[i] === profile.x[i - 1]) xs.add(profile.x[i] ?? left)
    for (const x of [...xs].filter((at) => at >= left && at <= right).sort((a, b) => a - b)) {
      const at = readAt(solution, x)
      const sides = at.left && at.right ? [at.left, at.right] : [at]
      for (const side of sides)
        lines.push(
          [
            x * distance.times,
            at.ground * length.times,
            at.base * length.times,
            side.head * length.times,
            (side.head - at.base) * length.times,
            (at.ground - side.head) * length.times,
            side.flow * flow.times,
            at.straight * length.times,
            travelTime(solution, x).days,
          ]
            .map((value) => csvField(value === null ? null : Number(value.toPrecision(9))))
            .join(','),
        )
    }
  }
  return `${lines.join('\r\n')}\r\n`
}

/** The balance: what enters and leaves, by bank, feature, zone and seepage reach. */
export function ledgerCsv(solution: Solution, { units = 'si' }: { units?: UnitSet } = {}): string {
  const flow = shapeOf('flow', units)
  const lines = [['object', 'path', `rate [${flow.unit}]`, 'state'].map(csvField).join(',')]
  if (solution.status === 'solved')
    for (const { label, of, rate, state } of solution.exchanges)
      lines.push([label, of, Number((rate * flow.times).toPrecision(9)), state ?? ''].map(csvField).join(','))
  return `${lines.join('\r\n')}\r\n`
}
