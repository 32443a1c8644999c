import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { Resvg } from '@resvg/resvg-js'
import { describe, expect, it } from 'vitest'
import type { LiveSection } from '~/live'
import { applyCase, parseSection, type Section, STARTING_DRAWINGS, startingDrawing } from '~/section'
import { readAt, solveSteady } from '~/solver'
import { csvCell, firstViewSvg, profileCsv, sectionJson, sheetSvg, thumbnailSvg } from '.'

const GOLDEN = join(import.meta.dirname, '../../tests/golden')
/** UPDATE_GOLDEN=1 writes the pictures anew; otherwise a difference leaves NAME-changed.svg beside the golden one. */
function expectGolden(name: string, text: string) {
  const path = join(GOLDEN, name)
  if (process.env.UPDATE_GOLDEN) {
    mkdirSync(GOLDEN, { recursive: true })
    writeFileSync(path, text)
  }
  expect(existsSync(path), `${path} is missing: run with UPDATE_GOLDEN=1`).toBe(true)
  const kept = readFileSync(path, 'utf8')
  const changed = path.replace(/\.svg$/, '-changed.svg')
  if (kept !== text) writeFileSync(changed, text)
  expect(kept === text, `${name} is drawn differently now: compare with ${changed}`).toBe(true)
}
const sheet = (section: Section, more: Partial<Parameters<typeof sheetSvg>[0]> = {}) =>
  sheetSvg({ section, solution: solveSteady(section), ...more })
/** Throws where the text is no well-formed SVG. */
const parsed = (svg: string) => new Resvg(svg, { font: { loadSystemFonts: false } })

const NASTY = [
  ']]>',
  '<script>alert(1)</script>',
  '"\'&<>',
  '&amp;&#0;&nope;',
  '\u0000\u0001\u0008\u000b\u001f\u007f\u0085',
  '\ud800',
  '\udc00 lone',
  '\ufffe\uffff',
  'עברית مرحبا',
  '\u202eback to front',
  '👩‍🔧🌊🇳🇱',
  '漢字',
  'line\nbreak\ttab\r\n',
  '=SUM(A1)',
  '--><!--',
  '<!DOCTYPE x [<!ENTITY a "b">]>',
  '%PDF',
  'x'.repeat(5000),
  '   ',
  'e\u0301\u0301\u0301\u0301',
]
const named = (text: string): Section => ({
  ...startingDrawing('river-and-canal'),
  title: text,
  datum: text,
  left: { kind: 'water', x: 0, name: text, stage: 8.7, conductance: null, bed: null },
  materials: [{ id: 'sand', name: text, k: 2.6, porosity: 0.3 }],
  recharge: [{ id: 'r', name: text, from: 0, to: 340, rate: 0.0009 }],
  features: [{ id: 'd', kind: 'drain', name: text, x: 100, level: 9, conductance: 0.4 }],
  observations: [{ id: 'o', name: text, x: 60, head: 9 }],
  limits: [{ id: 'l', name: text, from: 150, to: 170, level: 10.9, clearance: 0.5 }],
})

describe('sheet as SVG', () => {
  it.each(STARTING_DRAWINGS.map(({ name }) => name))('draws %s as it did', (name) => {
    const svg = sheet(startingDrawing(name), { site: 'Osier Reach', prepared: 'I. Marr' })
    parsed(svg)
    expectGolden(`${name}.svg`, svg)
  })
  it.each(NASTY.map((text) => ({ text, shown: JSON.stringify(text.slice(0, 24)) })))(
    'is well formed with $shown everywhere, which does not become markup',
    ({ text }) => {
      const section = named(text)
      const live: LiveSection = {
        section,
        keys: { ground: [], base: [], bodies: {} },
        markup: {
          layers: [{ id: 'm', name: text, date: '2026-05-12', hidden: false, locked: false, order: 'a' }],
          marks: [
            { id: 'n', layer: 'm', kind: 'note', points: [[90, 11]], text, ink: 'trouble', width: 0.5, order: 'a' },
          ],
        },
        problems: [],
      }
      const svg = sheet(section, { live, site: text, practice: text, caseName: text, prepared: text })
      expect(() => parsed(svg), JSON.stringify(text.slice(0, 20))).not.toThrow()
      expect(svg).not.toMatch(/<script|<!DOCTYPE|<!--|<foreignObject/)
      expect(() => parsed(thumbnailSvg(section, solveSteady(section)))).not.toThrow()
      expect(() => parsed(firstViewSvg(section, solveSteady(section), { live }))).not.toThrow()
    },
  )
  it('cuts a text of 5,000 signs with an ellipsis', () => {
    const svg = sheet(named('x'.repeat(5000)))
    const longest = [...svg.matchAll(/<text[^>]*>([^<]*)<\/text>/g)].map(([, text = '']) => text.length)
    expect(Math.max(...longest)).toBeLessThan(200)
    expect(svg).toContain('x…</text>')
  })
  it('asks nothing from outside', () => {
    const fonts = { regular: new Uint8Array([1, 2, 3]), semibold: new Uint8Array([4, 5]) }
    const svg = sheet(startingDrawing('lake-and-sea'), { fonts })
    expect(svg).toContain("src:url(data:font/woff2;base64,AQID) format('woff2')")
    expect(svg.replaceAll('http://www.w3.org/2000/svg', '')).not.toMatch(/https?:|href|@import|url\((?!#|data:)/)
  })
  it('draws the water table where the solver says, at the scale it states', () => {
    const section = applyCase(startingDrawing('river-and-canal'), 'wet')
    const solution = solveSteady(section)
    const svg = sheetSvg({ section, solution, paper: 'A3', scale: 1250, exaggeration: 8 })
    expect(svg).toMatch(/width="420mm" height="297mm" viewBox="0 0 420 297"/)
    expect(svg).toContain('1:1250 horizontal')
    const points = (id: string) =>
      [
        ...(new RegExp(`id="i-${id}"[^>]* d="([^"]*)"`).exec(svg)?.[1] ?? '').matchAll(/[ML](-?[\d.]+) (-?[\d.]+)/g),
      ].map(([, x, y]) => [Number(x), Number(y)] as const)
    const [bedrock, table] = [points('base'), points('water-table')]
    const [x0 = 0] = table[0] ?? []
    const level = bedrock[1]?.[1] ?? 0
    expect(table.length).toBeGreaterThan(100)
    for (const [x, y] of table) {
      const head = readAt(solution, ((x - x0) * 1250) / 1000).head
      // The base lies at 1.5 m; heights are exaggerated eight times.
      expect(Math.abs(((level - y) * 1250) / 8000 + 1.5 - head)).toBeLessThan(0.01)
    }
  })
  it('refuses a paper or a scale that is none', () => {
    const section = startingDrawing('empty')
    expect(() => sheet(section, { paper: 'B7' as 'A4' })).toThrow('paper: "B7" is not one of A4, A3, Letter, Tabloid')
    expect(() => sheet(section, { scale: -5 })).toThrow('scale: -5 is no positive number')
  })
  it('gives the same bytes for the same sheet', () => {
    expect(sheet(startingDrawing('two-ditches'))).toBe(sheet(startingDrawing('two-ditches')))
  })
})

describe('small drawings', () => {
  it('share no ids with one another', () => {
    const ids = (svg: string) => [...svg.matchAll(/ id="([^"]+)"/g)].map(([, id]) => id)
    const all = STARTING_DRAWINGS.flatMap(({ name }) => {
      const section = startingDrawing(name)
      return ids(thumbnailSvg(section, solveSteady(section)))
    })
    expect(all.length).toBeGreaterThan(5)
    expect(new Set(all).size).toBe(all.length)
  })
})

describe('tables and data', () => {
  it('keeps spreadsheets from taking a text for a formula', () => {
    expect(csvCell('=1+1')).toBe(`"'=1+1"`)
    expect(csvCell(' @SUM(A1)')).toBe(`"' @SUM(A1)"`)
    expect(csvCell('a "b", c')).toBe('"a ""b"", c"')
    expect(csvCell(-3.5)).toBe('-3.5')
  })
  it('writes the profile with units in its header and the solver’s own numbers', () => {
    const section = startingDrawing('river-and-canal')
    const solution = solveSteady(section)
    const [head = '', ...rows] = profileCsv(section, solution).trim().split('\r\n')
    expect(head.split(',')[3]).toBe('water table [m]')
    expect(rows.length).toBeGreaterThan(200)
    for (const row of rows) {
      const [x = 0, , , table] = row.split(',').map(Number)
      expect(table).toBeCloseTo(readAt(solution, x).head, 6)
    }
    const feet = profileCsv(section, solution, { units: 'us' }).split('\r\n')[1]?.split(',')[3]
    expect(Number(feet)).toBeCloseTo(8.7 / 0.3048, 5)
  })
  it('gives the section back as it was', () => {
    for (const { name } of STARTING_DRAWINGS) {
      const section = startingDrawing(name)
      const read = parseSection(JSON.parse(sectionJson(section)))
      expect(read.ok && read.section).toEqual(section)
    }
  })
})
