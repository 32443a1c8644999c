import type { Act } from '~/access/acts'
import type { Edit, LiveSection, Presence } from '~/live'
import type { Problem } from '~/section'
import type { FootingLine, Reading, Solution } from '~/solver'

export type ToolName =
  | 'pick'
  | 'hand'
  | 'ground'
  | 'base'
  | 'bank'
  | 'body'
  | 'recharge'
  | 'ditch'
  | 'drain'
  | 'trench'
  | 'wall'
  | 'observation'
  | 'limit'
  | 'note'
  | 'dimension'
  | 'pen'
  | 'highlight'
  | 'eraser'

export type UnitSet = 'si' | 'us'

/** What part of the section is shown; heights follow from the exaggeration and the drawing's box. */
export type View = { x0: number; x1: number; zMid: number; exaggeration: number }

/** 'stored' only when the server has acknowledged everything; `waiting` counts edits kept here. */
export type LinkState =
  | { kind: 'connecting' }
  | { kind: 'stored' }
  | { kind: 'storing'; waiting: number }
  | { kind: 'stalled'; waiting: number; says: string }
  | { kind: 'offline'; waiting: number }
  | { kind: 'refused'; waiting: number; code: number; says: string }

export type Peer = Presence & { clientId: number }

export type SheetState = {
  sectionId: string
  /** Stored document + peers' gestures + one's own gesture: what is drawn and solved. */
  live: LiveSection
  solution: Solution
  footing: FootingLine[]
  /** Problems of the drawing (parse/validate) and of the answer, with a place. */
  problems: Problem[]
  caseId: string | null
  tool: ToolName
  /** Paths of picked objects; a vertex is "ground.v:KEY" / "bodies.b1.v:KEY". */
  picked: string[]
  /** x of the reading line, m; null when none. */
  reading: number | null
  /** Reading at `reading`, from the solver. */
  read: Reading | null
  view: View | null
  units: UnitSet
  snap: boolean
  grid: boolean
  showArrows: boolean
  showFlowLines: boolean
  showMarkup: boolean
  theme: 'light' | 'dark'
  may: 'write' | 'read'
  acts: Act[]
  link: LinkState
  peers: Peer[]
  following: number | null
  canUndo: boolean
  canRedo: boolean
  /** Mark-up layer the pen writes to. */
  layerId: string | null
  presenting: boolean
  /** What the tool in hand asks for next, one sentence; for the status line. */
  hint?: string | null
  /** What was just done or refused, for the status line and screen readers; `n` grows so that a repeat is read again. */
  says?: { text: string; n: number; tone?: 'plain' | 'trouble' } | null
  /** The view as it is laid out now, also while `view` is null (the whole strip). Set by the canvas. */
  seen?: View | null
  /** What the plain mouse wheel does; with Ctrl (or a pinch on a trackpad) it always zooms. */
  wheel?: 'zoom' | 'pan'
  /** A pen was used: fingers pan and zoom, only the pen draws (palms rest on the sheet). */
  penMode?: boolean
}

/** What tools, panels and commands may do. One object per open sheet. */
export type Sheet = {
  get(): SheetState
  subscribe(listener: () => void): () => void
  set(
    change: Partial<
      Pick<
        SheetState,
        | 'caseId'
        | 'tool'
        | 'picked'
        | 'reading'
        | 'view'
        | 'units'
        | 'snap'
        | 'grid'
        | 'showArrows'
        | 'showFlowLines'
        | 'showMarkup'
        | 'theme'
        | 'following'
        | 'layerId'
        | 'presenting'
        | 'hint'
        | 'wheel'
        | 'penMode'
        | 'seen'
      >
    >,
  ): void
  /** The stored document alone, without anybody's gesture: what a gesture starts from. */
  stored(): LiveSection
  /** Say something in the status line. */
  say(text: string, tone?: 'plain' | 'trouble'): void
  /** One undoable step; refused (returns false) without write access. In a case, edits of plain values go to that case
   * (case-edits.ts). Edits with the same `join` word within a second become one step (nudging). `pick`: what is
   * picked once it is done (undo goes back to what was picked before). */
  edit(edits: Edit[], join?: string, pick?: string[]): boolean
  /**
   * Start / replace / finish / drop the gesture in progress. `finish` writes one transaction. Given a function, `show` asks it
   * again whenever the stored document changes under the gesture: the start is then re-anchored and the total shift kept.
   */
  gesture: {
    readonly active: boolean
    start(): void
    show(edits: Edit[] | ((stored: LiveSection) => Edit[])): void
    finish(): boolean
    cancel(): void
  }
  undo(): void
  redo(): void
}
