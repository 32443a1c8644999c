import { type Reading, readAt } from '~/solver'
import type { SheetState } from '../state'

/** The reading at the line, or at the middle of the highest stretch when no line is set. */
export function readingOf(state: SheetState): Reading | null {
  if (state.solution.status !== 'solved') return null
  if (state.read) return state.read
  const { highest } = state.solution
  const known = memo.get(state.solution)
  if (known) return known
  const fresh = readAt(state.solution, (highest.x + highest.to) / 2)
  memo.set(state.solution, fresh)
  return fresh
}
const memo = new WeakMap<object, Reading>()
