import type { SheetState } from '../state'
import type { At, Draft, Handle } from '../tools/types'
import type { Picture } from './picture'

/** What the overlay is painted from. */
export type Over = {
  picture: Picture
  state: SheetState
  draft: Draft | null
  handles: Handle[]
  pointer: At | null
  touch: boolean
}
