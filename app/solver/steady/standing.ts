import type { Bank, Feature, Problem, Section } from '~/section'
import { lineAt } from '../ground/breaks'
import type { Unsolved } from '../types'

type Part = { from: number; to: number; left: Bank | null; right: Bank | null; features: Feature[] }

/** The strip cut at walls that let nothing through. */
function partsOf(section: Section): Part[] {
  const cuts = section.features
    .filter((f) => f.kind === 'wall' && f.k === 0)
    .map((f) => f.x)
    .sort((a, b) => a - b)
  const ends = [section.left.x, ...cuts, section.right.x]
  return ends.slice(1).map((to, i) => {
    const from = ends[i] ?? section.left.x
    return {
      from,
      to,
      left: i === 0 ? section.left : null,
      right: i === ends.length - 2 ? section.right : null,
      features: section.features.filter((f) => f.x > from && f.x < to),
    }
  })
}

const joined = (conductance: number | null) => conductance === null || conductance > 0

/**
 * Whether anything in each part of the strip can hold a level (METHODS §2a.11): null when so. Otherwise the answer to give:
 * with nothing that takes water the table has no steady place; with only one-way outlets (drains, springs) and no surplus
 * nothing would feed them.
 */
export function nothingHolds(section: Section, caseId: string | null): Unsolved | null {
  for (const part of partsOf(section)) {
    let takes = section.surfaceSeepage
    let feeds = false
    let net = 0
    let inflow = 0
    for (const [bank, x] of [
      [part.left, part.from],
      [part.right, part.to],
    ] as const) {
      if (bank?.kind === 'inflow') net += bank.rate
      if (bank?.kind === 'inflow' && bank.rate > 0) inflow += bank.rate
      if (bank?.kind === 'water' && joined(bank.conductance)) {
        takes = true
        if (bank.stage > lineAt(section.base, x)) feeds = true
      }
    }
    for (const feature of part.features) {
      if (feature.kind === 'trench') net -= feature.rate
      else if (feature.kind !== 'wall' && joined(feature.conductance)) {
        takes = true
        if (feature.kind === 'ditch' && feature.level > lineAt(section.base, feature.x)) feeds = true
      }
    }
    for (const zone of section.recharge) {
      const gain = zone.rate * Math.max(0, Math.min(zone.to, part.to) - Math.max(zone.from, part.from))
      net += gain
      if (gain > 0) inflow += gain
    }
    const even = 1e-12 * (inflow + Math.abs(net))
    if (feeds || (takes && net > even)) continue
    return refusal(section, part, caseId, takes, net, even)
  }
  return null
}

function refusal(
  section: Section,
  part: Part,
  caseId: string | null,
  takes: boolean,
  net: number,
  even: number,
): Unsolved {
  const where =
    part.from === section.left.x && part.to === section.right.x
      ? 'the strip'
      : `the part from ${part.from} m to ${part.to} m`
  const place = { x: part.from, to: part.to }
  const path = part.left ? 'left' : part.right ? 'right' : 'features'
  const reason: Problem[] = []
  let mend = 'Give one bank a stage, or add a ditch that holds a level.'
  const trenches = part.features.filter((f) => f.kind === 'trench' && f.rate > 0)
  const taken = trenches.reduce((sum, f) => sum + (f.kind === 'trench' ? f.rate : 0), 0)
  let canGive: Unsolved['canGive']
  if (net > even) {
    reason.push({
      path,
      place,
      message: `More water comes into ${where} than can leave it: the water table would rise without end.`,
    })
    mend =
      'Give one bank a stage, add a ditch or a drain, or let the ground hold the water table down (surface seepage).'
  } else if (net < -even) {
    reason.push({
      path,
      place,
      message: `More water is taken from ${where} than comes in, and nothing in it holds a level.`,
    })
    const first = trenches[0]
    if (first) {
      canGive = { of: `features.${first.id}`, rate: Math.max(0, first.kind === 'trench' ? first.rate + net : 0) }
      mend = `Pump less: all trenches here together can have ${Math.max(0, taken + net)} m²/d. ${mend}`
    }
  } else {
    reason.push({
      path,
      place,
      message: takes
        ? `Nothing comes into ${where} and nothing feeds it: any level below its outlets would do.`
        : `Nothing in ${where} holds a level: every height of the water table would do.`,
    })
  }
  return { status: 'unsolved', caseId, reason, mend, ...(canGive ? { canGive } : {}), warnings: [] }
}
