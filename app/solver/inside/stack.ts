import type { Section } from '~/section'
import { layersAt } from '../ground/columns'
import type { Solved } from '../types'

/** Layers over one spot from the base up; `to` is a layer's top, Infinity for the last. K in m/d. */
export type Layer = { to: number; k: number; porosity: number | null; material: string }
export type Stack = Layer[]

/** The section as it was solved: with the case's values in it. */
export const sectionOf = (solution: Solved): Section => solution.inner.section

/** What lies over the base at x, just left or right of it. */
export function stackAt(solution: Solved, x: number, side: 'left' | 'right'): Stack {
  const { ground, section } = solution.inner
  const layers = layersAt(ground, x, side)
  return layers.map(({ k, material }, i) => ({
    to: layers[i + 1]?.z ?? Number.POSITIVE_INFINITY,
    k,
    porosity: section.materials[material]?.porosity ?? null,
    material: section.materials[material]?.id ?? '',
  }))
}
