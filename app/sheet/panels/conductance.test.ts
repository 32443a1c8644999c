import { describe, expect, it } from 'vitest'
import { conductanceOf, radialResistance } from './conductance'

describe('conductance of a bed', () => {
  it('gives Ernst’s radial resistance (T10-01: K 5 m/d, D 10 m, u 2 m; van Beers, ILRI Bulletin 15)', () => {
    expect(radialResistance(2, { depth: 10, k: 5, anisotropy: 1 })).toBeCloseTo(0.10246, 5)
  })
  it('counts resistances double for a bank, which sees half of the channel', () => {
    const bed = { perimeter: 4, thickness: 0.5, k: 0.02 }
    const radial = { depth: 12, k: 6, anisotropy: 4 }
    const ditch = conductanceOf(bed, radial, 2)
    const bank = conductanceOf(bed, radial, 1)
    expect(ditch.bed).toBeCloseTo(0.5 / (0.02 * 4), 12)
    expect((bank.g ?? 0) * 2).toBeCloseTo(ditch.g ?? 0, 12)
  })
  it('takes K of bending flow as the root of both conductivities', () => {
    const flat = radialResistance(2, { depth: 10, k: 5, anisotropy: 1 })
    expect(radialResistance(2, { depth: 10, k: 5, anisotropy: 9 })).toBeCloseTo(3 * flat, 12)
  })
  it('lets water stand directly against the aquifer when nothing resists', () => {
    expect(conductanceOf({ perimeter: 12, thickness: 0, k: 1 }, { depth: 10, k: 5, anisotropy: 1 }, 1).g).toBeNull()
  })
  it('names the value that cannot be', () => {
    expect(() => conductanceOf({ perimeter: 0, thickness: 0, k: 1 }, null, 2)).toThrow('wetted perimeter')
    expect(() => conductanceOf({ perimeter: 2, thickness: 0.2, k: 0 }, null, 2)).toThrow('conductivity of the bed')
  })
})
