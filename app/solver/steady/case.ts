import type { CaseValue, Section } from '~/section'

type Tree = { [key: string]: unknown }
const isTree = (value: unknown): value is Tree => typeof value === 'object' && value !== null

/**
 * The section as a case has it: its values set by path ("left.stage", "recharge.r1.rate"), objects in `off` left out. Paths
 * that lead nowhere are passed over: parseSection names them. The section given stays as it is.
 */
export function inCase(section: Section, caseId: string | null | undefined): Section {
  const chosen = caseId ? section.cases.find(({ id }) => id === caseId) : undefined
  if (!chosen) return section
  const copy: Section = structuredClone(section)
  for (const [path, value] of Object.entries(chosen.set)) setAt(copy, path.split('.'), value)
  const off = new Set(chosen.off)
  const stays = ({ id }: { id: string }) => !off.has(id)
  copy.bodies = copy.bodies.filter(stays)
  copy.recharge = copy.recharge.filter(stays)
  copy.features = copy.features.filter(stays)
  copy.observations = copy.observations.filter(stays)
  copy.limits = copy.limits.filter(stays)
  return copy
}

function setAt(root: unknown, path: string[], value: CaseValue): void {
  let at: unknown = root
  path.forEach((name, i) => {
    if (!isTree(at)) return
    if (Array.isArray(at)) at = at.find((one: unknown) => isTree(one) && one.id === name) ?? at[Number(name)]
    else if (i === path.length - 1) at[name] = value
    else at = at[name]
  })
}
