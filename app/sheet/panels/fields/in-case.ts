import { type CaseValue, valueAt } from '~/section'
import { useSheetState } from '../../shell/use-sheet'

/** A value as it counts now: the chosen case's own where it has one (`own`), else the drawn one. */
export function useCaseValue(path: string): { value: unknown; drawn: unknown; own: boolean; caseId: string | null } {
  const drawn = useSheetState((state) => valueAt(state.live.section, path))
  const caseOf = useSheetState((state) => state.live.section.cases.find(({ id }) => id === state.caseId) ?? null)
  const set: Record<string, CaseValue> = caseOf?.set ?? {}
  const own = Object.hasOwn(set, path)
  return { value: own ? set[path] : drawn, drawn, own, caseId: caseOf?.id ?? null }
}
