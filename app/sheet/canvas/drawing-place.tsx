import { lazy, type ReactNode, Suspense, useState, useSyncExternalStore } from 'react'
import type { OpenSheet } from '../sheet-store'
import './canvas.css'

const Canvas = lazy(() => import('./sheet-canvas.client'))

const never = () => () => {}
/** False on the server and while the page wakes up, so that both draw the same. */
const useAwake = () =>
  useSyncExternalStore(
    never,
    () => true,
    () => false,
  )

/**
 * The drawing: as the server made it (`first`) until the canvas has painted its first frame in the same place, then the canvas.
 */
export function DrawingPlace({ sheet, first }: { sheet: OpenSheet; first: ReactNode }) {
  const awake = useAwake()
  const [ready, setReady] = useState(false)
  return (
    <div className="drawing-place">
      {ready ? null : <div className="drawing-first">{first}</div>}
      {awake ? (
        <Suspense fallback={null}>
          <Canvas sheet={sheet} onReady={() => setReady(true)} />
        </Suspense>
      ) : null}
    </div>
  )
}
