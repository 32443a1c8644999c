import Konva from 'konva'
import type { Plot } from '~/drawing'
import type { OpenSheet } from '../sheet-store'
import type { SheetState, View } from '../state'
import { TOOLS } from '../tools'
import { handlesOf } from '../tools/handles'
import { createMachine } from '../tools/machine'
import type { At, Draft, Handle } from '../tools/types'
import { clipKeys, pageClipboard } from './clip-keys'
import { loadFonts } from './fonts'
import { kindOf, listen } from './input'
import { listenToKeys } from './keyboard'
import { samePlots, split } from './layers'
import { paintOver } from './overlay'
import { paint } from './painter'
import { drawPicture, type Picture } from './picture'
import { createSurface, toMetres } from './surface'
import { kept, panned, same, scalesOf, seenIn, zoomed } from './view'

export type CanvasUi = {
  /** The first frame is painted. */
  ready(): void
  askText(px: number, py: number, initial: string): Promise<string | null>
}
export type MountedCanvas = {
  close(): void
  /** Paint now what waits for the next frame; for tests and measurements. */
  flush(): void
}

/** What the overlay hangs on besides the picture; a change of these leaves the drawing itself alone. */
const OVERLAY: (keyof SheetState)[] = ['picked', 'reading', 'read', 'peers', 'tool', 'following', 'presenting']
const PICTURE: (keyof SheetState)[] = [
  'live',
  'solution',
  'caseId',
  'view',
  'units',
  'grid',
  'showArrows',
  'showFlowLines',
  'showMarkup',
  'theme',
  'problems',
  'footing',
]

/**
 * The canvas of one sheet: three konva layers (what stays, what the answer moves, what lies over it), painted at most once per
 * frame, and the input that works on them. Konva's own hit graph is off; picking asks the drawing.
 */
export function mountCanvas(element: HTMLElement, sheet: OpenSheet, ui: CanvasUi): MountedCanvas {
  const host = document.createElement('div')
  host.style.cssText = 'position:absolute;inset:0'
  element.prepend(host)
  const stage = new Konva.Stage({ container: host, width: 1, height: 1, listening: false })
  const still = layer(stage)
  const moving = layer(stage)
  const over = layer(stage)

  let size = { width: 0, height: 0 }
  let picture: Picture | null = null
  let plots: { still: Plot[]; moving: Plot[] } = { still: [], moving: [] }
  let draft: Draft | null = null
  let handles: { of: unknown[]; list: Handle[] } | null = null
  let before = sheet.get()
  let frame: number | null = null
  let dirty = { picture: true, repaint: true, overlay: true }
  let first = true
  let hovering: At | null = null
  let held: string | null = null
  let frozen: View | null = null
  let place: DOMRect | null = null
  let closed = false

  still.shape.sceneFunc((context) => paint(context._context, plots.still))
  moving.shape.sceneFunc((context) => paint(context._context, plots.moving))
  over.shape.sceneFunc((context) => {
    if (picture)
      paintOver(context._context, {
        picture,
        state: sheet.get(),
        draft,
        handles: currentHandles(),
        pointer: hovering,
        touch: hovering?.kind === 'touch',
      })
  })

  function ask(what: Partial<typeof dirty>) {
    dirty = { ...dirty, ...what }
    if (frame === null && !closed) frame = requestAnimationFrame(draw)
  }

  function draw() {
    frame = null
    if (size.width < 2 || size.height < 2) return
    const now = dirty
    dirty = { picture: false, repaint: false, overlay: false }
    if (now.picture) {
      picture = drawPicture(sheet.get(), size, heldView())
      handles = null
      const next = split(picture.list.plots)
      const stillSame = !now.repaint && samePlots(plots.still, next.still)
      const movingSame = !now.repaint && samePlots(plots.moving, next.moving)
      plots = next
      if (!stillSame) still.layer.draw()
      if (!movingSame) moving.layer.draw()
      tellView(picture)
    }
    over.layer.draw()
    if (first) {
      first = false
      ui.ready()
    }
  }

  /** The strip fits itself to the sheet, but not while something is dragged: its scale must not change under the pointer. */
  function heldView(): View | null {
    if (!machine.state.busy && !sheet.gesture.active) frozen = null
    else if (frozen === null && picture) frozen = seenIn(picture.frame, picture.list.exaggeration)
    return frozen
  }

  function tellView({ frame: panel, list }: Picture) {
    // Device x = ax + bx·x, y = ay + by·z: for tests and for whoever puts something beside the drawing.
    const scales = `${panel.ax} ${panel.bx} ${panel.ay} ${panel.by}`
    if (element.dataset.scales !== scales) element.dataset.scales = scales
    // What is drawn, to the last digit: two sheets of one section must agree in it.
    const { solution, live } = sheet.get()
    const answer = solution.status === 'solved' ? `${solution.highest.x} ${solution.highest.head}` : 'none'
    if (element.dataset.answer !== answer) element.dataset.answer = answer
    const marks = String(live.markup.marks.length)
    if (element.dataset.marks !== marks) element.dataset.marks = marks
    const seen = seenIn(panel, list.exaggeration)
    if (same(seen, sheet.get().seen)) return
    sheet.set({ seen })
    const half = panel.box.height / 2 / Math.abs(panel.by)
    sheet.present({ view: { x0: seen.x0, x1: seen.x1, z0: seen.zMid - half, z1: seen.zMid + half } })
  }

  function currentHandles(): Handle[] {
    const state = sheet.get()
    if (!picture || state.may !== 'write' || state.tool !== 'pick') return []
    const of = [state.picked, state.live, state.caseId, picture]
    if (!handles || handles.of.some((one, i) => one !== of[i]))
      handles = { of, list: handlesOf(state.picked, state.live, state.caseId, picture.rechargeTop) }
    return handles.list
  }

  /** Change the view from where it is wanted now; following ends where one takes the sheet in one's own hands. */
  function look(change: (view: View, scales: ReturnType<typeof scalesOf>) => View) {
    if (!picture) return
    const state = sheet.get()
    const view = state.view ?? seenIn(picture.frame, picture.list.exaggeration)
    sheet.set({
      view: kept(change(view, scalesOf(view, picture.frame.box)), state.live.section),
      ...(state.following === null ? {} : { following: null }),
    })
  }
  const pan = (dx: number, dy: number) => look((view, scales) => panned(view, scales, dx, dy))
  const zoom = (factor: number, px: number, py: number) => look((view, scales) => zoomed(view, scales, factor, px, py))

  function follow() {
    const { following, peers } = sheet.get()
    const view = peers.find((peer) => peer.clientId === following)?.view
    if (!view || !picture || view.x1 <= view.x0 || view.z1 <= view.z0) return
    const { box } = picture.frame
    const wanted: View = {
      x0: view.x0,
      x1: view.x1,
      zMid: (view.z0 + view.z1) / 2,
      exaggeration: box.height / (view.z1 - view.z0) / (box.width / (view.x1 - view.x0)),
    }
    if (!same(wanted, sheet.get().view)) sheet.set({ view: wanted })
  }

  const surface = createSurface({
    sheet,
    picture: () => picture,
    handles: currentHandles,
    show(next) {
      draft = next
      ask({ overlay: true })
    },
    pan,
    askText: ui.askText,
  })
  let started = false
  const machine = createMachine(surface, TOOLS[sheet.get().tool], () => {
    if (started) showCursor()
  })

  function showCursor(name: string | null = held) {
    held = name
    element.style.cursor = held ?? (keys.spaceHeld() ? 'grab' : (machine.state.cursor ?? hoverCursor()))
  }
  function hoverCursor(): string {
    if (!hovering || sheet.get().tool !== 'pick') return 'default'
    const hit = surface.hit(hovering)
    if (!hit) return 'default'
    if (hit.handle?.shape === 'end') return 'ew-resize'
    if (hit.handle?.shape === 'level') return 'ns-resize'
    if (hit.handle?.shape === 'mid') return 'copy'
    return sheet.get().may === 'write' ? 'move' : 'pointer'
  }

  function locate(event: { clientX: number; clientY: number } & Partial<PointerEvent>): At {
    // Measured when a press begins and not again while it lasts: asking costs a layout of the whole page.
    if (place === null || !machine.state.busy) place = element.getBoundingClientRect()
    const [px, py] = [event.clientX - place.left, event.clientY - place.top]
    const spot = picture ? toMetres(picture, px, py) : { x: 0, z: 0 }
    return {
      px,
      py,
      ...spot,
      panel: picture ? panelAt(picture, px, py) : null,
      kind: kindOf(event),
      shift: event.shiftKey ?? false,
      alt: event.altKey ?? false,
      ctrl: event.ctrlKey ?? false,
      pressure: event.pressure ?? 0.5,
    }
  }

  function hover(at: At | null) {
    hovering = at
    showCursor()
    const { live, reading } = sheet.get()
    const { left, right } = live.section
    if (at === null) {
      sheet.present({ pointer: null })
      draftGone()
      ask({ overlay: true })
      return
    }
    sheet.present({ pointer: at.panel === null ? null : { x: at.x, z: at.z, panel: at.panel } })
    // The reading line goes with the pointer and stays where it was left.
    const x = Math.min(right.x, Math.max(left.x, at.x))
    if (at.panel !== null && at.x > left.x - 0.02 * (right.x - left.x) && at.x < right.x + 0.02 * (right.x - left.x)) {
      if (x !== reading) sheet.readAlong(x)
    }
    ask({ overlay: true })
  }
  function draftGone() {
    if (draft && !machine.state.busy && !draft.line) surface.show(null)
  }

  const stopInput = listen({
    element,
    machine: () => machine,
    locate,
    pan,
    zoom,
    wheelZooms: () => sheet.get().wheel === 'zoom',
    penMode: () => sheet.get().penMode ?? false,
    setPenMode: () => {
      if (!sheet.get().penMode) sheet.set({ penMode: true })
    },
    hover,
    spaceHeld: () => keys.spaceHeld(),
    cursor: showCursor,
  })
  const desk = { sheet, clipboard: pageClipboard }
  const keys = listenToKeys(() => machine, desk, { space: () => showCursor(), clip: clipKeys(desk) })
  started = true
  showCursor()

  const unsubscribe = sheet.watch(() => {
    const state = sheet.get()
    if (state.tool !== before.tool) machine.use(TOOLS[state.tool])
    if (state.following !== null && (state.peers !== before.peers || state.following !== before.following)) follow()
    const now = sheet.get()
    if (PICTURE.some((key) => now[key] !== before[key]))
      ask({ picture: true, overlay: true, repaint: dirty.repaint || now.theme !== before.theme })
    else if (OVERLAY.some((key) => now[key] !== before[key])) ask({ overlay: true })
    before = now
  })

  function resize() {
    const { width, height } = element.getBoundingClientRect()
    const ratio = window.devicePixelRatio || 1
    size = { width: Math.floor(width), height: Math.floor(height) }
    place = null
    if (size.width < 2 || size.height < 2) return
    for (const { layer: each } of [still, moving, over]) each.getCanvas().setPixelRatio(ratio)
    stage.size(size)
    ask({ picture: true, repaint: true })
    // Painted at once: a resized canvas is blank until then.
    flush()
  }
  function flush() {
    if (frame !== null) cancelAnimationFrame(frame)
    draw()
  }
  const watch = new ResizeObserver(resize)
  watch.observe(element)
  // Another screen, another pixel density; the box stays as large.
  const density = window.matchMedia(`(resolution: ${window.devicePixelRatio}dppx)`)
  density.addEventListener('change', resize)
  void loadFonts().then(() => {
    if (!closed) ask({ picture: true, repaint: true })
  })
  resize()

  return {
    flush,
    close() {
      closed = true
      if (frame !== null) cancelAnimationFrame(frame)
      unsubscribe()
      stopInput()
      keys.stop()
      watch.disconnect()
      density.removeEventListener('change', resize)
      sheet.present({ pointer: null, view: null })
      stage.destroy()
      host.remove()
    },
  }
}

function layer(stage: Konva.Stage) {
  const made = new Konva.Layer({ listening: false })
  const shape = new Konva.Shape({ listening: false, perfectDrawEnabled: false })
  made.add(shape)
  stage.add(made)
  return { layer: made, shape }
}

function panelAt(picture: Picture, px: number, py: number): string | null {
  const inside = picture.list.frames.find(
    ({ box }) => px >= box.x && px <= box.x + box.width && py >= box.y && py <= box.y + box.height,
  )
  return inside?.id ?? null
}
