/**
 * The scene: what is on the sheet, in metres, independent of screen, theme and painter. `compose(section, solution, view)`
 * makes it; `layout(scene, viewport, theme)` turns it into a plot list in device units; painters walk that list.
 */
export type Layer = 'frame' | 'ground' | 'base' | 'bodies' | 'water' | 'works' | 'results' | 'marks' | 'mark-up'

/** A role names what an ink stands for; styles.ts gives it colour, weight and dash per theme. Never a colour here. */
export type Role =
  | 'paper'
  | 'frame'
  | 'grid'
  | 'axis'
  | 'ruler'
  | 'title-block'
  | 'caution'
  | 'legend'
  | 'ground'
  | 'ground-edge'
  | 'soil'
  | 'base'
  | 'base-fill'
  | 'body'
  | 'body-edge'
  | 'open-water'
  | 'stage'
  | 'water-table'
  | 'saturated'
  | 'perched'
  | 'recharge'
  | 'recharge-loss'
  | 'ditch'
  | 'drain'
  | 'trench'
  | 'wall'
  | 'bank-no-flow'
  | 'bank-inflow'
  | 'arrow'
  | 'flow-line'
  | 'divide'
  | 'straight-line'
  | 'seepage'
  | 'dry'
  | 'strip-line'
  | 'strip-fill'
  | 'strip-zero'
  | 'strip-frame'
  | 'observation'
  | 'limit'
  | 'limit-broken'
  | 'limit-holds'
  | 'limit-clear'
  | 'note'
  | 'dimension'
  | 'pen'
  | 'highlight'
  | 'text'
  | 'text-soft'
  | 'text-water'
  | 'text-recharge'
  | 'text-divide'
  | 'text-trouble'
  | 'problem'

/** A hatch by soil or rock kind, after open drawing standards (FGDC-STD-013-2006 ch. 37 patterns, adapted and explained in the legend). */
export type Hatch =
  | 'none'
  | 'sand'
  | 'gravel'
  | 'silt'
  | 'clay'
  | 'peat'
  | 'till'
  | 'loam'
  | 'limestone'
  | 'sandstone'
  | 'rock'
  | 'fill'
  | 'base'

/** World coordinates in metres, or for paper-fixed things an anchor in metres plus an offset in paper millimetres. */
export type World = { x: number; z: number }
export type Millimetres = { dx: number; dy: number }

type ItemBase = {
  /** Stable over edits: used as key and in exports. */
  id: string
  /** Path of the model object ("bodies.b1", "ground.3", "left"); results use "result.divide.0" and the like. */
  of: string
  role: Role
  layer: Layer
  /** Which panel it is drawn in. */
  panel: PanelId
  /** Accessible name, where the item can be picked. */
  label?: string
  /** Id of a clip of the scene: only what lies inside is drawn. */
  clip?: string
}

export type PanelId = 'section' | 'discharge' | 'depth' | 'time' | 'sheet'

export type PathItem = ItemBase & {
  kind: 'path'
  points: World[]
  closed: boolean /** Short strokes on one side, as ground and no-flow banks are drawn. */
  ticks?: 'below' | 'left' | 'right'
}
/** A filled outline with a hatch; `holes` are cut out. */
export type AreaItem = ItemBase & { kind: 'area'; rings: World[][]; hatch: Hatch }
export type TextItem = ItemBase & {
  kind: 'text'
  at: World
  shift?: Millimetres
  text: string
  /** Cap height class in paper mm, ISO 3098 nominal sizes. */
  size: 1.8 | 2.5 | 3.5 | 5
  weight: 400 | 500 | 600
  anchor: 'start' | 'middle' | 'end'
  base: 'top' | 'middle' | 'bottom'
  /** May be dropped when it would collide; higher wins. */
  priority: number
  rotate?: number
}
export type SymbolName =
  | 'stage'
  | 'water-table'
  | 'recharge-arrow'
  | 'loss-arrow'
  | 'flow-arrow'
  | 'drain'
  | 'trench'
  | 'ditch'
  | 'observation'
  | 'spring'
  | 'problem'
  | 'inflow-arrow'
  | 'holds'
  | 'broken'
/** A symbol of fixed paper size at a world anchor; `angle` in world terms is given by a direction vector and laid out after exaggeration. */
export type SymbolItem = ItemBase & {
  kind: 'symbol'
  symbol: SymbolName
  at: World
  shift?: Millimetres
  direction?: World /** 0…1, relative length or size. */
  scale?: number
}
/** A freehand or straight mark of the mark-up, already outlined. */
export type InkItem = ItemBase & {
  kind: 'ink'
  points: (World & { pressure?: number })[]
  width: number
  highlight: boolean
}

export type Item = PathItem | AreaItem | TextItem | SymbolItem | InkItem

export type Panel = {
  id: PanelId
  title?: string
  unit?: string
  /** Range of z (section) or of the plotted value (strips), world units. */
  range: { min: number; max: number }
  /** Height as a share of the drawing height. */
  share: number
}

export type TitleBlock = {
  title: string
  datum: string
  caseName: string
  site?: string
  practice?: string
  number?: string
  revision: string
  prepared?: string
  checked?: string
  approved?: string
  date?: string
}

export type Scene = {
  /** One x scale for the drawing and every strip, metres. */
  x: { min: number; max: number }
  panels: Panel[]
  clips: { id: string; panel: PanelId; ring: World[] }[]
  units: 'si' | 'us'
  grid: boolean
  items: Item[]
  title: TitleBlock
  caution: string
  legend: { role: Role; hatch?: Hatch; text: string }[]
  /** Words of the legend that hang on the answer: what the longest arrow stands for. */
  keys: Partial<Record<Role, string>>
}
