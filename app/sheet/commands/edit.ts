import { removeEdits } from '../tools/remove'
import { copyText, cutPicked, duplicate, pasteText } from './clipboard'
import type { Command, Desk } from './types'

/** Removes from the drawing, so from every case; "leave out" is what a case does. */
export function removePicked({ sheet }: Pick<Desk, 'sheet'>) {
  const { picked } = sheet.get()
  const { edits, says } = removeEdits(picked, sheet.stored())
  if (says) sheet.say(says, 'trouble')
  if (edits.length > 0) sheet.edit(edits)
}

/** Everything on the section that can be moved and copied; the lines and banks are its frame. */
function selectAll({ sheet }: Desk) {
  const { live, showMarkup } = sheet.get()
  const { bodies, recharge, features, observations, limits } = live.section
  const hidden = new Set(live.markup.layers.filter((layer) => layer.hidden || layer.locked).map(({ id }) => id))
  sheet.set({
    tool: 'pick',
    picked: [
      ...bodies.map(({ id }) => `bodies.${id}`),
      ...recharge.map(({ id }) => `recharge.${id}`),
      ...features.map(({ id }) => `features.${id}`),
      ...observations.map(({ id }) => `observations.${id}`),
      ...limits.map(({ id }) => `limits.${id}`),
      ...(showMarkup ? live.markup.marks.filter(({ layer }) => !hidden.has(layer)).map(({ id }) => `marks.${id}`) : []),
    ],
  })
}

export const EDITS: Command[] = [
  {
    id: 'remove',
    label: 'Remove',
    group: 'edit',
    keys: ['Delete', 'Backspace'],
    enabled: (state) => state.may === 'write' && state.picked.length > 0,
    run: (desk) => removePicked(desk),
  },
  {
    id: 'copy',
    label: 'Copy',
    group: 'edit',
    keys: ['Mod+C'],
    enabled: (state) => state.picked.length > 0,
    run: async ({ sheet, clipboard }) => {
      const text = copyText(sheet)
      if (text !== null) await clipboard.write(text).catch(() => refused(sheet))
    },
  },
  {
    id: 'cut',
    label: 'Cut',
    group: 'edit',
    keys: ['Mod+X'],
    enabled: (state) => state.may === 'write' && state.picked.length > 0,
    run: async ({ sheet, clipboard }) => {
      const text = copyText(sheet)
      if (text === null) return
      try {
        await clipboard.write(text)
        cutPicked(sheet)
      } catch {
        refused(sheet)
      }
    },
  },
  {
    id: 'paste',
    label: 'Paste',
    group: 'edit',
    keys: ['Mod+V'],
    enabled: (state) => state.may === 'write',
    run: async ({ sheet, clipboard }) => {
      const text = await clipboard.read().catch(() => null)
      if (text === null) refused(sheet)
      else if (!pasteText(sheet, text)) sheet.say('There is nothing of a section on the clipboard.')
    },
  },
  {
    id: 'duplicate',
    label: 'Duplicate beside itself',
    group: 'edit',
    keys: ['Mod+D'],
    enabled: (state) => state.may === 'write' && state.picked.length > 0,
    run: ({ sheet }) => duplicate(sheet),
  },
  {
    id: 'select-all',
    label: 'Pick everything',
    group: 'edit',
    keys: ['Mod+A'],
    enabled: () => true,
    run: selectAll,
  },
]

function refused(sheet: Desk['sheet']) {
  sheet.say('The browser did not let the page use the clipboard. Use the keys instead: Ctrl C, Ctrl V.', 'trouble')
}
