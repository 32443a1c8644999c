import type { Tree } from '../shape'
import type { Edit } from '../types'
import { setBank, setField, setInCase, setOff, setSource } from './fields'
import { addMarkup, removeMarkup, setMarkup } from './markup'
import { addObject, insertVertex, moveVertex, removeObject, removeVertex, reorderObject } from './objects'

/**
 * Carries out edits on a tree, in order. An edit whose target is gone, or that would store what its field cannot hold, is passed
 * over. Edits may come from another person's screen: nothing about them is taken for granted, and nothing throws.
 */
export function perform(tree: Tree, edits: readonly Edit[]): void {
  if (!Array.isArray(edits)) return
  for (const edit of edits) if (typeof edit === 'object' && edit !== null) performOne(tree, edit)
}

function performOne(tree: Tree, edit: Edit): void {
  switch (edit.do) {
    case 'set':
      setField(tree, edit.path, edit.value)
      break
    case 'set-bank':
      setBank(tree, edit.side, edit.bank)
      break
    case 'add':
      addObject(tree, edit.list, edit.object, edit.after)
      break
    case 'remove':
      removeObject(tree, edit.list, edit.id)
      break
    case 'reorder':
      reorderObject(tree, edit.list, edit.id, edit.after)
      break
    case 'move-vertex':
      moveVertex(tree, edit.line, edit.key, edit.to)
      break
    case 'insert-vertex':
      insertVertex(tree, edit.line, edit.key, edit.at, edit.after)
      break
    case 'remove-vertex':
      removeVertex(tree, edit.line, edit.key)
      break
    case 'source':
      setSource(tree, edit.path, edit.text)
      break
    case 'case-set':
      setInCase(tree, edit.case, edit.path, edit.value)
      break
    case 'case-off':
      setOff(tree, edit.case, edit.id, edit.off)
      break
    case 'add-layer':
      addMarkup(tree, 'layers', edit.layer)
      break
    case 'set-layer':
      setMarkup(tree, 'layers', edit.id, edit.change)
      break
    case 'remove-layer':
      removeMarkup(tree, 'layers', edit.id)
      break
    case 'add-mark':
      addMarkup(tree, 'marks', edit.mark)
      break
    case 'set-mark':
      setMarkup(tree, 'marks', edit.id, edit.change)
      break
    case 'remove-mark':
      removeMarkup(tree, 'marks', edit.id)
      break
  }
}
