import type { Section } from '~/section'

/** A whole section from the few things a test cares about: sand of 10 m/d, 100 m long, ground at 20 m, base at 0 m. */
export function sectionOf(parts: Partial<Section> = {}): Section {
  const left = parts.left ?? { kind: 'water', x: 0, stage: 10, conductance: null, bed: null }
  const right = parts.right ?? { kind: 'water', x: 100, stage: 10, conductance: null, bed: null }
  return {
    format: 'doab.section',
    version: 1,
    title: 'Test strip',
    datum: 'm above site datum',
    ground: [
      [left.x, 20],
      [right.x, 20],
    ],
    base: [
      [left.x, 0],
      [right.x, 0],
    ],
    materials: [{ id: 'sand', k: 10, porosity: 0.3, specificYield: 0.2 }],
    host: 'sand',
    bodies: [],
    recharge: [],
    features: [],
    observations: [],
    limits: [],
    cases: [],
    sources: {},
    surfaceSeepage: false,
    ...parts,
    left,
    right,
  }
}

export const water = (x: number, stage: number, conductance: number | null = null, bed: number | null = null) =>
  ({ kind: 'water', x, stage, conductance, bed }) as const
export const rain = (from: number, to: number, rate: number, id = 'r1') => ({ id, from, to, rate })
