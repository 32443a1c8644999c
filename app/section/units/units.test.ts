import { describe, expect, it } from 'vitest'
import { formatQuantity, formatTime, type QuantityKind, type UnitSet } from './index'
import { parseQuantity } from './parse'

const value = (typed: string, kind: QuantityKind, set: UnitSet = 'si') => {
  const read = parseQuantity(typed, kind, { set })
  if (!read.ok) throw new Error(read.message)
  return read.value
}
const refusal = (typed: string, kind: QuantityKind, set: UnitSet = 'si') => {
  const read = parseQuantity(typed, kind, { set })
  return read.ok ? `read as ${read.value}` : read.message
}

describe('a quantity as it is typed', () => {
  it.each<[string, QuantityKind, number]>([
    ['2e-4 cm/s', 'conductivity', 0.1728],
    ['1e-5 m/s', 'conductivity', 0.864],
    ['10 m/d', 'conductivity', 10],
    ['10 m d^-1', 'conductivity', 10],
    ['10 m d⁻¹', 'conductivity', 10],
    ['100 gpd/ft2', 'conductivity', (100 * 0.003785411784) / 0.3048 ** 2],
    ['100 gal/d/ft²', 'conductivity', (100 * 0.003785411784) / 0.3048 ** 2],
    ['25 ft/day', 'conductivity', 7.62],
    ['300 mm/yr', 'recharge', 0.3 / 365.25],
    ['300 mm per year', 'recharge', 0.3 / 365.25],
    ['12 in/yr', 'recharge', 0.3048 / 365.25],
    ['= 0.35*820 mm/yr', 'recharge', (0.35 * 0.82) / 365.25],
    ['=(0.2+0.15) × 820 mm/a', 'recharge', (0.35 * 0.82) / 365.25],
    ['−50 mm/yr', 'recharge', -0.05 / 365.25],
    ['12,5 m', 'elevation', 12.5],
    ['0,125 m', 'length', 0.125],
    ['1,234.5 m', 'distance', 1234.5],
    ['1.234,5 m', 'distance', 1234.5],
    ['12 345,6 m', 'distance', 12345.6],
    ['30 ft 6 in', 'elevation', Number.NaN],
    ['30 ft + 6 in', 'elevation', 30.5 * 0.3048],
    ['400 m³/d/km', 'flow', 0.4],
    ['400 m3/d per km', 'km-flow', 0.4],
    ['30 gpd/ft', 'flow', (30 * 0.003785411784) / 0.3048],
    ['0.02 m2/d', 'flow', 0.02],
    ['28 %', 'ratio', 0.28],
    ['0.28', 'ratio', 0.28],
    ['2 yr', 'time', 730.5],
    ['36 h', 'time', 1.5],
    ['2*10^-4 cm/s', 'conductivity', 0.1728],
    ['2·10⁻⁴ cm/s', 'conductivity', 0.1728],
  ])('%s as %s', (typed, kind, expected) => {
    if (Number.isNaN(expected)) expect(refusal(typed, kind)).toMatch(/area|worked out/)
    else expect(value(typed, kind)).toBeCloseTo(expected, 12)
  })

  it('without a unit is in the unit shown', () => {
    expect(value('5', 'conductivity', 'us')).toBeCloseTo(1.524, 12)
    expect(value('300', 'recharge')).toBeCloseTo(0.3 / 365.25, 15)
    expect(value('= 12', 'recharge', 'us')).toBeCloseTo(0.3048 / 365.25, 15)
    expect(value('-0', 'elevation')).toBe(0)
  })

  it('that does not fit says why and what would', () => {
    expect(refusal('5 kg', 'conductivity')).toBe('“kg” is a mass; a conductivity is a length per time, e.g. 2e-4 cm/s.')
    expect(refusal('5 m', 'conductivity')).toMatch(/“m” is a length; /)
    expect(refusal('5 m3/d', 'flow')).toMatch(/a volume per time; a flow per metre of bank is an area per time/)
    expect(refusal('5 furlongs', 'distance')).toMatch(
      /“furlongs” is no unit known here\. A distance is a length, e\.g\. 120 m/,
    )
    expect(refusal('1,234 m', 'distance')).toMatch(/two ways/)
    expect(refusal('', 'elevation', 'us')).toMatch(/30 ft/)
    expect(refusal('1/0 m', 'distance')).toMatch(/finite|worked out/)
    expect(refusal('m', 'distance')).toMatch(/no number/)
    expect(refusal('0.3 m', 'ratio')).toMatch(/bare number/)
  })

  it.each([
    'import("x")',
    'sqrt(2) m',
    'a=3',
    '[1,2]',
    '2;3',
    '{x:1}',
    'f(x)=x',
    '"x"',
    '((((',
    '9^9^9^9',
    '…',
    'constructor',
    '__proto__ m',
    'x'.repeat(500),
    '1e999 m',
    '5 to m',
    '2 3 m',
  ])('runs nothing and throws nothing: %s', (typed) => {
    expect(parseQuantity(typed, 'distance', { set: 'si' }).ok).toBe(false)
  })
})

describe('a quantity as it is shown', () => {
  it('follows the chosen set, with sensible figures', () => {
    expect(formatQuantity(9.1, 'elevation', 'si')).toBe('9.10 m')
    expect(formatQuantity(9.1, 'elevation', 'us')).toBe('29.86 ft')
    expect(formatQuantity(0.0009, 'recharge', 'si')).toBe('328.7 mm/yr')
    expect(formatQuantity(-0.0000001, 'elevation', 'si')).toBe('0.00 m')
    expect(formatQuantity(-1.5, 'elevation', 'si', { unit: false })).toBe('−1.50')
    expect(formatQuantity(1.5, 'elevation', 'si', { signed: true })).toBe('+1.50 m')
    expect(formatQuantity(2e-7, 'conductivity', 'si')).toBe('2e-7 m/d')
    expect(formatQuantity(0.3, 'ratio', 'us')).toBe('0.3')
    expect(formatTime(Number.POSITIVE_INFINITY)).toBe('never leaves')
    expect(formatTime(800)).toBe('2.19 yr')
  })

  it('is read back as it stands in a field', () => {
    for (const kind of [
      'distance',
      'elevation',
      'small-length',
      'conductivity',
      'recharge',
      'flow',
      'km-flow',
      'conductance',
      'ratio',
      'time',
    ] as const)
      for (const set of ['si', 'us'] as const)
        for (const one of [0.001234567, 12.5, 830]) {
          const shown = formatQuantity(one, kind, set, { exact: true })
          expect(Math.abs(value(shown, kind, set) / one - 1)).toBeLessThan(1e-9)
        }
  })
})
