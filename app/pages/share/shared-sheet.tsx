import { type First, SheetPage } from '~/sheet/sheet'

/**
 * The sheet as the holder of a read-only link sees it: live, with its cases, readings and downloads, and nothing to change.
 * What the holder may do is decided by the server; this page only offers no more.
 */
export function SharedSheet({ first }: { first: First & { token: string } }) {
  return <SheetPage first={{ ...first, may: 'read', userId: null }} />
}
