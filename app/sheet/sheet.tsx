import { useEffect, useState } from 'react'
import { useLasting } from './shell/lasting'
import type { LiveSheet } from './shell/open-live'
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
export function SheetPage(props: { first: First }) {
  // The sheet is opened on what the page came with; whatever the router loads later does not open it again.
  const [first] = useState(props.first)
  const [still] = useState(() => createStillSheet(first))
  const [live, setLive] = useState<LiveSheet | null>(null)
  useEffect(() => {
    let gone = false
    let close = () => {}
    // The store, the connection and the canvas come as their own files, after the page can be read.
    void import('./shell/open-live').then(({ openLive }) => {
      if (!gone) close = openLive(first, still, setLive)
    })
    return () => {
      gone = true
      setLive(null)
      close()
    }
  }, [first, still])
  const sheet = live?.sheet ?? still
  useLasting(sheet)
  return (
    <SheetProvider sheet={sheet}>
      <Room first={first} live={live} />
    </SheetProvider>
  )
}
