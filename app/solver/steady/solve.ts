import { applyCase, type Problem, type Section } from '~/section'
import { prepareGround } from '../ground/ground'
import type { Method, Solution, Solved, Unsolved } from '../types'
import { exactReason, solveExact } from './exact'
import { exchangesOf, exchangeWarnings, type Short } from './exchanges'
import { type General, solveGeneral } from './general'
import type { Inner } from './inner'
import { fromOrigin, originOf, toDatum } from './origin'
import { floodedReaches, highestOf, limitsOf, misfitsOf, profileOf, straightOf, turningPoints } from './profile'
import { dividesOf, dryReaches, wetReaches } from './reaches'
import { checkSense, labelOf } from './sense'
import { nothingHolds } from './standing'

/**
 * `caseId` solves the section as that case has it. `path` 'general' takes the general path even where the exact one applies,
 * and `nodes` asks for about that many evenly spread cells without refinement: both for tests and benches.
 */
export type SolveOptions = { caseId?: string | null; path?: 'general'; nodes?: number }

/**
 * Steady water table and flow of a section (METHODS §2, §2a): exact where the drawing allows it, else finite volumes refined to
 * 0.01 % of the head range. SI: metres and days, flows per metre of bank. Never throws for a section parseSection accepts:
 * where there is no answer, or not one only, it gives `status: 'unsolved'` with the reason, its place and what would mend it.
 */
export function solveSteady(section: Section, options: SolveOptions = {}): Solution {
  const caseId = options.caseId ?? null
  if (caseId !== null && !section.cases.some(({ id }) => id === caseId)) {
    return unsolved(
      caseId,
      [{ path: 'cases', message: `There is no case "${caseId}" in this section.` }],
      'Choose one of its cases.',
    )
  }
  const shown = applyCase(section, caseId)
  const wrong = checkSense(shown)
  if (wrong.length > 0) return unsolved(caseId, wrong, 'Mend what is named, then the section can be solved.')
  const standing = nothingHolds(shown, caseId)
  if (standing) return standing
  const origin = originOf(shown)
  const local = fromOrigin(shown, origin)
  const ground = prepareGround(local)
  let why: string | null = null
  const forced = options.path === 'general' || options.nodes !== undefined
  const reason = forced ? null : exactReason(local, ground)
  if (reason !== null) {
    const exact = solveExact(local, ground)
    if ('inner' in exact) {
      toDatum(exact.inner, shown, origin)
      const error = { head: 0, flow: 0, nodes: exact.inner.net.nodes, refinements: 0 }
      return report(caseId, exact.inner, { kind: 'exact', reason }, error)
    }
    why = exact.why
  }
  const general = solveGeneral(local, ground, options.nodes === undefined ? {} : { nodes: options.nodes })
  if (!general.converged) {
    return unsolved(
      caseId,
      [
        {
          path: 'base',
          message: 'The water table could not be found: the equations did not close.',
          place: { x: shown.left.x, to: shown.right.x },
        },
      ],
      'Look for very thin or very tight ground next to a strong inflow, and make it a little thicker.',
    )
  }
  const cause = why ?? (forced ? 'general path asked for' : 'sloping or broken base, or sloping contacts')
  toDatum(general.inner, shown, origin)
  const answer = report(
    caseId,
    general.inner,
    { kind: 'general', reason: `solved by finite volumes: ${cause}` },
    general.error,
  )
  if (general.error.head > Math.max(1e-3, 3 * general.goal))
    answer.warnings.push({
      path: 'base',
      message: `The heads may be off by about ${figure(general.error.head)} m, more than this sheet aims for.`,
      place: { x: shown.left.x, to: shown.right.x },
    })
  return answer
}

function unsolved(caseId: string | null, reason: Problem[], mend: string): Unsolved {
  return { status: 'unsolved', caseId, reason, mend, warnings: [] }
}

/** Abstraction beyond what can come: the trench stands dry and gets less than it asks for. */
function beyond(inner: Inner, caseId: string | null, short: Short[]): Unsolved {
  const reason = short.map(({ of, asked, comes, x }) => ({
    path: of.startsWith('features.') ? `${of}.rate` : `${of}.rate`,
    message: `${labelOf(inner.section, of)} asks for ${figure(asked)} m²/d, but the strip can give it no more than ${figure(comes)} m²/d: it would run dry.`,
    place: { x },
  }))
  const first = short[0]
  return {
    status: 'unsolved',
    caseId,
    reason,
    mend: 'Pump less than the strip can give, or bring in more water.',
    ...(first ? { canGive: { of: first.of, rate: first.comes } } : {}),
    warnings: [],
  }
}
const figure = (rate: number): string => String(Number(rate.toPrecision(4)))

function report(caseId: string | null, inner: Inner, method: Method, error: General['error']): Solution {
  const { section } = inner
  const wet = wetReaches(inner)
  const { exchanges, balance, short } = exchangesOf(inner, wet)
  const serious = short.filter(({ asked, comes }) => asked - comes > 1e-7 * Math.abs(asked))
  if (serious.length > 0) return beyond(inner, caseId, serious)
  const turns = turningPoints(inner)
  const profile = profileOf(inner)
  const dry = dryReaches(inner)
  const answer: Solved = {
    status: 'solved',
    method,
    caseId,
    profile,
    left: section.left.x,
    right: section.right.x,
    highest: highestOf(inner, turns),
    divides: dividesOf(inner),
    exchanges,
    balance,
    seepage: wet.map(({ from, to, rate }) => ({ from, to, rate })),
    dry,
    limits: limitsOf(inner, turns),
    misfits: misfitsOf(inner),
    straight: straightOf(inner, profile, turns),
    error,
    warnings: exchangeWarnings(inner, exchanges),
    inner,
  }
  answer.warnings.push(...placeWarnings(answer, section))
  return answer
}

function placeWarnings(answer: Solved, section: Section): Problem[] {
  const warnings: Problem[] = []
  if (answer.balance.relative > 1e-6) {
    warnings.push({
      path: 'base',
      message: `The balance closes only to ${figure(100 * answer.balance.relative)} %: the flows are next to nothing beside what the best ground here could carry.`,
      place: { x: section.left.x, to: section.right.x },
    })
  }
  for (const { from, to } of answer.dry) {
    warnings.push({
      path: 'base',
      message: `The ground is dry from ${figure(from)} m to ${figure(to)} m.`,
      place: { x: from, to },
    })
  }
  if (!section.surfaceSeepage) {
    for (const { from, to } of floodedReaches(answer.inner, answer.profile)) {
      warnings.push({
        path: 'ground',
        message: 'The water table stands above the ground here, because surface seepage is left out.',
        place: { x: from, to },
      })
    }
  }
  for (const { id, name, x } of section.observations) {
    if (x < section.left.x || x > section.right.x)
      warnings.push({
        path: `observations.${id}.x`,
        message: `${name || id} lies outside the strip and is not compared.`,
        place: { x },
      })
  }
  return warnings
}
