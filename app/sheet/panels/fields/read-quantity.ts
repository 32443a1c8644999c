import { loadUnits, parseQuantity, type Quantity } from '~/section'
import type { UnitSet } from '../../state'
import type { Kind } from './quantities'

/** Reads what was typed. Should the parser's file not come (offline, a new version), it says so and keeps what was typed. */
export async function readQuantity(text: string, kind: Kind, units: UnitSet): Promise<Quantity> {
  try {
    return await parseQuantity(text, kind, { set: units })
  } catch {
    return { ok: false, message: 'Units cannot be read just now; the page could not load them. Try again.' }
  }
}

/** The parser comes late; a field that is entered asks for it, so that Enter finds it there. */
export function warmUnits() {
  loadUnits().catch(() => {
    // readQuantity says so when it matters.
  })
}
