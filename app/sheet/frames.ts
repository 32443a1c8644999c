/** Runs the latest of several requests once, on the next frame. `now` runs what waits at once; `stop` forgets it. */
export type Frames = { ask(): void; now(): void; stop(): void }

/** Once per animation frame; a hidden tab gets no frames, so there a timer stands in and peers' edits still arrive. */
export function animationFrames(run: () => void): Frames {
  let frame: number | null = null
  let timer: ReturnType<typeof setTimeout> | null = null
  const clear = () => {
    if (frame !== null) cancelAnimationFrame(frame)
    if (timer !== null) clearTimeout(timer)
    frame = null
    timer = null
  }
  const go = () => {
    clear()
    run()
  }
  return {
    ask() {
      if (frame !== null || timer !== null) return
      if (typeof requestAnimationFrame === 'undefined') {
        timer = setTimeout(go, 0)
        return
      }
      frame = requestAnimationFrame(go)
      timer = setTimeout(go, 250)
    },
    now() {
      if (frame !== null || timer !== null) go()
    },
    stop: clear,
  }
}
