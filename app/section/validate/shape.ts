import { aboveAt, lineAt } from '../geometry/line'
import { areaOf, crossingOf } from '../geometry/polygon'
import { LIMITS, SLACK } from '../rules/limits'
import { said } from '../rules/rule'
import type { Section } from '../types'
import type { Say } from './say'

export const LINE_WORD = { ground: 'ground line', base: 'base' } as const

/** The strip itself: its banks apart, ground and base ordered, from bank to bank, the base below. False when there is none. */
export function checkStrip(section: Pick<Section, 'left' | 'right' | 'ground' | 'base'>, say: Say): boolean {
  const { left, right } = section
  const length = right.x - left.x
  if (!(length >= LIMITS.strip.min)) {
    say(
      'right.x',
      length > 0
        ? `The strip is ${said(length)} m long; it must be at least ${said(LIMITS.strip.min)} m. Move a bank.`
        : `The right bank must stand to the right of the left bank: ${said(right.x)} m is not beyond ${said(left.x)} m.`,
      { x: right.x },
    )
    return false
  }
  if (length > LIMITS.strip.max) {
    say('right.x', `The strip is ${said(length)} m long; it may be at most ${said(LIMITS.strip.max)} m.`, {
      x: right.x,
    })
    return false
  }
  const sound = [checkLine('ground', section, say), checkLine('base', section, say)].every(Boolean)
  if (sound) checkCover(section, say)
  return sound
}

function checkLine(
  name: 'ground' | 'base',
  section: Pick<Section, 'left' | 'right' | 'ground' | 'base'>,
  say: Say,
): boolean {
  const line = section[name]
  const word = LINE_WORD[name]
  const { left, right } = section
  const first = line[0]
  const last = line.at(-1)
  if (!first || !last || line.length < 2) {
    say(name, `The ${word} needs at least two vertices, one at each bank.`, { x: left.x, to: right.x })
    return false
  }
  let sound = true
  for (let i = 1; i < line.length; i++) {
    const [before, here] = [line[i - 1], line[i]]
    if (!before || !here || here[0] - before[0] >= LIMITS.apart) continue
    sound = false
    say(
      `${name}.${i}`,
      here[0] > before[0]
        ? `Vertices ${i} and ${i + 1} of the ${word} stand closer than ${LIMITS.apart} m: remove one of them.`
        : `The ${word} must run from left to right: x = ${said(here[0])} m comes after ${said(before[0])} m. Put its vertices in order, one at each x.`,
      { x: here[0], z: here[1] },
    )
  }
  if (!sound) return false
  const ends = [
    [0, first, left.x, 'left', 'starts'],
    [line.length - 1, last, right.x, 'right', 'ends'],
  ] as const
  for (const [i, point, x, side, does] of ends) {
    if (Math.abs(point[0] - x) <= SLACK) continue
    sound = false
    say(
      `${name}.${i}`,
      `The ${word} must span the strip: it ${does} at ${said(point[0])} m, the ${side} bank stands at ${said(x)} m.`,
      { x: point[0], z: point[1] },
    )
  }
  return sound
}

function checkCover({ ground, base }: Pick<Section, 'ground' | 'base'>, say: Say) {
  const above = aboveAt(base, ground)
  if (!above) return
  const z = lineAt(base, above.at)
  const at = base.findIndex(([x]) => x === above.at)
  say(
    at >= 0 ? `base.${at}` : 'base',
    above.by > SLACK
      ? `The base rises ${said(above.by)} m above the ground at x = ${said(above.at)} m: lower the base or raise the ground.`
      : `Base and ground run together from x = ${said(above.from)} m to ${said(above.to)} m, so that nothing lies between: lower the base there.`,
    { x: above.at, z, ...(above.to > above.at ? { to: above.to } : {}) },
  )
}

/** An outline must be a simple polygon with an area. */
export function checkOutline(path: string, outline: Section['bodies'][number]['outline'], say: Say): boolean {
  const first = outline[0]
  const place = first && { x: first[0], z: first[1] }
  if (outline.length < 3) {
    say(path, `An outline needs at least three vertices; this one has ${outline.length}.`, place)
    return false
  }
  const crossing = crossingOf(outline)
  if (crossing) {
    const [x, z] = crossing.at
    say(
      `${path}.${crossing.vertex}`,
      `The outline crosses or touches itself near x = ${said(round(x))} m, z = ${said(round(z))} m: move a vertex so that its edges keep apart.`,
      { x, z },
    )
    return false
  }
  if (Math.abs(areaOf(outline)) < LIMITS.area) {
    say(path, 'The outline encloses no area: move its vertices apart.', place)
    return false
  }
  return true
}
const round = (value: number) => Math.round(value * 100) / 100

export function checkBodies(section: Pick<Section, 'bodies'>, say: Say) {
  for (const { id, outline } of section.bodies) checkOutline(`bodies.${id}.outline`, outline, say)
}
