import { describe, expect, it } from 'vitest'
import { applyCase, type Section, STARTING_DRAWINGS, startingDrawing } from '~/section'
import { readAt, solveSteady } from '~/solver'
import { compose } from './compose'
import { textWidth } from './fonts/measure'
import { hatchOf } from './hatch/kind'
import { layout } from './layout'
import { layoutPaper, PAPERS, scaleFor } from './layout/paper'
import type { PanelFrame, Plot, PlotList, PlotText } from './plot'
import { inkOf, palette, ROLES } from './styles'

const THEMES = ['light', 'dark', 'print'] as const
const SCREEN = { width: 1080, height: 700 }
const ends = (x: number, stage: number) => ({ kind: 'water', x, stage, conductance: null, bed: null }) as const

/** Everything at once, close together. */
const crowded: Section = {
  ...startingDrawing('river-and-canal'),
  features: [
    { id: 'd1', kind: 'drain', name: 'Field drain', x: 100, level: 8.9, conductance: 0.5 },
    { id: 'w1', kind: 'wall', name: 'Cut-off', x: 112, thickness: 0.6, k: 0.01 },
    { id: 't1', kind: 'trench', name: 'Site trench', x: 120, rate: 0.02 },
    { id: 'c1', kind: 'ditch', name: 'Mid ditch', x: 128, level: 9, conductance: null },
  ],
  observations: Array.from({ length: 12 }, (_, i) => ({ id: `o${i}`, name: `Pipe ${i}`, x: 90 + 4 * i, head: 9.3 })),
  limits: Array.from({ length: 4 }, (_, i) => ({
    id: `l${i}`,
    name: `Floor ${i}`,
    from: 80 + 12 * i,
    to: 110 + 12 * i,
    level: 9.4 + 0.3 * i,
    clearance: 0.4,
  })),
}
const SECTIONS: [string, Section][] = [
  ...STARTING_DRAWINGS.map(({ name }): [string, Section] => [name, startingDrawing(name)]),
  ['crowded', crowded],
  ['wet case', applyCase(startingDrawing('river-and-canal'), 'wet')],
  [
    'tiny',
    {
      ...startingDrawing('empty'),
      ground: [
        [0, 0.5],
        [1.2, 0.5],
      ],
      base: [
        [0, 0],
        [1.2, 0],
      ],
      left: ends(0, 0.4),
      right: ends(1.2, 0.1),
      recharge: [],
    },
  ],
  [
    '25 km',
    {
      ...startingDrawing('empty'),
      ground: [
        [0, 130],
        [25000, 128],
      ],
      base: [
        [0, 60],
        [25000, 50],
      ],
      left: ends(0, 118),
      right: ends(25000, 112),
      recharge: [],
    },
  ],
  [
    'no answer',
    {
      ...startingDrawing('empty'),
      left: { kind: 'no-flow', x: startingDrawing('empty').left.x },
      right: { kind: 'no-flow', x: startingDrawing('empty').right.x },
    },
  ],
]
const drawn = (section: Section, viewport: Parameters<typeof layout>[1] = SCREEN): PlotList =>
  layout(compose(section, solveSteady(section)), viewport, 'light')
const frameOf = (list: PlotList, id = 'section'): PanelFrame => {
  const frame = list.frames.find((one) => one.id === id)
  if (!frame) throw new Error(`no panel ${id}`)
  return frame
}
const isText = (plot: Plot): plot is PlotText => plot.kind === 'text'
const boxOf = (text: PlotText) => {
  const width = textWidth(text.text, text.size, text.weight)
  const x = text.anchor === 'start' ? text.x : text.anchor === 'end' ? text.x - width : text.x - width / 2
  return { x, y: text.y - text.size * 0.75, width, height: text.size * 0.8 }
}
const pathOf = (list: PlotList, id: string): { x: number; y: number }[] => {
  const plot = list.plots.find((one) => one.kind === 'path' && one.id === id)
  if (plot?.kind !== 'path') throw new Error(`no path ${id}`)
  return [...plot.d.matchAll(/[ML](-?[\d.]+) (-?[\d.]+)/g)].map(([, x, y]) => ({ x: Number(x), y: Number(y) }))
}

describe('styles', () => {
  it.each(THEMES)('has an ink for every role on %s', (theme) => {
    for (const role of ROLES) {
      const ink = inkOf(role as Parameters<typeof inkOf>[0], theme, 1)
      expect(ink.stroke ?? ink.fill, role).toMatch(/^#[0-9A-F]{6}$/)
    }
  })
  it.each(THEMES)('writes every text with a contrast of 4.5 on %s', (theme) => {
    const light = (hex: string) => {
      const [r = 0, g = 0, b = 0] = [1, 3, 5].map((i) => {
        const part = Number.parseInt(hex.slice(i, i + 2), 16) / 255
        return part <= 0.04045 ? part / 12.92 : ((part + 0.055) / 1.055) ** 2.4
      })
      return 0.2126 * r + 0.7152 * g + 0.0722 * b
    }
    for (const role of [
      'text',
      'text-soft',
      'text-water',
      'text-recharge',
      'text-divide',
      'text-trouble',
      'ruler',
      'caution',
    ] as const) {
      const [a, b] = [light(inkOf(role, theme, 1).fill ?? '#000000'), light(palette(theme).sheet)]
      expect((Math.max(a, b) + 0.05) / (Math.min(a, b) + 0.05), role).toBeGreaterThanOrEqual(4.5)
    }
  })
})

describe('compose', () => {
  it.each(SECTIONS)('names what every item of "%s" belongs to, once', (_, section) => {
    const { items } = compose(section, solveSteady(section), { flowLines: true })
    for (const item of items) expect(item.of, item.id).not.toBe('')
    expect(new Set(items.map(({ id }) => id)).size).toBe(items.length)
  })
  it('leaves its inputs alone and gives the same scene twice', () => {
    const section = startingDrawing('lake-and-sea')
    const solution = solveSteady(section)
    const before = JSON.stringify(section)
    expect(compose(section, solution)).toEqual(compose(section, solution))
    expect(JSON.stringify(section)).toBe(before)
  })
  it('says by sign, not by colour alone, whether a limit holds', () => {
    const symbols = (level: number) => {
      const section = {
        ...startingDrawing('river-and-canal'),
        limits: [{ id: 'l', from: 100, to: 120, level, clearance: 0.5 }],
      }
      return compose(section, solveSteady(section)).items.flatMap((item) =>
        item.kind === 'symbol' && item.of === 'limits.l' ? [item.symbol] : [],
      )
    }
    expect(symbols(11.5)).toEqual(['holds'])
    expect(symbols(9.5)).toEqual(['broken'])
  })
  it('hatches a material by the soil its name says', () => {
    expect(hatchOf('Silty sand')).toBe('sand')
    expect(hatchOf('Grey clay')).toBe('clay')
    expect(hatchOf('Buried peat')).toBe('peat')
    expect(hatchOf('Silt, free of gravel')).toBe('gravel')
    expect(hatchOf(undefined)).toBe('sand')
  })
})

describe('layout', () => {
  it.each(SECTIONS)('lets no labels of "%s" overlap or reach over the edge, on screens and paper', (_, section) => {
    const scene = compose(section, solveSteady(section))
    for (const [what, list] of [
      ['wide', layout(scene, SCREEN, 'light')],
      ['narrow', layout(scene, { width: 390, height: 500 }, 'light')],
      ['paper', layoutPaper(scene, { paper: 'A4' }, 'print')],
    ] as const) {
      const texts = list.plots.filter(isText).filter(({ text }) => text !== '')
      expect(texts.length, what).toBeGreaterThan(8)
      const boxes = texts.map(boxOf)
      boxes.forEach((a, i) => {
        const name = `${what}: ${texts[i]?.text}`
        expect(a.x, name).toBeGreaterThanOrEqual(-0.01)
        expect(a.x + a.width, name).toBeLessThanOrEqual(list.width + 0.01)
        expect(a.y + a.height, name).toBeLessThanOrEqual(list.height + 0.01)
        boxes.slice(i + 1).forEach((b, j) => {
          const apart = a.x + a.width <= b.x || b.x + b.width <= a.x || a.y + a.height <= b.y || b.y + b.height <= a.y
          expect(apart, `${name} | ${texts[i + 1 + j]?.text}`).toBe(true)
        })
      })
    }
  })
  it.each(SECTIONS)('holds only finite numbers for "%s"', (_, section) => {
    const view = { x0: section.left.x - 1e4, x1: section.left.x - 1e4 + 5, zMid: 0, exaggeration: 500 }
    for (const viewport of [SCREEN, { ...SCREEN, view }, { width: 40, height: 30 }])
      expect(JSON.stringify(drawn(section, viewport))).not.toMatch(/NaN|Infinity|null,"y"/)
  })
  it('draws the water table where the solver says, to the rounding of the path', () => {
    const section = startingDrawing('river-and-canal')
    const solution = solveSteady(section)
    const list = drawn(section)
    const frame = frameOf(list)
    const points = pathOf(list, 'water-table')
    expect(points.length).toBeGreaterThan(100)
    for (const { x, y } of points) {
      const head = readAt(solution, (x - frame.ax) / frame.bx).head
      expect(Math.abs(frame.ay + frame.by * head - y)).toBeLessThan(0.05)
    }
  })
  it('shares one x scale between drawing and strips', () => {
    const { frames } = drawn(startingDrawing('two-ditches'))
    expect(frames.map(({ id }) => id)).toEqual(['section', 'discharge', 'depth'])
    for (const frame of frames)
      expect([frame.ax, frame.bx, frame.box.x, frame.box.width]).toEqual([
        frames[0]?.ax,
        frames[0]?.bx,
        frames[0]?.box.x,
        frames[0]?.box.width,
      ])
  })
  it('shows the part and the exaggeration that a view asks for', () => {
    const view = { x0: 50, x1: 150, zMid: 9, exaggeration: 7 }
    const list = drawn(startingDrawing('river-and-canal'), { ...SCREEN, view })
    const frame = frameOf(list)
    expect(list.exaggeration).toBe(7)
    expect(-frame.by / frame.bx).toBeCloseTo(7, 9)
    expect(frame.ax + frame.bx * 50).toBeCloseTo(frame.box.x, 9)
    expect(frame.ax + frame.bx * 150).toBeCloseTo(frame.box.x + frame.box.width, 9)
    expect(frame.ay + frame.by * 9).toBeCloseTo(frame.box.y + frame.box.height / 2, 9)
  })
  it('shows levels in feet where feet are asked for', () => {
    const section = startingDrawing('river-and-canal')
    const list = layout(compose(section, solveSteady(section), { units: 'us' }), SCREEN, 'light')
    const texts = list.plots.filter(isText).map(({ text }) => text)
    expect(texts).toContain('ft')
    expect(texts).toContain('28.54')
  })
})

describe('paper', () => {
  it('takes the first scale of ISO 5455 that fits', () => {
    expect([
      scaleFor(340, 240),
      scaleFor(240, 240),
      scaleFor(240.001, 240),
      scaleFor(1.2, 240),
      scaleFor(25_000, 240),
    ]).toEqual([2000, 1000, 2000, 5, 200_000])
  })
  it.each(Object.keys(PAPERS) as (keyof typeof PAPERS)[])(
    'is true to scale on %s, and its bar as long as it says',
    (paper) => {
      const section = startingDrawing('river-and-canal')
      const list = layoutPaper(compose(section, solveSteady(section)), { paper }, 'print')
      const frame = frameOf(list)
      expect(frame.bx).toBeCloseTo(1000 / (list.scale ?? 0), 9)
      expect([list.width, list.height]).toEqual([PAPERS[paper].width, PAPERS[paper].height])
      const bars = list.plots.flatMap((plot) =>
        plot.kind === 'path' && /^scale-bar-\d/.test(plot.id) ? [Number(/h(-?[\d.]+)/.exec(plot.d)?.[1])] : [],
      )
      const says = list.plots.filter(isText).find(({ id }) => id === 'scale-bar-text-4')?.text ?? ''
      expect(bars.reduce((sum, mm) => sum + mm, 0)).toBeCloseTo((Number.parseFloat(says) * 1000) / (list.scale ?? 0), 1)
    },
  )
})
