import { inCase, offIds } from '../cases'
import { caseRuleAt, isPathOf, placeOf } from '../rules/paths'
import { troubleWith } from '../rules/rule'
import type { Case, Problem, Section } from '../types'
import { checkObjects } from './objects'
import { listener, type Say } from './say'

/** Every case by itself, then the section as that case has it. `sound`: the drawing itself is, so that a case may be tried. */
export function checkCases(section: Section, sound: boolean, say: Say) {
  const known = offIds(section)
  for (const one of section.cases) {
    const fine = checkWords(section, one, known, say)
    if (!fine || !sound) continue
    for (const problem of problemsOfCase(section, one))
      say(inCasePath(one, problem), inCaseWords(one, problem), problem.place)
  }
}

/** What goes wrong with the objects of the section as a case has it; paths are the section's own. */
export function problemsOfCase(section: Section, one: Case): Problem[] {
  const { problems, say } = listener()
  checkObjects(inCase(section, one), say)
  return problems
}

function checkWords(section: Section, one: Case, known: Set<string>, say: Say): boolean {
  let fine = true
  const wrong: Say = (...said) => {
    fine = false
    say(...said)
  }
  one.off.forEach((id, i) => {
    if (!known.has(id))
      wrong(`cases.${one.id}.off.${i}`, `There is nothing with the id “${id}” that this case could leave out.`)
    else if (one.off.indexOf(id) < i) wrong(`cases.${one.id}.off.${i}`, `“${id}” is left out twice: name it once.`)
  })
  for (const [path, value] of Object.entries(one.set)) {
    const rule = caseRuleAt(section, path)
    const at = `cases.${one.id}.set.${path}`
    if (!rule)
      wrong(
        at,
        isPathOf(section, path)
          ? `“${path}” is common to all cases; a case can change stages, levels, rates, conductivities and the like.`
          : `This section has no “${path}”: a case can only change a value that the drawing has.`,
        placeOf(section, path),
      )
    else {
      const trouble = troubleWith(rule, value)
      if (trouble) wrong(at, trouble, placeOf(section, path))
    }
  }
  return fine
}

const inCasePath = (one: Case, { path }: Problem) =>
  Object.hasOwn(one.set, path) ? `cases.${one.id}.set.${path}` : `cases.${one.id}`
const inCaseWords = (one: Case, { message }: Problem) => `In the case “${one.name ?? one.id}”: ${message}`
