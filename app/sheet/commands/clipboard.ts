import type { OpenSheet } from '../sheet-store'
import { freshId } from '../tools/fresh-id'
import { neat } from '../tools/moves'
import { removeEdits } from '../tools/remove'
import { type Cut, cutOut, pasteEdits, reach, readCut } from './cut'

/** What is picked, as text for the clipboard; null when nothing of it can be copied. */
export function copyText(sheet: OpenSheet): string | null {
  const { picked, live, caseId } = sheet.get()
  if (picked.length === 0) return null
  const cut = cutOut(live, caseId, picked)
  if (cut === null) {
    sheet.say('Ground, base, banks and vertices belong to this section and cannot be copied.')
    return null
  }
  sheet.say(picked.length === 1 ? 'Copied.' : `${picked.length} things copied.`)
  return JSON.stringify(cut)
}

export function cutPicked(sheet: OpenSheet) {
  const { edits, says } = removeEdits(sheet.get().picked, sheet.stored())
  if (says) sheet.say(says, 'trouble')
  if (edits.length > 0) sheet.edit(edits)
}

/** False when the text is no part of a section, so that the browser may do with it what it likes. */
export function pasteText(sheet: OpenSheet, text: string): boolean {
  const cut = readCut(text)
  if (cut === null) return false
  put(sheet, cut)
  return true
}

export function duplicate(sheet: OpenSheet) {
  const { picked, live, caseId } = sheet.get()
  const cut = cutOut(live, caseId, picked)
  if (cut) put(sheet, cut)
  else sheet.say('Ground, base, banks and vertices belong to this section and cannot be doubled.')
}

/** A little beside where it was; in a section that does not reach there, in the middle of what is shown. */
function put(sheet: OpenSheet, cut: Cut) {
  const state = sheet.get()
  const { section } = sheet.stored()
  const { left, right } = section
  const { from, to } = reach(cut)
  const view = state.view ?? state.seen
  const aside = view ? (view.x1 - view.x0) / 50 : (right.x - left.x) / 50
  const middle = view ? (view.x0 + view.x1) / 2 : (left.x + right.x) / 2
  const beyond = from + aside > right.x || to + aside < left.x
  const shift = neat(beyond ? middle - (from + to) / 2 : Number(aside.toPrecision(1)))
  const { edits, picked } = pasteEdits(cut, section, shift, freshId)
  if (sheet.edit(edits, undefined, picked)) sheet.set({ tool: 'pick' })
}
