import { clsx } from 'clsx'
import { useCallback } from 'react'
import { useSheetState } from './use-sheet'

/** Popovers hang at the end of the page, outside the sheet: they carry the sheet's inks with them. */
export function usePopClass(): (name?: string) => string {
  const theme = useSheetState((state) => state.theme)
  return useCallback((name?: string) => clsx('sheet-inks', 'sheet-pop', `inks-${theme}`, name), [theme])
}
