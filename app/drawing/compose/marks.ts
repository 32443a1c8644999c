import type { Item, World } from '../scene'
import { type Context, groundAt } from './context'

/** Observations as standpipes, limits with their clearance, and the places of problems. */
export function composeMarks({ section, solution, items, say, left, right }: Context): void {
  const common = { panel: 'section', layer: 'marks' } as const
  for (const seen of section.observations) {
    const of = `observations.${seen.id}`
    const x = Math.min(right, Math.max(left, seen.x))
    const top = groundAt(section, x)
    items.push(
      {
        ...common,
        of,
        kind: 'path',
        id: `${seen.id}-pipe`,
        role: 'observation',
        points: [
          { x, z: Math.max(top, seen.head) },
          { x, z: seen.head },
        ],
        closed: false,
        label: seen.name ?? seen.id,
      },
      {
        ...common,
        of,
        kind: 'symbol',
        symbol: 'observation',
        id: seen.id,
        role: 'observation',
        at: { x, z: seen.head },
      },
      {
        ...common,
        of,
        kind: 'text',
        id: `${seen.id}-text`,
        role: 'text',
        at: { x, z: Math.max(top, seen.head) },
        shift: { dx: 0, dy: -1 },
        text: `${seen.name ?? seen.id}`,
        size: 2.5,
        weight: 500,
        anchor: 'middle',
        base: 'bottom',
        priority: 5,
      },
    )
    const misfit = solution.status === 'solved' ? solution.misfits.find(({ id }) => id === seen.id) : undefined
    if (misfit)
      items.push({
        ...common,
        of,
        kind: 'text',
        id: `${seen.id}-residual`,
        role: 'text-soft',
        at: { x, z: seen.head },
        shift: { dx: 1.9, dy: 0 },
        // What was read, and how far the answer lies above or below it.
        text: `${say(seen.head, 'elevation', false)} (${misfit.computed >= misfit.observed ? '+' : '−'}${say(Math.abs(misfit.computed - misfit.observed), 'elevation', false)})`,
        size: 1.8,
        weight: 400,
        anchor: 'start',
        base: 'middle',
        priority: 2,
      })
  }
  for (const limit of section.limits) {
    const of = `limits.${limit.id}`
    const check = solution.status === 'solved' ? solution.limits.find(({ id }) => id === limit.id) : undefined
    const broken = check ? !check.holds : false
    const role = !check ? 'limit' : broken ? 'limit-broken' : 'limit-holds'
    const band = [
      { x: limit.from, z: limit.level },
      { x: limit.to, z: limit.level },
      { x: limit.to, z: limit.level - limit.clearance },
      { x: limit.from, z: limit.level - limit.clearance },
    ]
    if (!broken && limit.clearance > 0)
      items.push({
        ...common,
        of,
        kind: 'path',
        id: `${limit.id}-clear`,
        role: 'limit-clear',
        points: [
          { x: limit.from, z: limit.level - limit.clearance },
          { x: limit.to, z: limit.level - limit.clearance },
        ],
        closed: false,
      })
    if (broken && limit.clearance > 0)
      items.push({
        ...common,
        of,
        kind: 'area',
        id: `${limit.id}-band`,
        role: 'limit-broken',
        rings: [band],
        hatch: 'none',
      })
    items.push({
      ...common,
      of,
      kind: 'path',
      id: limit.id,
      role,
      points: band.slice(0, 2),
      closed: false,
      label: limit.name ?? 'Limit',
    })
    // Sign beside colour: a tick or a cross at the left end of the line.
    if (check)
      items.push({
        ...common,
        of,
        kind: 'symbol',
        symbol: broken ? 'broken' : 'holds',
        id: `${limit.id}-sign`,
        role,
        at: { x: limit.from, z: limit.level },
        shift: { dx: -2.2, dy: 0 },
      })
    items.push({
      ...common,
      of,
      kind: 'text',
      id: `${limit.id}-text`,
      role: broken ? 'text-trouble' : 'text',
      at: { x: (limit.from + limit.to) / 2, z: limit.level },
      shift: { dx: 0, dy: -0.9 },
      text: `${limit.name ?? 'Limit'} ${say(limit.level, 'elevation', false)}${limit.clearance > 0 ? ` · needs ${say(limit.clearance, 'length')}` : ''}`,
      size: 2.5,
      weight: 500,
      anchor: 'middle',
      base: 'bottom',
      priority: 8,
    })
  }
  const problems = solution.status === 'unsolved' ? [...solution.reason, ...solution.warnings] : solution.warnings
  for (const [i, problem] of problems.entries()) {
    if (!problem.place) continue
    const x = Math.min(right, Math.max(left, problem.place.x))
    items.push({
      ...common,
      of: problem.path,
      kind: 'symbol',
      symbol: 'problem',
      id: `problem-${i}`,
      role: 'problem',
      at: { x, z: problem.place.z ?? groundAt(section, x) },
      shift: { dx: 0, dy: -5 },
      label: problem.message,
    })
  }
}

/** Pen, arrows, notes, dimensions and highlights of the layers that are shown. */
export function composeMarkup({ view, items, say }: Context): void {
  if (!view.live || view.markup === false) return
  const { layers, marks } = view.live.markup
  const shown = new Set(layers.filter(({ hidden }) => !hidden).map(({ id }) => id))
  for (const mark of [...marks].sort((a, b) => (a.order < b.order ? -1 : 1))) {
    if (!shown.has(mark.layer) && layers.some(({ id }) => id === mark.layer)) continue
    const common = { panel: 'section', layer: 'mark-up', of: `marks.${mark.id}`, id: `mark-${mark.id}` } as const
    const points = mark.points.map(([x, z, pressure]) => ({ x, z, ...(pressure !== undefined && { pressure }) }))
    const ends: World[] = points.map(({ x, z }) => ({ x, z }))
    const [first, last] = [ends[0], ends[ends.length - 1]]
    if (!first || !last) continue
    const tint = mark.ink === 'ink' ? 'text' : (`text-${mark.ink}` as Item['role'])
    if (mark.kind === 'pen' || mark.kind === 'highlight')
      items.push({
        ...common,
        kind: 'ink',
        role: mark.kind === 'highlight' ? 'highlight' : tint,
        points,
        width: mark.width,
        highlight: mark.kind === 'highlight',
      })
    else {
      if (ends.length > 1)
        items.push({
          ...common,
          kind: 'path',
          role: mark.kind === 'dimension' ? 'dimension' : 'note',
          points: ends,
          closed: false,
        })
      if (mark.kind !== 'note' && ends.length > 1) {
        const before = ends[ends.length - 2] ?? first
        items.push({
          ...common,
          id: `${common.id}-head`,
          kind: 'symbol',
          symbol: 'flow-arrow',
          role: 'note',
          at: last,
          direction: { x: last.x - before.x, z: last.z - before.z },
          scale: 0,
        })
      }
      const length = Math.hypot(last.x - first.x, last.z - first.z)
      const text = mark.text || (mark.kind === 'dimension' ? say(length, 'length') : '')
      if (text)
        items.push({
          ...common,
          id: `${common.id}-text`,
          kind: 'text',
          role: tint,
          at: mark.kind === 'dimension' ? { x: (first.x + last.x) / 2, z: (first.z + last.z) / 2 } : first,
          shift: { dx: 0.6, dy: -0.8 },
          text,
          size: 3.5,
          weight: 500,
          anchor: mark.kind === 'dimension' ? 'middle' : 'start',
          base: 'bottom',
          priority: 10,
        })
    }
  }
}
