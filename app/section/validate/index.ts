import { LIMITS } from '../rules/limits'
import { isPathOf } from '../rules/paths'
import { said } from '../rules/rule'
import type { Problem, Section } from '../types'
import { checkCases } from './cases'
import { checkObjects } from './objects'
import { listener, type Say } from './say'
import { checkBodies, checkStrip } from './shape'

/**
 * What is wrong with a section whose fields are each of the right kind: [] when it can be solved. Paths are in the format's
 * words; places are where the drawing shows it.
 */
export function findProblems(section: Section): Problem[] {
  const { problems, say } = listener()
  checkSize(section, say)
  if (problems.length > 0) return problems
  const strip = checkStrip(section, say)
  checkBodies(section, say)
  if (strip) checkObjects(section, say)
  checkCases(section, problems.length === 0, say)
  for (const path of Object.keys(section.sources))
    if (!isPathOf(section, path))
      say(`sources.${path}`, `This section has no “${path}”: remove the source, or note it at the value it is for.`)
  return problems
}

function checkSize(section: Section, say: Say) {
  const total =
    section.ground.length + section.base.length + section.bodies.reduce((sum, b) => sum + b.outline.length, 0)
  if (total > LIMITS.vertices)
    say(
      'bodies',
      `The section has ${said(total)} vertices; it may have at most ${said(LIMITS.vertices)}. Simplify lines.`,
    )
}
