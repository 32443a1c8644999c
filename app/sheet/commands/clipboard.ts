import { cutOut, pasteEdits } from '~/live'
import type { OpenSheet } from '../sheet-store'
import { removeEdits } from '../tools/remove'

/** What is picked, as text for the clipboard; null when nothing of it can be copied. */
export function copyText(sheet: OpenSheet): string | null {
  const { picked, live } = sheet.get()
  if (picked.length === 0) return null
  const cut = cutOut(live, picked)
  return cut === null ? null : JSON.stringify(cut)
}
export function cutPicked(sheet: OpenSheet) {
  const { edits, says } = removeEdits(sheet.get().picked, sheet.stored())
  if (says) sheet.say(says, 'trouble')
  if (edits.length > 0) sheet.edit(edits)
}
export function pasteText(sheet: OpenSheet, text: string): boolean {
  return false
}
export function duplicate(sheet: OpenSheet) {}
