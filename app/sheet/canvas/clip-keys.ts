import { copyText, cutPicked, pasteText } from '../commands/clipboard'
import type { Clipboard, Desk } from '../commands/types'
import type { ClipKeys } from './keyboard'

/** The page's clipboard, for menus; keys go by the clipboard events, which need no leave. */
export const pageClipboard: Clipboard = {
  write: (text) => navigator.clipboard.writeText(text),
  read: () => navigator.clipboard.readText(),
}

export const clipKeys = (desk: Desk): ClipKeys => ({
  copy(data) {
    const text = copyText(desk.sheet)
    if (text === null) return false
    data.setData('text/plain', text)
    return true
  },
  cut(data) {
    const text = copyText(desk.sheet)
    if (text === null) return false
    data.setData('text/plain', text)
    cutPicked(desk.sheet)
    return true
  },
  paste: (data) => pasteText(desk.sheet, data.getData('text/plain')),
})
