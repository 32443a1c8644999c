import { LISTS, type Section } from '~/section'
import { fillBank } from './edit/fields'
import { growMarkup } from './edit/markup'
import { growObject, prepare } from './edit/objects'
import { spread } from './order'
import { DOC_VERSION, type Tree } from './shape'
import type { LiveSection } from './types'

export type Planted = { section: Section } & Partial<Pick<LiveSection, 'keys' | 'markup'>>

/** Writes a whole section into an empty tree. Without keys, vertices are numbered "v1", "v2", … along their line. */
export function plant(tree: Tree, { section, keys, markup }: Planted): void {
  tree.open('doc')?.set('version', DOC_VERSION)
  const words = tree.open('section')
  for (const field of ['title', 'datum', 'host', 'surfaceSeepage', 'name', 'note'] as const)
    if (section[field] !== undefined) words?.set(field, section[field])
  for (const side of ['left', 'right'] as const) {
    const bank = tree.open(side)
    if (bank) fillBank(bank, section[side])
  }
  for (const line of ['ground', 'base'] as const)
    section[line].forEach(([x, z], i) => {
      tree.open(line)?.set(keys?.[line][i] ?? `v${i + 1}`, { x, z })
    })
  for (const list of LISTS) {
    const branch = tree.open(list)
    const orders = spread(section[list].length)
    section[list].forEach((object, i) => {
      const ready = prepare(list, object, list === 'bodies' ? keys?.bodies[object.id] : undefined)
      if (branch && ready) growObject(tree, branch, object.id, { ...ready, order: orders[i] ?? '' })
    })
  }
  for (const [path, text] of Object.entries(section.sources)) tree.open('sources')?.set(path, text)
  for (const list of ['layers', 'marks'] as const) {
    const branch = tree.open(list)
    for (const object of markup?.[list] ?? []) if (branch) growMarkup(tree, branch, list, object.id, object)
  }
}
