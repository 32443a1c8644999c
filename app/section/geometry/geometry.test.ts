import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { Point } from '../types'
import { aboveAt, lineAt } from './line'
import { areaOf, clipToStrip, contains, crossingOf, verticalAt } from './polygon'

const square: Point[] = [
  [0, 0],
  [4, 0],
  [4, 4],
  [0, 4],
]

describe('lines', () => {
  it('are read between and beyond their vertices', () => {
    const line: Point[] = [
      [0, 1],
      [10, 3],
      [20, 2],
    ]
    expect([lineAt(line, -5), lineAt(line, 5), lineAt(line, 10), lineAt(line, 15), lineAt(line, 99)]).toEqual([
      1, 2, 3, 2.5, 2,
    ])
    expect(lineAt([], 3)).toBeNaN()
  })

  it('may touch at a point but not pierce or run together', () => {
    const ground: Point[] = [
      [0, 5],
      [10, 5],
    ]
    expect(
      aboveAt(
        [
          [0, 0],
          [5, 5],
          [10, 0],
        ],
        ground,
      ),
    ).toBeNull()
    expect(
      aboveAt(
        [
          [0, 0],
          [5, 6],
          [10, 0],
        ],
        ground,
      ),
    ).toMatchObject({ at: 5, by: 1 })
    expect(
      aboveAt(
        [
          [0, 0],
          [4, 5],
          [6, 5],
          [10, 0],
        ],
        ground,
      ),
    ).toMatchObject({ from: 4, to: 6 })
  })
})

describe('outlines', () => {
  it('that cross, touch or fold back are found out, with the spot', () => {
    expect(crossingOf(square)).toBeNull()
    expect(
      crossingOf([
        [0, 0],
        [4, 4],
        [4, 0],
        [0, 4],
      ])?.at,
    ).toEqual([2, 2])
    expect(
      crossingOf([
        [0, 0],
        [4, 0],
        [4, 4],
        [2, 0],
        [0, 4],
      ]),
    ).not.toBeNull()
    expect(
      crossingOf([
        [0, 0],
        [4, 0],
        [2, 0],
        [2, 4],
      ]),
    ).not.toBeNull()
    expect(
      crossingOf([
        [0, 0],
        [4, 0],
        [4, 0],
        [4, 4],
        [0, 4],
      ]),
    ).toBeNull()
    expect(
      crossingOf([
        [0, 0],
        [4, 4],
        [8, 8],
      ]),
    ).not.toBeNull()
  })

  it('are found out by the sweep exactly where trying every pair of edges does', () => {
    const point = fc
      .tuple(fc.integer({ min: 0, max: 12 }), fc.integer({ min: 0, max: 12 }))
      .map(([x, z]): Point => [x, z])
    const distinct = fc.uniqueArray(point, { minLength: 3, maxLength: 8, selector: ([x, z]) => `${x},${z}` })
    fc.assert(
      fc.property(distinct, (outline) => {
        expect(crossingOf(outline) !== null).toBe(crossesSlowly(outline))
      }),
      { numRuns: 2000 },
    )
  })

  it('have an area, a vertical extent and a part between two verticals', () => {
    expect(areaOf(square)).toBe(16)
    expect(areaOf([...square].reverse())).toBe(-16)
    expect(
      verticalAt(
        [
          [0, 0],
          [8, 0],
          [8, 8],
          [4, 2],
          [0, 8],
        ],
        2,
      ),
    ).toEqual([[0, 5]])
    expect(
      verticalAt(
        [
          [0, 0],
          [8, 0],
          [0, 1],
          [8, 9],
          [0, 9],
        ],
        4,
      ),
    ).toEqual([
      [0, 0.5],
      [5, 9],
    ])
    expect(areaOf(clipToStrip(square, 1, 3))).toBeCloseTo(8, 12)
    expect(clipToStrip(square, 5, 6)).toEqual([])
    expect([contains(square, [1, 1]), contains(square, [5, 1])]).toEqual([true, false])
  })

  it('keep their area when cut in two', () => {
    const number = fc.integer({ min: -50, max: 50 })
    const point50 = fc.tuple(number, number).map(([x, z]): Point => [x, z])
    const tri = fc.tuple(point50, point50, point50)
    fc.assert(
      fc.property(tri, fc.integer({ min: -50, max: 50 }), (outline, x) => {
        const parts = areaOf(clipToStrip(outline, -100, x)) + areaOf(clipToStrip(outline, x, 100))
        expect(parts).toBeCloseTo(areaOf(outline), 8)
      }),
    )
  })
})

/** Every pair of edges by exact integer arithmetic. */
function crossesSlowly(outline: Point[]): boolean {
  const n = outline.length
  const at = (i: number): Point => outline[i % n] ?? [0, 0]
  const turn = (p: Point, q: Point, r: Point) =>
    Math.sign((q[0] - p[0]) * (r[1] - p[1]) - (q[1] - p[1]) * (r[0] - p[0]))
  const on = (p: Point, q: Point, r: Point) =>
    turn(p, q, r) === 0 &&
    Math.min(p[0], q[0]) <= r[0] &&
    r[0] <= Math.max(p[0], q[0]) &&
    Math.min(p[1], q[1]) <= r[1] &&
    r[1] <= Math.max(p[1], q[1])
  for (let i = 0; i < n; i++)
    for (let j = i + 1; j < n; j++) {
      const [p, q, r, s] = [at(i), at(i + 1), at(j), at(j + 1)]
      const beside = j === i + 1 || (i === 0 && j === n - 1)
      if (beside) {
        const [a, b, c] = j === i + 1 ? [p, q, s] : [r, p, q]
        if (on(b, c, a) || on(a, b, c)) return true
      } else if (
        (turn(p, q, r) !== turn(p, q, s) && turn(r, s, p) !== turn(r, s, q)) ||
        on(p, q, r) ||
        on(p, q, s) ||
        on(r, s, p) ||
        on(r, s, q)
      )
        return true
    }
  return false
}
