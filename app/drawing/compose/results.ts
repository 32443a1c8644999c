import { arrows, flowLines } from '~/solver'
import type { Context } from './context'

/** Divide, flow arrows, flow lines, the highest point. */
export function composeResults(context: Context): void {
  const { section, solution, items, samples, view, say, z, left, right } = context
  if (solution.status !== 'solved') {
    sayWhyNot(context, solution.reason[0]?.message ?? solution.mend)
    return
  }
  const common = { panel: 'section', layer: 'results' } as const
  if (view.flowLines)
    for (const [i, line] of flowLines(solution, { tubes: 10, stations: 120 }).entries())
      items.push({
        ...common,
        kind: 'path',
        id: `line-${i}`,
        of: `result.flow-line.${i}`,
        role: 'flow-line',
        points: line.points.map(([x, pz]) => ({ x, z: pz })),
        closed: false,
      })
  if (view.arrows !== false) {
    const field = arrows(solution, { columns: 12, rows: 3 })
    // Next to a sink the speed has no bound: what is usual, not the extreme, gives an arrow its full length.
    const speeds = field.arrows.map(({ vx, vz }) => Math.hypot(vx, vz)).sort((a, b) => a - b)
    const usual = speeds[Math.floor(speeds.length * 0.9)] ?? 0
    if (usual > 0)
      context.keys.arrow = `${field.measure === 'velocity' ? 'Seepage' : 'Darcy flux'}, longest ${say(Number(usual.toPrecision(2)), 'conductivity')}`
    const clear = ((right - left) / 12) * 0.12
    for (const [i, arrow] of field.arrows.entries()) {
      const speed = Math.hypot(arrow.vx, arrow.vz)
      if (!(speed > usual * 0.004)) continue
      if (section.features.some(({ x }) => Math.abs(x - arrow.x) < clear)) continue
      items.push({
        ...common,
        kind: 'symbol',
        symbol: 'flow-arrow',
        id: `arrow-${i}`,
        of: `result.arrow.${i}`,
        role: 'arrow',
        at: { x: arrow.x, z: arrow.z },
        direction: { x: arrow.vx, z: arrow.vz },
        scale: Math.sqrt(Math.min(1, speed / usual)),
      })
    }
  }
  const tall = z.max - z.min
  for (const [i, divide] of solution.divides.entries()) {
    const x = (divide.from + divide.to) / 2
    const base = samples.reduce(
      (best, next) => (Math.abs(next.x - x) < Math.abs(best.x - x) ? next : best),
      samples[0] ?? { x, base: z.min, head: divide.head, flow: 0, ground: 0 },
    )
    const of = `result.divide.${i}`
    items.push({
      ...common,
      kind: 'path',
      id: `divide-${i}`,
      of,
      role: 'divide',
      points: [
        { x, z: base.base },
        { x, z: divide.head + tall * 0.1 },
      ],
      closed: false,
      label: divide.kind,
    })
    items.push({
      ...common,
      kind: 'text',
      id: `divide-${i}-text`,
      of,
      role: 'text-divide',
      at: { x, z: divide.head + tall * 0.1 },
      shift: { dx: 0, dy: -0.8 },
      text: `${divide.kind} at ${say(x, 'distance')} · ${say(divide.head, 'elevation', false)}`,
      size: 2.5,
      weight: 600,
      anchor:
        Math.abs(x - left) < (right - left) * 0.12
          ? 'start'
          : Math.abs(x - right) < (right - left) * 0.12
            ? 'end'
            : 'middle',
      base: 'bottom',
      priority: 8,
    })
  }
  const off = solution.straight
  if (Math.abs(off.worst) > 0 && Number.isFinite(off.worst))
    items.push({
      ...common,
      kind: 'text',
      id: 'straight-text',
      of: 'result.straight',
      role: 'text-soft',
      at: { x: right - (right - left) * 0.2, z: off.left + (off.right - off.left) * 0.8 },
      shift: { dx: 0, dy: 1.2 },
      text: 'straight line',
      size: 1.8,
      weight: 400,
      anchor: 'middle',
      base: 'top',
      priority: 1,
    })
}

/** No answer: the sheet says so where the water table would be, and why. */
function sayWhyNot({ items, left, right, z }: Context, why: string): void {
  const lines = ['']
  for (const word of why.split(/\s+/)) {
    const last = lines.length - 1
    const longer = `${lines[last]} ${word}`.trim()
    if (longer.length > 46 && lines[last]) lines.push(word)
    else lines[last] = longer
  }
  for (const [i, text] of ['No steady answer', ...lines.slice(0, 4)].entries())
    items.push({
      kind: 'text',
      id: `no-answer-${i}`,
      of: 'result.none',
      role: 'text-trouble',
      layer: 'results',
      panel: 'section',
      at: { x: (left + right) / 2, z: z.min + (z.max - z.min) * 0.5 },
      shift: { dx: 0, dy: i === 0 ? -6 : -6 + 1.4 + i * 4.2 },
      text,
      size: i === 0 ? 3.5 : 2.5,
      weight: i === 0 ? 600 : 400,
      anchor: 'middle',
      base: 'middle',
      priority: 10,
    })
}
