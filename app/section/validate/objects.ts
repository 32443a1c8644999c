import { lineAt } from '../geometry/line'
import { LIMITS, SLACK } from '../rules/limits'
import { said } from '../rules/rule'
import type { Bank, Feature, Section } from '../types'
import type { Say } from './say'

export const SIDES = ['left', 'right'] as const
export const FEATURE_WORD: Record<Feature['kind'], string> = {
  ditch: 'ditch',
  drain: 'drain',
  trench: 'trench',
  wall: 'cut-off wall',
}

/** What hangs on the strip: banks, materials in use, zones, features, observations, limits. Also asked for each case. */
export function checkObjects(section: Section, say: Say) {
  checkMaterials(section, say)
  for (const side of SIDES) checkBank(side, section[side], section.ground, say)
  checkSpans(section, say)
  checkFeatures(section, say)
  for (const { id, x, head } of section.observations)
    if (x < section.left.x || x > section.right.x)
      say(
        `observations.${id}.x`,
        `The observation stands at ${said(x)} m, outside ${strip(section)}: move it between the banks.`,
        {
          x,
          z: head,
        },
      )
}

const strip = ({ left, right }: Section) => `the strip (${said(left.x)} m to ${said(right.x)} m)`

function checkMaterials({ materials, host, bodies }: Section, say: Say) {
  const known = new Set(materials.map(({ id }) => id))
  const list = [...known].slice(0, 12).join(', ')
  if (known.size === 0) say('materials', 'A section needs at least one material: the one its ground is of.')
  else if (!known.has(host)) say('host', `There is no material “${host}”; known are ${list}.`)
  for (const { id, material, outline } of bodies)
    if (known.size > 0 && !known.has(material))
      say(
        `bodies.${id}.material`,
        `There is no material “${material}”; known are ${list}.`,
        outline[0] && { x: outline[0][0], z: outline[0][1] },
      )
}

function checkBank(side: 'left' | 'right', bank: Bank, ground: Section['ground'], say: Say) {
  if (bank.kind !== 'water') return
  const { x, stage, bed } = bank
  const top = lineAt(ground, x)
  if (stage > top + SLACK)
    say(
      `${side}.stage`,
      `The stage of ${said(stage)} m stands above the ground at its bank (${said(top)} m): lower the stage or raise the ground there.`,
      { x, z: stage },
    )
  if (bed !== null && bed > stage)
    say(
      `${side}.bed`,
      `The underside of the bed (${said(bed)} m) lies above the stage (${said(stage)} m): lower the bed or raise the stage.`,
      { x, z: bed },
    )
}

function checkSpans(section: Section, say: Say) {
  const { left, right } = section
  for (const [list, word, spans, least] of [
    ['recharge', 'recharge zone', section.recharge, LIMITS.apart],
    ['limits', 'limit', section.limits, 0],
  ] as const)
    for (const { id, from, to } of spans) {
      const place = { x: Math.min(from, to), to: Math.max(from, to) }
      if (to - from < least || from > to)
        say(
          `${list}.${id}.to`,
          `The ${word} must run from left to right: it starts at ${said(from)} m and ends at ${said(to)} m.`,
          place,
        )
      else if (from < left.x - SLACK || to > right.x + SLACK)
        say(
          `${list}.${id}.${from < left.x - SLACK ? 'from' : 'to'}`,
          `The ${word} from ${said(from)} m to ${said(to)} m reaches outside ${strip(section)}: end it at the bank.`,
          place,
        )
    }
}

function checkFeatures(section: Section, say: Say) {
  const { left, right, features } = section
  const sorted = [...features].sort((a, b) => a.x - b.x)
  sorted.forEach((feature, i) => {
    const { id, kind, x } = feature
    const place = 'level' in feature ? { x, z: feature.level } : { x }
    const before = sorted[i - 1]
    const side = SIDES.find((one) => Math.abs(x - section[one].x) < LIMITS.apart)
    if (side)
      say(
        `features.${id}.x`,
        `The ${FEATURE_WORD[kind]} stands at the ${side} bank (${said(x)} m): move it inside, or let the bank do its work.`,
        place,
      )
    else if (x < left.x || x > right.x)
      say(
        `features.${id}.x`,
        `The ${FEATURE_WORD[kind]} stands at ${said(x)} m, outside ${strip(section)}: move it between the banks.`,
        place,
      )
    else if (before && x - before.x < LIMITS.apart)
      say(
        `features.${id}.x`,
        `The ${FEATURE_WORD[kind]} stands at one x with the ${FEATURE_WORD[before.kind]} “${before.id}” (${said(x)} m): move one of them.`,
        place,
      )
  })
}
