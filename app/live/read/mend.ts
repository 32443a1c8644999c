import { type Feature, LIMITS, lineAt, type Section, SLACK, said } from '~/section'
import type { Say } from './context'

/**
 * Makes what hangs on a sound strip go together: values that contradict one another are brought to the nearest that do not, and
 * each such change is said. The section comes back itself when nothing had to be changed. Pure and the same on every replica.
 */
export function mend(section: Section, say: Say): Section {
  const changes = {
    ...mendMaterials(section, say),
    ...mendBank(section, 'left', say),
    ...mendBank(section, 'right', say),
    ...mendSpans(section, say),
    ...mendFeatures(section, say),
    ...mendObservations(section, say),
  }
  return Object.keys(changes).length > 0 ? { ...section, ...changes } : section
}

function mendMaterials(section: Section, say: Say): Partial<Section> {
  const known = new Set(section.materials.map(({ id }) => id))
  const first = section.materials[0]?.id ?? section.host
  const changes: Partial<Section> = {}
  let { host } = section
  if (!known.has(host)) {
    say('host', `The material of the ground (“${host}”) is gone; “${first}” stands in. Choose another.`)
    host = first
    changes.host = host
  }
  if (section.bodies.some(({ material }) => !known.has(material)))
    changes.bodies = section.bodies.map((body) => {
      if (known.has(body.material)) return body
      const [x, z] = body.outline[0] ?? [section.left.x, 0]
      say(
        `bodies.${body.id}.material`,
        `The material of this body (“${body.material}”) is gone; “${host}” stands in.`,
        { x, z },
      )
      return { ...body, material: host }
    })
  return changes
}

function mendBank(section: Section, side: 'left' | 'right', say: Say): Partial<Section> {
  const bank = section[side]
  if (bank.kind !== 'water') return {}
  const { x } = bank
  let { stage, bed } = bank
  const top = lineAt(section.ground, x)
  if (stage > top + SLACK) {
    say(
      `${side}.stage`,
      `The stage of ${said(stage)} m stands above the ground at its bank; it is taken at the ground, ${said(top)} m. Lower the stage or raise the ground.`,
      { x, z: stage },
    )
    stage = top
  }
  if (bed !== null && bed > stage) {
    say(
      `${side}.bed`,
      `The underside of the bed lies above the stage; it is taken at the stage, ${said(stage)} m. Lower the bed.`,
      {
        x,
        z: bed,
      },
    )
    bed = stage
  }
  return stage === bank.stage && bed === bank.bed ? {} : { [side]: { ...bank, stage, bed } }
}

/** The least width of a zone and the step by which things are moved apart, m. */
const stepIn = ({ left, right }: Section) => Math.min(0.01, (right.x - left.x) / 1000)

function mendSpans(section: Section, say: Say): Partial<Section> {
  const recharge = mendSpan(section, 'recharge', 'recharge zone', section.recharge, LIMITS.apart, say)
  const limits = mendSpan(section, 'limits', 'limit', section.limits, 0, say)
  return {
    ...(recharge === section.recharge ? {} : { recharge }),
    ...(limits === section.limits ? {} : { limits }),
  }
}

function mendSpan<T extends { id: string; from: number; to: number }>(
  section: Section,
  list: string,
  word: string,
  spans: T[],
  least: number,
  say: Say,
): T[] {
  const { left, right } = section
  let changed = false
  const mended = spans.map((span) => {
    let { from, to } = span
    const place = { x: Math.max(left.x, Math.min(from, to)), to: Math.min(right.x, Math.max(from, to)) }
    if (from > to) {
      say(`${list}.${span.id}.to`, `The ${word} ended before it began; its ends are taken the other way round.`, place)
      ;[from, to] = [to, from]
    }
    if (from < left.x - SLACK || to > right.x + SLACK) {
      say(
        `${list}.${span.id}.${from < left.x - SLACK ? 'from' : 'to'}`,
        `The ${word} from ${said(from)} m to ${said(to)} m reaches outside the strip; only what lies between the banks counts.`,
        place,
      )
      from = Math.min(right.x, Math.max(left.x, from))
      to = Math.min(right.x, Math.max(left.x, to))
    }
    if (to - from < least) {
      say(`${list}.${span.id}.to`, `The ${word} has no width between the banks; give it one or remove it.`, { x: from })
      to = Math.min(right.x, from + stepIn(section))
      from = to - stepIn(section)
    }
    if (from === span.from && to === span.to) return span
    changed = true
    return { ...span, from, to }
  })
  return changed ? mended : spans
}

function mendFeatures(section: Section, say: Say): Partial<Section> {
  const { left, right, features } = section
  const step = stepIn(section)
  // Taken places in a grid of cells as wide as two features may stand near, so that a thousand of them cost a thousand looks.
  const cells = new Map<number, number[]>()
  const cell = (x: number) => Math.floor((x - left.x) / LIMITS.apart)
  const free = (x: number) =>
    x - left.x >= LIMITS.apart &&
    right.x - x >= LIMITS.apart &&
    [-1, 0, 1].every((n) => (cells.get(cell(x) + n) ?? []).every((other) => Math.abs(other - x) >= LIMITS.apart))
  const take = (x: number) => cells.set(cell(x), [...(cells.get(cell(x)) ?? []), x])
  let changed = false
  const mended = features.flatMap((feature): Feature[] => {
    if (free(feature.x)) {
      take(feature.x)
      return [feature]
    }
    changed = true
    const path = `features.${feature.id}.x`
    const word = WORDS[feature.kind]
    const inside = Math.min(right.x - step, Math.max(left.x + step, feature.x))
    const x = near(inside, step, features.length, free)
    const place = { x: x ?? inside, ...('level' in feature ? { z: feature.level } : {}) }
    if (x === null) {
      say(path, `There is no room left for the ${word} at ${said(feature.x)} m, so it is left out.`, place)
      return []
    }
    say(
      path,
      feature.x > left.x && feature.x < right.x && inside === feature.x
        ? `The ${word} stands at one x with another (${said(feature.x)} m); it is taken a hair aside. Move one of them.`
        : `The ${word} at ${said(feature.x)} m does not stand between the banks; it is taken just inside. Move or remove it.`,
      place,
    )
    take(x)
    return [{ ...feature, x }]
  })
  return changed ? { features: mended } : {}
}
const WORDS: Record<Feature['kind'], string> = {
  ditch: 'ditch',
  drain: 'drain',
  trench: 'trench',
  wall: 'cut-off wall',
}

function near(x: number, step: number, tries: number, free: (x: number) => boolean): number | null {
  for (let n = 0; n <= tries + 1; n++)
    for (const at of n === 0 ? [x] : [x + n * step, x - n * step]) if (free(at)) return at
  return null
}

function mendObservations(section: Section, say: Say): Partial<Section> {
  const { left, right, observations } = section
  if (observations.every(({ x }) => x >= left.x && x <= right.x)) return {}
  return {
    observations: observations.map((one) => {
      const x = Math.min(right.x, Math.max(left.x, one.x))
      if (x === one.x) return one
      say(
        `observations.${one.id}.x`,
        `The observation at ${said(one.x)} m does not stand between the banks; it is taken at the nearer one.`,
        {
          x,
          z: one.head,
        },
      )
      return { ...one, x }
    }),
  }
}
