import type { Machine } from '../tools/machine'
import type { At } from '../tools/types'

/** What the input needs of the canvas. */
export type Place = {
  element: HTMLElement
  machine(): Machine
  /** Where an event is, in metres and pixels. */
  locate(event: PointerEvent | WheelEvent | MouseEvent): At
  pan(dx: number, dy: number): void
  zoom(factor: number, px: number, py: number): void
  wheelZooms(): boolean
  penMode(): boolean
  setPenMode(): void
  /** Pointer over the sheet, or gone from it. */
  hover(at: At | null): void
  /** Space is held: any press moves the sheet. */
  spaceHeld(): boolean
  cursor(name: string | null): void
}

/** Two presses nearer than this in time and space are a double click. */
const DOUBLE_MS = 350
const DOUBLE_PX = { mouse: 5, pen: 8, touch: 24 } as const

type Finger = { x: number; y: number }

/**
 * Mouse, touch and pen on the drawing. One press goes to the tool in hand; two fingers move and zoom the sheet and take the
 * press back from the tool; with a pen in use, single fingers only move the sheet, so that a resting palm draws nothing.
 */
export function listen(place: Place): () => void {
  const { element } = place
  const fingers = new Map<number, Finger>()
  let active: { id: number; at: At; second: boolean; moved: boolean } | null = null
  let panning: { id: number; x: number; y: number } | null = null
  let pinch: { gap: number; x: number; y: number } | null = null
  let penDown = false
  let last: { time: number; px: number; py: number; kind: At['kind'] } | null = null

  const capture = (id: number) => {
    try {
      element.setPointerCapture(id)
    } catch {
      // The pointer has gone already (a test's, or a pen out of reach): the press simply ends with it.
    }
  }
  const leaveTool = () => {
    if (!active) return
    active = null
    place.machine().cancel()
  }
  const startPan = (event: PointerEvent) => {
    panning = { id: event.pointerId, x: event.clientX, y: event.clientY }
    capture(event.pointerId)
    place.cursor('grabbing')
  }
  const between = () => {
    const [a, b] = [...fingers.values()]
    if (!a || !b) return null
    return { gap: Math.hypot(a.x - b.x, a.y - b.y), x: (a.x + b.x) / 2, y: (a.y + b.y) / 2 }
  }

  function down(event: PointerEvent) {
    if (event.target instanceof Element && event.target.closest('[data-own-input]')) return
    const kind = kindOf(event)
    if (kind === 'pen') {
      penDown = true
      place.setPenMode()
    }
    if (kind === 'touch') {
      // A palm that comes down while the pen draws is no finger.
      if (penDown) return
      fingers.set(event.pointerId, { x: event.clientX, y: event.clientY })
      if (fingers.size === 2) {
        leaveTool()
        panning = null
        pinch = between()
        return
      }
      if (fingers.size > 2) return
      if (place.penMode()) {
        startPan(event)
        return
      }
    }
    if (event.button === 1 || (event.button === 0 && place.spaceHeld())) {
      event.preventDefault()
      startPan(event)
      return
    }
    if (event.button !== 0 || active) return
    element.focus({ preventScroll: true })
    capture(event.pointerId)
    const at = place.locate(event)
    const second =
      last !== null &&
      last.kind === kind &&
      event.timeStamp - last.time < DOUBLE_MS &&
      Math.hypot(at.px - last.px, at.py - last.py) < DOUBLE_PX[kind]
    last = second ? null : { time: event.timeStamp, px: at.px, py: at.py, kind }
    active = { id: event.pointerId, at, second, moved: false }
    place.hover(at)
    if (second) place.machine().double(at)
    else place.machine().down(at)
  }

  function move(event: PointerEvent) {
    const finger = fingers.get(event.pointerId)
    if (finger) {
      finger.x = event.clientX
      finger.y = event.clientY
      if (pinch) {
        const now = between()
        if (!now) return
        const box = element.getBoundingClientRect()
        place.pan(now.x - pinch.x, now.y - pinch.y)
        if (now.gap > 0 && pinch.gap > 0) place.zoom(pinch.gap / now.gap, now.x - box.left, now.y - box.top)
        pinch = now
        return
      }
    }
    if (panning?.id === event.pointerId) {
      place.pan(event.clientX - panning.x, event.clientY - panning.y)
      panning = { id: event.pointerId, x: event.clientX, y: event.clientY }
      return
    }
    if (active ? active.id !== event.pointerId : fingers.size > 1) return
    // A pen tells more points than there are frames; strokes want all of them.
    const all = active && event.pointerType === 'pen' ? (event.getCoalescedEvents?.() ?? []) : []
    let at = place.locate(event)
    for (const each of all.length > 1 ? all : [event]) {
      if (each !== event) at = place.locate(each)
      if (active && Math.hypot(at.px - active.at.px, at.py - active.at.py) > DOUBLE_PX[at.kind]) active.moved = true
      place.machine().move(at)
    }
    // Not asked for again: what the tool did may have moved the page, and measuring it twice a frame costs a layout.
    place.hover(at)
  }

  function up(event: PointerEvent) {
    if (event.pointerType === 'pen') penDown = false
    fingers.delete(event.pointerId)
    if (fingers.size < 2) pinch = null
    if (panning?.id === event.pointerId) {
      panning = null
      place.cursor(null)
    }
    if (active?.id !== event.pointerId) return
    const { second, moved } = active
    active = null
    const at = place.locate(event)
    place.machine().up(at)
    if (second && !moved) place.machine().doubleUp(at)
    if (at.kind === 'touch') place.hover(null)
  }

  function lost(event: PointerEvent) {
    if (event.pointerType === 'pen') penDown = false
    fingers.delete(event.pointerId)
    if (fingers.size < 2) pinch = null
    if (panning?.id === event.pointerId) panning = null
    if (active?.id === event.pointerId) leaveTool()
  }

  function wheel(event: WheelEvent) {
    event.preventDefault()
    const unit = event.deltaMode === 1 ? 16 : event.deltaMode === 2 ? 400 : 1
    const [dx, dy] = [event.deltaX * unit, event.deltaY * unit]
    const at = place.locate(event)
    if (event.ctrlKey || event.metaKey || (place.wheelZooms() && !event.shiftKey)) {
      // A pinch on a trackpad comes in small steps with Ctrl; a wheel notch is about 100.
      const rate = Math.abs(dy) < 40 ? 0.01 : 0.0018
      place.zoom(Math.exp(Math.max(-240, Math.min(240, dy)) * rate), at.px, at.py)
    } else if (event.shiftKey && dx === 0) place.pan(-dy, 0)
    else place.pan(-dx, -dy)
    place.hover(place.locate(event))
  }

  const leave = () => {
    if (!active) place.hover(null)
  }
  const noMenu = (event: Event) => {
    if (active) event.preventDefault()
  }

  element.addEventListener('pointerdown', down)
  element.addEventListener('pointermove', move)
  element.addEventListener('pointerup', up)
  element.addEventListener('pointercancel', lost)
  element.addEventListener('lostpointercapture', lost)
  element.addEventListener('pointerleave', leave)
  element.addEventListener('contextmenu', noMenu)
  element.addEventListener('wheel', wheel, { passive: false })
  return () => {
    leaveTool()
    element.removeEventListener('pointerdown', down)
    element.removeEventListener('pointermove', move)
    element.removeEventListener('pointerup', up)
    element.removeEventListener('pointercancel', lost)
    element.removeEventListener('lostpointercapture', lost)
    element.removeEventListener('pointerleave', leave)
    element.removeEventListener('contextmenu', noMenu)
    element.removeEventListener('wheel', wheel)
  }
}

export const kindOf = (event: { pointerType?: string }): At['kind'] =>
  event.pointerType === 'touch' ? 'touch' : event.pointerType === 'pen' ? 'pen' : 'mouse'
