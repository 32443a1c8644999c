import type { Edit } from '~/live'
import type { CaseValue } from '~/section'

/**
 * Which values a case can hold of its own. Decided so:
 * - With a case selected, changing a plain value of this list changes it in that case only; the drawing keeps its own.
 * - Shape stays in the drawing and is common to all cases: vertices of ground, base and bodies, a bank's x and kind, names,
 *   materials of bodies, sources, observations.
 * - Adding and removing objects stays in the drawing too. To leave an object out of one case, switch it off there (`case-off`).
 */
const SETTABLE: RegExp[] = [
  /^(left|right)\.(stage|conductance|bed|rate)$/,
  /^materials\.[^.]+\.(k|anisotropy|specificYield|porosity)$/,
  /^recharge\.[^.]+\.(from|to|rate)$/,
  /^features\.[^.]+\.(x|level|conductance|rate|thickness|k)$/,
  /^limits\.[^.]+\.(from|to|level|clearance)$/,
  /^surfaceSeepage$/,
]

/** True when a case can hold its own value at this path of the format ("left.stage", "recharge.r1.rate"). */
export const settableInCase = (path: string): boolean => SETTABLE.some((rule) => rule.test(path))

const isCaseValue = (value: unknown): value is CaseValue =>
  value === null || typeof value === 'number' || typeof value === 'string' || typeof value === 'boolean'

/** The edits as they are to be written while `caseId` is selected; unchanged for the drawing itself (null). */
export function toCase(edits: Edit[], caseId: string | null): Edit[] {
  if (caseId === null) return edits
  return edits.map((edit) =>
    edit.do === 'set' && settableInCase(edit.path) && isCaseValue(edit.value)
      ? { do: 'case-set', case: caseId, path: edit.path, value: edit.value }
      : edit,
  )
}
