import type { Edit } from '~/live'
import { type CaseValue, caseRuleAt, type Section } from '~/section'

/**
 * Where an edit goes while a case is selected. Decided so:
 * - Changing a plain value that a case can hold (the section knows which) changes it in that case only; the drawing keeps its own.
 * - Shape stays in the drawing and is common to all cases: vertices of ground, base and bodies, a bank's x and kind, names, notes,
 *   sources. So do observations: what was measured does not change with a "what if".
 * - Adding and removing objects stays in the drawing too. To leave an object out of one case, switch it off there (`case-off`).
 */
export function toCase(edits: Edit[], caseId: string | null, section: Section): Edit[] {
  if (caseId === null) return edits
  return edits.map((edit) =>
    edit.do === 'set' && goesToCase(edit.path, section) && isCaseValue(edit.value)
      ? { do: 'case-set', case: caseId, path: edit.path, value: edit.value }
      : edit,
  )
}

const goesToCase = (path: string, section: Section) =>
  !path.startsWith('observations.') && caseRuleAt(section, path) !== null

const isCaseValue = (value: unknown): value is CaseValue =>
  value === null || typeof value === 'number' || typeof value === 'string' || typeof value === 'boolean'
