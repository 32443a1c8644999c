import { useState } from 'react'
import { Room } from './shell/room'
import { createStillSheet } from './shell/still-sheet'
import type { First } from './shell/surround'
import { SheetProvider } from './shell/use-sheet'
import './shell/sheet.css'

export type { First } from './shell/surround'

/**
 * One open section: the drawing with everything around it. Drawn on the server from the stored section; in the browser the live
 * store and the canvas take over without the page changing under the reader.
 */
export function SheetPage({ first }: { first: First }) {
  const [still] = useState(() => createStillSheet(first))
  return (
    <SheetProvider sheet={still}>
      <Room first={first} />
    </SheetProvider>
  )
}
