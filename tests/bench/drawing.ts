import { performance } from 'node:perf_hooks'
import { compose, layout } from '~/drawing'
import { sheetSvg, thumbnailSvg } from '~/export'
import { type Section, startingDrawing } from '~/section'
import { solveSteady } from '~/solver'

/** A section larger than any of the demo's: 120 ground vertices, 24 bodies, 12 zones, 10 drains, 12 observations, 8 limits. */
function large(): Section {
  const start = startingDrawing('river-and-canal')
  const span = 1200
  const line = (n: number, at: (x: number) => number): [number, number][] =>
    Array.from({ length: n }, (_, i) => [(i / (n - 1)) * span, at((i / (n - 1)) * span)])
  return {
    ...start,
    ground: line(120, (x) => 13 + 1.4 * Math.sin(x / 90) + 0.4 * Math.sin(x / 17)),
    base: line(60, (x) => 1.5 + 0.6 * Math.sin(x / 140)),
    left: { ...start.left, x: 0 },
    right: { ...start.right, x: span },
    materials: [
      { id: 'sand', name: 'Fine sand', k: 8, porosity: 0.3 },
      { id: 'silt', name: 'Silt', k: 0.2, porosity: 0.38 },
    ],
    host: 'sand',
    bodies: Array.from({ length: 24 }, (_, i) => ({
      id: `b${i}`,
      material: 'silt',
      outline: [
        [i * 48 + 5, 3],
        [i * 48 + 36, 3.4],
        [i * 48 + 30, 5],
        [i * 48 + 8, 4.6],
      ],
    })),
    recharge: Array.from({ length: 12 }, (_, i) => ({
      id: `r${i}`,
      from: i * 100,
      to: (i + 1) * 100,
      rate: 0.0004 + 0.0001 * (i % 5),
    })),
    features: Array.from({ length: 10 }, (_, i) => ({
      id: `d${i}`,
      kind: 'drain' as const,
      x: 55 + i * 110,
      level: 9.2,
      conductance: 0.4,
    })),
    observations: Array.from({ length: 12 }, (_, i) => ({ id: `o${i}`, name: `P-${i}`, x: 30 + i * 97, head: 9.4 })),
    limits: Array.from({ length: 8 }, (_, i) => ({
      id: `l${i}`,
      from: 60 + i * 140,
      to: 90 + i * 140,
      level: 10.6,
      clearance: 0.5,
    })),
    cases: [],
    sources: {},
  }
}

function median(times: number, run: () => void): number {
  for (let i = 0; i < 3; i++) run()
  const took = Array.from({ length: times }, () => {
    const from = performance.now()
    run()
    return performance.now() - from
  }).sort((a, b) => a - b)
  return took[Math.floor(times / 2)] ?? 0
}

for (const [name, section] of [
  ['river and canal', startingDrawing('river-and-canal')],
  ['large', large()],
] as const) {
  const solution = solveSteady(section)
  const scene = compose(section, solution)
  const rows = {
    solve: median(15, () => solveSteady(section)),
    compose: median(15, () => compose(section, solution)),
    layout: median(15, () => layout(scene, { width: 1080, height: 700 }, 'light')),
    'SVG on A4': median(9, () => sheetSvg({ section, solution })),
    thumbnail: median(9, () => thumbnailSvg(section, solution)),
  }
  const size = (sheetSvg({ section, solution }).length / 1024).toFixed(0)
  console.log(
    `${name} (${scene.items.length} items, SVG ${size} kB): ${Object.entries(rows)
      .map(([what, ms]) => `${what} ${ms.toFixed(2)} ms`)
      .join(', ')}`,
  )
}
