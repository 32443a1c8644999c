import { useEffect } from 'react'
import type { Sheet, SheetState } from '../state'

type Lasting = Pick<SheetState, 'units' | 'theme'>
const KEY = 'doab.sheet'

function remembered(): Partial<Lasting> {
  try {
    const kept: unknown = JSON.parse(localStorage.getItem(KEY) ?? '{}')
    if (typeof kept !== 'object' || kept === null) return {}
    return {
      ...('units' in kept && (kept.units === 'si' || kept.units === 'us') ? { units: kept.units } : {}),
      ...('theme' in kept && (kept.theme === 'light' || kept.theme === 'dark') ? { theme: kept.theme } : {}),
    }
  } catch {
    // No storage here, or not ours: the sheet opens as it ships.
    return {}
  }
}

const outside = (): SheetState['theme'] =>
  (document.documentElement.dataset.theme ??
    (matchMedia('(prefers-color-scheme: dark)').matches ? 'dark' : 'light')) === 'dark'
    ? 'dark'
    : 'light'

/** Units and theme are a person's own and last from one sheet to the next, on this machine. */
export function useLasting(sheet: Sheet) {
  useEffect(() => {
    const before = remembered()
    sheet.set({ theme: before.theme ?? outside(), ...(before.units ? { units: before.units } : {}) })
    let last: Lasting = { units: sheet.get().units, theme: sheet.get().theme }
    return sheet.subscribe(() => {
      const { units, theme } = sheet.get()
      if (units === last.units && theme === last.theme) return
      last = { units, theme }
      try {
        localStorage.setItem(KEY, JSON.stringify(last))
      } catch {
        // A full or forbidden store costs a preference, nothing else.
      }
    })
  }, [sheet])
}
