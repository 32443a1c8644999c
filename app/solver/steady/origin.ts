// biome-ignore-all lint/style/noNonNullAssertion: the loops keep every index inside its array.
import type { Bank, Point, Section } from '~/section'
import type { Inner } from './inner'

/** Where the solver puts its own zero: the left bank and the lowest base. Far from the datum the last digits of a head matter. */
export type Origin = { x: number; z: number }

export const originOf = (section: Section): Origin => ({
  x: section.left.x,
  z: section.base.reduce((low, [, z]) => Math.min(low, z), Number.POSITIVE_INFINITY),
})

/** The section seen from its own zero; heads, stages, levels, beds, outlines and places moved alike. */
export function fromOrigin(section: Section, { x, z }: Origin): Section {
  if (x === 0 && z === 0) return section
  const line = (points: Point[]): Point[] => points.map(([a, b]): Point => [a - x, b - z])
  const bank = (one: Bank): Bank =>
    one.kind === 'water'
      ? { ...one, x: one.x - x, stage: one.stage - z, bed: one.bed === null ? null : one.bed - z }
      : { ...one, x: one.x - x }
  return {
    ...section,
    ground: line(section.ground),
    base: line(section.base),
    left: bank(section.left),
    right: bank(section.right),
    bodies: section.bodies.map((body) => ({ ...body, outline: line(body.outline) })),
    recharge: section.recharge.map((zone) => ({ ...zone, from: zone.from - x, to: zone.to - x })),
    features: section.features.map((feature) =>
      'level' in feature
        ? { ...feature, x: feature.x - x, level: feature.level - z }
        : { ...feature, x: feature.x - x },
    ),
  }
}

/** Puts an answer back where its section lies. Banks and features keep their x to the last digit, so that they can be read at. */
export function toDatum(inner: Inner, section: Section, { x, z }: Origin): void {
  inner.section = section
  if (x === 0 && z === 0) return
  const { net, ground, h } = inner
  const move = (values: Float64Array, by: number) => {
    for (let i = 0; i < values.length; i++) values[i] = values[i]! + by
  }
  const exactly = new Map<number, number>()
  exactly.set(net.x[0]!, section.left.x)
  exactly.set(net.x[net.nodes - 1]!, section.right.x)
  section.features.forEach((feature, i) => {
    const node = net.featureNode[i]!
    if (node >= 0) exactly.set(net.x[node]!, feature.x)
  })
  for (const places of [net.x, ground.x]) {
    for (let i = 0; i < places.length; i++) places[i] = exactly.get(places[i]!) ?? places[i]! + x
  }
  for (const heights of [h, net.base, net.surface, net.upper, net.held, net.sinkLevel, net.sinkBed, net.columns.z])
    move(heights, z)
  for (const heights of [ground.base, ground.surface, ground.zl, ground.zr]) move(heights, z)
}
