import type { Hatch, Layer, Role } from './scene'

/**
 * The plot list: device units (CSS px on the canvas, mm×unit on paper), y down, ready to paint. Everything a painter has to
 * know is here; a painter is an exhaustive switch and nothing more.
 */
export type Ink = {
  stroke?: string
  width?: number
  dash?: number[]
  fill?: string
  opacity?: number
  cap?: 'butt' | 'round' | 'square'
  join?: 'miter' | 'round' | 'bevel'
}

type PlotBase = { id: string; of: string; role: Role; layer: Layer; label?: string }

export type PlotPath = PlotBase & { kind: 'path'; d: string; ink: Ink; fillRule?: 'nonzero' | 'evenodd' }
export type PlotText = PlotBase & {
  kind: 'text'
  x: number
  y: number
  text: string
  size: number
  weight: 400 | 500 | 600
  family: 'sans' | 'symbols'
  anchor: 'start' | 'middle' | 'end'
  fill: string
  rotate?: number /** Paper-coloured halo width. */
  halo?: number
  haloColour?: string
}
/** Hatch drawn as generated strokes and dots, clipped to `clip`. `tile` lets SVG use a pattern with the same marks. */
export type PlotHatch = PlotBase & {
  kind: 'hatch'
  hatch: Hatch
  clip: string
  fill?: string
  ink: Ink
  marks: string
  dots: string
}
export type PlotClip = { kind: 'clip-push'; id: string; d: string } | { kind: 'clip-pop'; id: string }
export type PlotGroup =
  | { kind: 'group-push'; id: string; layer: Layer; label: string }
  | { kind: 'group-pop'; id: string }

export type Plot = PlotPath | PlotText | PlotHatch | PlotClip | PlotGroup

export type Rect = { x: number; y: number; width: number; height: number }

/** Affine scales of one panel: device = origin + metres × factor. */
export type PanelFrame = {
  id: string
  box: Rect /** device x = ax + bx·x */
  ax: number
  bx: number /** device y = ay + by·z (by < 0) */
  ay: number
  by: number
}

export type PlotList = {
  width: number
  height: number
  plots: Plot[]
  frames: PanelFrame[]
  /** Horizontal scale 1:n on paper (null on screen) and vertical exaggeration. */
  scale: number | null
  exaggeration: number
  theme: 'light' | 'dark' | 'print'
}
