import type { VertexKey } from '~/live'
import type { OpenSheet } from '../sheet-store'
import type { ToolName } from '../state'

/** A spot on the drawing, metres. */
export type Spot = { x: number; z: number }

/** Where the pointer is and how. `px`, `py` in CSS pixels on the canvas; `x`, `z` in metres on the section's own scales. */
export type At = Spot & {
  px: number
  py: number
  /** The panel under the pointer ("section", "discharge" …), null on the margins. */
  panel: string | null
  kind: 'mouse' | 'touch' | 'pen'
  shift: boolean
  alt: boolean
  ctrl: boolean
  /** 0…1; 0.5 where the device knows none. */
  pressure: number
}
export type Press = { key: string; shift: boolean; alt: boolean }

/** Where a vertex can be dragged or a new one pulled out of an edge, or an end or a level of something. */
export type Handle = Spot & {
  /** What it moves: "ground.v:KEY", "recharge.r1.from", "limits.l1.to", "left.stage". For `mid`, the line's path. */
  of: string
  shape: 'vertex' | 'mid' | 'end' | 'level'
  /** `mid`: the new vertex goes after this one. */
  after?: VertexKey
  picked?: boolean
}
export type Hit = { path: string; handle?: Handle }

export type Snapped = Spot & {
  /** What it caught, in words: "grid", "vertex", "water table", "ground"; null when free. */
  to: string | null
}

/** What a tool shows over the drawing while at work; never exported. */
export type Draft = {
  line?: Spot[]
  closed?: boolean
  /** Draft of a mark: drawn in ink rather than as a construction line. */
  ink?: { points: [number, number, number?][]; width: number; highlight: boolean }
  marquee?: { x0: number; z0: number; x1: number; z1: number }
  snap?: Snapped | null
  /** Lines of the label at the pointer, already formatted. */
  readout?: { at: Spot; lines: string[] }
  /** Paths that would be rubbed out or dropped onto. */
  warn?: string[]
}

/** What a tool may ask of the canvas it works on. Tests put a fake one under the tool. */
export type Surface = {
  readonly sheet: OpenSheet
  /** Metres per pixel along and up. */
  scale(): Spot
  hit(at: At): Hit | null
  /** Paths of the objects that lie wholly in a box, metres. */
  inside(box: { x0: number; z0: number; x1: number; z1: number }): string[]
  /** The nearest thing worth meeting, unless snapping is off or Alt is held. `except`: paths that move along. */
  snap(spot: Spot, how: { except?: string[]; free?: boolean }): Snapped
  /** Rounded to what a pixel can tell apart, so that no drag leaves 12.3846153 behind. */
  tidy(spot: Spot): Spot
  show(draft: Draft | null): void
  askText(at: Spot, initial: string): Promise<string | null>
  /** Move the paper under the window, pixels. */
  pan(dx: number, dy: number): void
  /** A fresh id, its first letters telling what it is. */
  id(prefix: string): string
  /** Sorts after every mark and layer made before. */
  order(): string
  today(): string
  who(): string | null
  length(metres: number): string
}

/** A state of a tool. A handler answers the next state, or nothing to stay. `enter` marks, `cancel` bails out. */
export type State = {
  readonly name: string
  readonly hint?: string
  readonly cursor?: string
  /** A press is being followed: the pointer is captured and a second finger takes over for panning. */
  readonly busy?: boolean
  enter?(): void
  exit?(): void
  down?(at: At): State | undefined
  move?(at: At): State | undefined
  up?(at: At): State | undefined
  /** The second press of a double click, instead of `down`. */
  double?(at: At): State | undefined
  /** A double click is over and has not become a drag. */
  doubleUp?(at: At): State | undefined
  /** Answers undefined when the key is not for this state, so that commands get it. */
  key?(press: Press): State | undefined
  cancel?(): State | undefined
}

export type Tool = { name: ToolName; start(surface: Surface): State }
