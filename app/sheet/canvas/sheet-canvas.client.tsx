import { useEffect, useRef, useState } from 'react'
import type { OpenSheet } from '../sheet-store'
import { type Asking, AskText } from './ask-text'
import { mountCanvas } from './mount'

/** The canvas in React: gives it a box and a place to write notes; everything else happens in mount.ts, outside React. */
export default function SheetCanvas({ sheet, onReady }: { sheet: OpenSheet; onReady(): void }) {
  const box = useRef<HTMLDivElement>(null)
  const ready = useRef(onReady)
  ready.current = onReady
  const [painted, setPainted] = useState(false)
  const [asking, setAsking] = useState<Asking | null>(null)
  useEffect(() => {
    const element = box.current
    if (!element) return
    const canvas = mountCanvas(element, sheet, {
      ready() {
        setPainted(true)
        ready.current()
      },
      askText: (px, py, initial) =>
        new Promise((resolve) => {
          setAsking({
            px,
            py,
            initial,
            answer(text) {
              setAsking(null)
              resolve(text)
              element.focus({ preventScroll: true })
            },
          })
        }),
    })
    return () => canvas.close()
  }, [sheet])
  return (
    <div
      ref={box}
      className="sheet-canvas"
      role="application"
      data-ready={painted}
      aria-label="Drawing of the section. The table shows the same as text."
      // biome-ignore lint/a11y/noNoninteractiveTabindex: the drawing takes arrow keys and shortcuts; the table says the same in words
      tabIndex={0}
    >
      {asking ? <AskText key={`${asking.px} ${asking.py}`} asking={asking} /> : null}
    </div>
  )
}
