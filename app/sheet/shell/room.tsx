import { useState } from 'react'
import { TableView } from '../panels/table/table-view'
import { FirstDrawing } from './first-drawing'
import { SheetBar } from './sheet-bar'
import { Side } from './side'
import type { First } from './surround'
import { ToolRail } from './tool-rail'
import { TopBar } from './top-bar'
import { useSheetState } from './use-sheet'

export type Showing = 'drawing' | 'table'

/** The room the drawing hangs in: bar above, rail below, the side with particulars and answers. */
export function Room({ first, canvas, onRetry }: { first: First; canvas?: React.ReactNode; onRetry?: () => void }) {
  const theme = useSheetState((state) => state.theme)
  const may = useSheetState((state) => state.may)
  const presenting = useSheetState((state) => state.presenting)
  const [showing, setShowing] = useState<Showing>('drawing')
  return (
    <div className={`sheet-inks inks-${theme} sheet-room`} data-may={may} data-presenting={presenting || undefined}>
      <TopBar surround={first} onRetry={onRetry} />
      <main className="sheet-main" aria-label="Sheet">
        <SheetBar showing={showing} onShow={setShowing} />
        <div className="paper" hidden={showing !== 'drawing'}>
          {canvas ?? <FirstDrawing svg={first.svg} />}
        </div>
        {showing === 'table' ? <TableView /> : null}
      </main>
      <ToolRail />
      <Side />
    </div>
  )
}
