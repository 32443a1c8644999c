import { useState } from 'react'
import { DrawingPlace } from '../canvas/drawing-place'
import { TableView } from '../panels/table/table-view'
import { FirstDrawing } from './first-drawing'
import { Leftovers } from './leftovers'
import { barred, Notices } from './notices'
import type { LiveSheet } from './open-live'
import { SheetBar, type Showing } from './sheet-bar'
import { Side } from './side'
import type { First } from './surround'
import { ToolRail } from './tool-rail'
import { TopBar } from './top-bar'
import { useSheetState } from './use-sheet'

/** The room the drawing hangs in: bar above, rail below, the side with particulars and answers. */
export function Room({ first, live }: { first: First; live: LiveSheet | null }) {
  const theme = useSheetState((state) => state.theme)
  const may = useSheetState((state) => state.may)
  const presenting = useSheetState((state) => state.presenting)
  const shut = useSheetState((state) => barred(state.link, first.token !== null))
  const [showing, setShowing] = useState<Showing>('drawing')
  const drawn = <FirstDrawing svg={first.svg} />
  return (
    <div
      className={`sheet-inks inks-${theme} sheet-room`}
      data-may={may}
      data-shut={shut || undefined}
      data-presenting={presenting || undefined}
    >
      <TopBar surround={first} shut={shut} onRetry={live ? () => live.connection.retry() : undefined} />
      <main className="sheet-main" aria-label="Sheet">
        {shut ? null : <SheetBar showing={showing} onShow={setShowing} />}
        <Notices surround={first} />
        {live && may === 'write' ? <Leftovers live={live} /> : null}
        {shut ? null : (
          <div className="paper" hidden={showing !== 'drawing'}>
            {live ? <DrawingPlace sheet={live.sheet} first={drawn} /> : drawn}
          </div>
        )}
        {showing === 'table' && !shut ? <TableView /> : null}
      </main>
      {shut ? null : (
        <>
          <ToolRail />
          <Side table={showing === 'table'} />
        </>
      )}
    </div>
  )
}
