import type { LiveSection } from '~/live'
import { lineOf, shown, vertexPath } from './paths'

type Box = { x0: number; x1: number; z0: number; z1: number }

/**
 * What lies wholly in a box, metres: bodies, zones, features, observations, limits and marks; where no whole object is caught,
 * the vertices of ground and base in it, so that a stretch of them can be shifted together.
 */
export function insideBox(box: Box, live: LiveSection, caseId: string | null, markup: boolean): string[] {
  const section = shown(live, caseId)
  const inX = (x: number) => x >= box.x0 && x <= box.x1
  const has = (x: number, z: number) => inX(x) && z >= box.z0 && z <= box.z1
  const hidden = new Set(live.markup.layers.filter((layer) => layer.hidden || layer.locked).map((layer) => layer.id))
  const objects = [
    ...section.bodies.filter((body) => body.outline.every(([x, z]) => has(x, z))).map(({ id }) => `bodies.${id}`),
    ...section.features
      .filter((feature) => ('level' in feature ? has(feature.x, feature.level) : inX(feature.x) && tall(box, live)))
      .map(({ id }) => `features.${id}`),
    ...section.observations.filter(({ x, head }) => has(x, head)).map(({ id }) => `observations.${id}`),
    ...section.limits
      .filter(({ from, to, level }) => has(from, level) && has(to, level))
      .map(({ id }) => `limits.${id}`),
    ...(markup
      ? live.markup.marks
          .filter((mark) => !hidden.has(mark.layer) && mark.points.every(([x, z]) => has(x, z)))
          .map(({ id }) => `marks.${id}`)
      : []),
  ]
  if (objects.length > 0) return objects
  return (['ground', 'base'] as const).flatMap((line) => {
    const { points, keys } = lineOf(live, line)
    return points.flatMap(([x, z], i) => {
      const key = keys[i]
      return key !== undefined && has(x, z) ? [vertexPath(line, key)] : []
    })
  })
}

/** A trench or wall has no level: it counts when the box reaches over some of the ground's depth there. */
function tall(box: Box, { section }: LiveSection): boolean {
  const top = Math.max(...section.ground.map(([, z]) => z))
  const bottom = Math.min(...section.base.map(([, z]) => z))
  return box.z1 > bottom && box.z0 < top
}
