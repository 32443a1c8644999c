import { type Section, shapeOf, type UnitSet } from '~/section'
import { readAt, type Solution, travelTime } from '~/solver'

/** A cell: numbers as they are, text quoted, and never read as a formula by a spreadsheet. */
export function csvCell(value: string | number | null): string {
  if (value === null) return ''
  if (typeof value === 'number') return Number.isFinite(value) ? String(value) : ''
  const text = value.replaceAll('\u0000', '')
  const safe = /^\s*[=+\-@|%\t\r]/.test(text) ? `'${text}` : text
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
  const lines = [head.map(csvCell).join(',')]
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
            .map((value) => csvCell(value === null ? null : Number(value.toPrecision(9))))
            .join(','),
        )
    }
  }
  return `${lines.join('\r\n')}\r\n`
}

/** The section document as text, in and out again without loss. */
export const sectionJson = (section: Section): string => `${JSON.stringify(section, null, 2)}\n`
