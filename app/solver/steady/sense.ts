import type { Feature, Problem, Section } from '~/section'
import { lineAt } from '../ground/breaks'

/** Name of a bank or feature for people: its own, or what it is. */
export function labelOf(section: Section, of: string): string {
  if (of === 'left' || of === 'right') return section[of].name || (of === 'left' ? 'Left bank' : 'Right bank')
  const [list, id] = of.split(/\.(.*)/s)
  if (list === 'features') {
    const feature = section.features.find((one) => one.id === id)
    if (feature) return feature.name || `${kindName(feature)} ${feature.id}`
  }
  if (list === 'recharge') {
    const zone = section.recharge.find((one) => one.id === id)
    if (zone) return zone.name || `Recharge ${zone.id}`
  }
  return of
}
const kindName = (feature: Feature): string =>
  ({ ditch: 'Ditch', drain: 'Drain', trench: 'Trench', wall: 'Cut-off wall' })[feature.kind]

/**
 * What parseSection refuses anyway, for callers that build a section by hand: [] when the section can be solved. Never throws.
 */
export function checkSense(section: Section): Problem[] {
  const wrong: Problem[] = []
  const say = (path: string, message: string, x?: number, z?: number) =>
    wrong.push(x === undefined ? { path, message } : { path, message, place: z === undefined ? { x } : { x, z } })
  const { left, right } = section
  if (!(Number.isFinite(left.x) && Number.isFinite(right.x) && left.x < right.x)) {
    say('right.x', 'The right bank must stand to the right of the left bank.', left.x)
    return wrong
  }
  for (const name of ['ground', 'base'] as const) {
    const line = section[name]
    if (line.length < 2) say(name, `The ${name} line needs at least two points.`, left.x)
    line.forEach(([x, z], i) => {
      const before = line[i - 1]
      if (!Number.isFinite(x) || !Number.isFinite(z)) say(`${name}.${i}`, 'A point must have two numbers.')
      else if (before && before[0] >= x)
        say(`${name}.${i}`, 'Points must run from left to right, each beyond the last.', x, z)
    })
  }
  const host = section.materials.find(({ id }) => id === section.host)
  if (!host) say('host', 'Name the material that fills the strip where no body lies.')
  section.materials.forEach(({ id, k }) => {
    if (!(k > 0 && Number.isFinite(k))) say(`materials.${id}.k`, 'Conductivity must be a number above 0 m/d.')
  })
  section.bodies.forEach(({ id, material, outline }) => {
    if (!section.materials.some((one) => one.id === material))
      say(`bodies.${id}.material`, 'This body is made of a material that is not in the list.', outline[0]?.[0])
    if (outline.some(([x, z]) => !Number.isFinite(x) || !Number.isFinite(z)))
      say(`bodies.${id}.outline`, 'A point must have two numbers.')
  })
  section.recharge.forEach(({ id, from, to, rate }) => {
    if (![from, to, rate].every(Number.isFinite))
      say(`recharge.${id}`, 'A recharge zone needs numbers for from, to and rate.')
  })
  if (wrong.length > 0) return wrong
  checkLevels(section, say)
  return wrong
}

function checkLevels(section: Section, say: (path: string, message: string, x?: number, z?: number) => void) {
  const { left, right } = section
  for (const [path, bank] of [
    ['left', left],
    ['right', right],
  ] as const) {
    if (bank.kind === 'inflow' && !Number.isFinite(bank.rate))
      say(`${path}.rate`, 'The inflow must be a number.', bank.x)
    if (bank.kind !== 'water') continue
    const ground = lineAt(section.ground, bank.x)
    if (!Number.isFinite(bank.stage)) say(`${path}.stage`, 'The stage must be a number.', bank.x)
    else if (section.surfaceSeepage && bank.stage > ground + 1e-9)
      say(
        `${path}.stage`,
        `The stage stands above the ground at its bank: lower it to ${ground} m or raise the ground.`,
        bank.x,
      )
    if (bank.conductance !== null && !(bank.conductance >= 0 && Number.isFinite(bank.conductance)))
      say(`${path}.conductance`, 'Conductance must be 0 m/d or more, or left empty.', bank.x)
    if (bank.bed !== null && bank.bed > bank.stage)
      say(`${path}.bed`, 'The bed lies above the stage: lower the bed or raise the stage.', bank.x)
  }
  const taken = new Map<number, string>()
  for (const feature of section.features) {
    const path = `features.${feature.id}`
    const { x } = feature
    if (!(x > left.x && x < right.x)) say(`${path}.x`, 'A feature must stand between the banks, not at one.', x)
    const other = taken.get(x)
    if (other) say(`${path}.x`, `Two features stand at one place (${other} too): move one of them.`, x)
    taken.set(x, feature.id)
    if (feature.kind === 'wall') {
      if (!(feature.thickness > 0 && Number.isFinite(feature.thickness)))
        say(`${path}.thickness`, 'A wall needs a thickness above 0 m.', x)
      if (!(feature.k >= 0 && Number.isFinite(feature.k)))
        say(`${path}.k`, 'A wall needs a conductivity of 0 m/d or more.', x)
    } else if (feature.kind === 'trench') {
      if (!Number.isFinite(feature.rate)) say(`${path}.rate`, 'A trench needs a pumped rate.', x)
    } else {
      if (!Number.isFinite(feature.level)) say(`${path}.level`, 'A level must be a number.', x)
      if (feature.conductance !== null && !(feature.conductance >= 0 && Number.isFinite(feature.conductance)))
        say(`${path}.conductance`, 'Conductance must be 0 m/d or more, or left empty.', x)
    }
  }
}
