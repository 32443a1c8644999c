import type { Section } from '~/section'
import type { Solution } from '~/solver'
import { hatchOf } from '../hatch/kind'
import type { Scene } from '../scene'
import { composeBanks } from './banks'
import { type ComposeView, contextOf } from './context'
import { composeBodies, composeGround } from './ground'
import { composeMarks, composeMarkup } from './marks'
import { composeRecharge } from './recharge'
import { composeResults } from './results'
import { composeStrips } from './strips'
import { composeWater } from './water'
import { composeWorks } from './works'

export const CAUTION =
  'Screening estimate, Dupuit–Forchheimer. Not a substitute for site investigation, local codes or a licensed professional.'

/**
 * The scene of a section with its answer: everything that is drawn, in metres, with sizes that must not zoom in paper
 * millimetres. Pure; the same scene feeds the canvas, the SVG and the thumbnails. `section` has the case's values in it.
 */
export function compose(section: Section, solution: Solution, view: ComposeView = {}): Scene {
  const context = contextOf(section, solution, view)
  composeGround(context)
  composeBodies(context)
  composeBanks(context)
  composeRecharge(context)
  composeWater(context)
  composeWorks(context)
  composeResults(context)
  composeMarks(context)
  composeMarkup(context)
  const strips = view.strips === false ? [] : composeStrips(context)
  const used = new Set([section.host, ...section.bodies.map(({ material }) => material)])
  return {
    x: context.x,
    panels: [
      { id: 'section', range: context.z, share: 1 - strips.reduce((sum, { share }) => sum + share, 0) },
      ...strips,
    ],
    clips: context.clips,
    keys: context.keys,
    units: context.units,
    grid: view.grid !== false,
    items: context.items,
    title: { title: section.title, datum: section.datum, caseName: 'As drawn', revision: 'draft', ...view.title },
    caution: CAUTION,
    legend: section.materials
      .filter(({ id }) => used.has(id))
      .map((material) => ({
        role: material.id === section.host ? ('soil' as const) : ('body' as const),
        hatch: hatchOf(material.name),
        text: `${material.name ?? material.id} · K ${context.say(material.k, 'conductivity')}`,
      })),
  }
}
export type { ComposeView } from './context'
