import type {
  Body,
  Case,
  Feature,
  Limit,
  Material,
  Observation,
  Point,
  Problem,
  RechargeZone,
  Section,
} from '~/section'

/**
 * Every vertex of a line or outline has a key that never changes, so that two people dragging, inserting and deleting at the
 * same time always mean the same vertex. The public format knows positions only; the live document adds the keys.
 */
export type VertexKey = string
export type LineId = 'ground' | 'base' | `bodies.${string}`

/** Mark-up: pen, arrows, text and highlights on dated layers, kept apart from the model and never read by the solver. */
export type MarkupLayer = { id: string; name: string; date: string; hidden: boolean; locked: boolean; order: string }
export type Mark = {
  id: string
  layer: string
  kind: 'pen' | 'highlight' | 'arrow' | 'note' | 'dimension'
  /** World metres; pen points may carry pressure 0…1 as a third number. */
  points: [x: number, z: number, pressure?: number][]
  text?: string
  /** Role-like ink name, one of a fixed few; never a colour. */
  ink: 'ink' | 'water' | 'trouble' | 'recharge' | 'divide'
  /** Line width in paper mm. */
  width: number
  by?: string
  order: string
}

/** A view kept for presenting: what is in the frame, which case. */
export type LiveSection = {
  section: Section
  /** Vertex keys beside the section's positional lists, same order and length. */
  keys: { ground: VertexKey[]; base: VertexKey[]; bodies: Record<string, VertexKey[]> }
  markup: { layers: MarkupLayer[]; marks: Mark[] }
  /** Whatever could not be read as it stands, with its place: the section is still readable without it. */
  problems: Problem[]
}

export type ListName = 'materials' | 'bodies' | 'recharge' | 'features' | 'observations' | 'limits' | 'cases'
export type ListObject = Material | Body | RechargeZone | Feature | Observation | Limit | Case

/**
 * One edit: plain data, so that it can be applied to a LiveSection (pure, for gestures and previews), written to the Y.Doc
 * (one transaction), or sent by presence while a gesture is in progress.
 */
export type Edit =
  /** A field by its path in the format's words ("left.stage", "materials.sand.k", "features.d1.level", "title"). undefined clears. */
  | { do: 'set'; path: string; value: unknown }
  /** Replace a bank as a whole (its kind changes which fields it has). */
  | { do: 'set-bank'; side: 'left' | 'right'; bank: Section['left'] }
  | { do: 'add'; list: ListName; object: ListObject; after?: string }
  | { do: 'remove'; list: ListName; id: string }
  /** Reorder: a later body lies over an earlier one. */
  | { do: 'reorder'; list: ListName; id: string; after: string | null }
  | { do: 'move-vertex'; line: LineId; key: VertexKey; to: Point }
  /** Outlines: inserted after the vertex `after` (null = first). Ground and base sort by x. */
  | { do: 'insert-vertex'; line: LineId; key: VertexKey; at: Point; after: VertexKey | null }
  | { do: 'remove-vertex'; line: LineId; key: VertexKey }
  | { do: 'source'; path: string; text: string | null }
  | { do: 'case-set'; case: string; path: string; value: unknown /* undefined: as drawn */ }
  | { do: 'case-off'; case: string; id: string; off: boolean }
  | { do: 'add-layer'; layer: MarkupLayer }
  | { do: 'set-layer'; id: string; change: Partial<Omit<MarkupLayer, 'id'>> }
  | { do: 'remove-layer'; id: string }
  | { do: 'add-mark'; mark: Mark }
  | { do: 'set-mark'; id: string; change: Partial<Omit<Mark, 'id'>> }
  | { do: 'remove-mark'; id: string }

/** A gesture in progress, sent by presence and applied by every sheet before composing and solving. Never stored. */
export type Gesture = { id: string; edits: Edit[] }

/** What one connection shows of itself. Name, ink and kind are set by the server from the ticket; the rest by the client. */
export type Presence = {
  who: { id: string; name: string; ink: number; kind: 'person' | 'link' }
  pointer?: { x: number; z: number; panel: string } | null
  picked?: string[]
  caseId?: string | null
  tool?: string
  gesture?: Gesture | null
  /** x of the reading line. */
  reading?: number | null
  /** Shown part of the section, for "follow". */
  view?: { x0: number; x1: number; z0: number; z1: number } | null
  presenting?: boolean
  laser?: { x: number; z: number; t: number }[]
}
