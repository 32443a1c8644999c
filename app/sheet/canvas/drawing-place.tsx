import { Component, lazy, type ReactNode, Suspense, useState, useSyncExternalStore } from 'react'
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

/** Where the canvas cannot be loaded or started, the still drawing stays, and everything around it goes on working. */
class Otherwise extends Component<{ failed(): void; children: ReactNode }, { failed: boolean }> {
  override state = { failed: false }
  static getDerivedStateFromError() {
    return { failed: true }
  }
  override componentDidCatch() {
    this.props.failed()
  }
  override render() {
    return this.state.failed ? null : this.props.children
  }
}

/**
 * The drawing: as the server made it (`first`) until the canvas has painted its first frame in the same place, then the canvas.
 */
export function DrawingPlace({ sheet, first }: { sheet: OpenSheet; first: ReactNode }) {
  const awake = useAwake()
  const [ready, setReady] = useState(false)
  const failed = () => {
    setReady(false)
    sheet.say('The drawing could not be started. Reload the page; what you changed is kept.', 'trouble')
  }
  return (
    <div className="drawing-place">
      {ready ? null : <div className="drawing-first">{first}</div>}
      {awake ? (
        <Otherwise failed={failed}>
          <Suspense fallback={null}>
            <Canvas sheet={sheet} onReady={() => setReady(true)} />
          </Suspense>
        </Otherwise>
      ) : null}
    </div>
  )
}
