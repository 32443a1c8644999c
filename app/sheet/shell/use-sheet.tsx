import { createContext, type ReactNode, use, useCallback, useRef, useSyncExternalStore } from 'react'
import type { Sheet, SheetState } from '../state'

const SheetContext = createContext<Sheet | null>(null)

/** Makes one open sheet known to everything around and inside the drawing. */
export function SheetProvider({ sheet, children }: { sheet: Sheet; children: ReactNode }) {
  return <SheetContext value={sheet}>{children}</SheetContext>
}

export function useSheet(): Sheet {
  const sheet = use(SheetContext)
  if (!sheet) throw new Error('useSheet stands outside a SheetProvider')
  return sheet
}

/** Two short lists or flat records with the same members; for selections made anew on every call. */
export function sameMembers(a: unknown, b: unknown): boolean {
  if (Object.is(a, b)) return true
  if (typeof a !== 'object' || typeof b !== 'object' || a === null || b === null) return false
  const left = Object.entries(a)
  const right = new Map(Object.entries(b))
  return left.length === right.size && left.every(([key, value]) => right.has(key) && Object.is(value, right.get(key)))
}

/**
 * Part of the sheet's state. A component is drawn anew only when its part changes, so that a drag, which changes the state on
 * every frame, does not draw the tool rail sixty times a second.
 */
export function useSheetState<T>(select: (state: SheetState) => T, same: (a: T, b: T) => boolean = Object.is): T {
  const sheet = useSheet()
  const last = useRef<{ state: SheetState; select: (state: SheetState) => T; part: T } | null>(null)
  const read = useCallback(() => {
    const state = sheet.get()
    const known = last.current
    if (known && known.state === state && known.select === select) return known.part
    const fresh = select(state)
    const part = known && same(known.part, fresh) ? known.part : fresh
    last.current = { state, select, part }
    return part
  }, [sheet, select, same])
  return useSyncExternalStore(sheet.subscribe, read, read)
}
