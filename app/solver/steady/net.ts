// biome-ignore-all lint/style/noNonNullAssertion: the loops keep every index inside its array.
import type { Section } from '~/section'
import { addColumn, addPlainColumn, type Columns, makeColumns } from '../ground/columns'
import { type Ground, surfaceSlope } from '../ground/ground'

/** What draws on a node besides its neighbours. Flow out of the aquifer, m²/d, as a function of the head. */
export const SINK = { none: 0, water: 1, drain: 2, fixedRate: 3 } as const

/**
 * The strip as a chain: nodes, and between two neighbours a link. A link is a reach of ground (a cell) or a wall, which has a
 * length (its thickness) but no width in x. Both have a column at mid length. The node's own water balance covers the two
 * half cells beside it.
 */
export type Net = {
  nodes: number
  x: Float64Array
  base: Float64Array
  surface: Float64Array
  /** The head may not pass `upper` (ground with seepage on, level of a drain without resistance); `Infinity` = free. */
  upper: Float64Array
  /** NaN, or the head this node is held at. */
  held: Float64Array
  sink: Uint8Array
  /** Conductance m/d (water, drain), or rate m²/d (fixedRate). */
  sinkG: Float64Array
  sinkLevel: Float64Array
  /** Underside of the bed; −Infinity when the water can never be perched. */
  sinkBed: Float64Array
  /** Recharge onto the node's half cells, m²/d. */
  supply: Float64Array
  /** Width of the node's half cells, m. */
  width: Float64Array
  links: number
  /** Length, m; recharge m/d (0 for a wall); panel of the ground (−1 for a wall); base left minus base right, m. */
  length: Float64Array
  w: Float64Array
  panel: Int32Array
  drop: Float64Array
  columns: Columns
  /** First node of each feature of the section, −1 when it lies outside the strip. A wall's second node follows its first. */
  featureNode: Int32Array
}

/** Cells of a mesh: where they begin, and their panel. The last entry of x is the right bank. */
export type Cells = { x: Float64Array; panel: Int32Array }

const perch = (bank: { conductance: number | null; bed?: number | null }): number =>
  bank.conductance !== null && bank.bed !== null && bank.bed !== undefined ? bank.bed : Number.NEGATIVE_INFINITY

export function buildNet(section: Section, ground: Ground, cells: Cells): Net {
  const count = cells.panel.length
  const walls = new Map<number, number>()
  const others = new Map<number, number>()
  section.features.forEach((feature, index) => {
    ;(feature.kind === 'wall' ? walls : others).set(feature.x, index)
  })
  const links = count + walls.size
  const nodes = links + 1
  let layers = walls.size
  for (let c = 0; c < count; c++) layers += ground.start[cells.panel[c]! + 1]! - ground.start[cells.panel[c]!]!
  const net: Net = {
    nodes,
    x: new Float64Array(nodes),
    base: new Float64Array(nodes),
    surface: new Float64Array(nodes),
    upper: new Float64Array(nodes).fill(Number.POSITIVE_INFINITY),
    held: new Float64Array(nodes).fill(Number.NaN),
    sink: new Uint8Array(nodes),
    sinkG: new Float64Array(nodes),
    sinkLevel: new Float64Array(nodes),
    sinkBed: new Float64Array(nodes).fill(Number.NEGATIVE_INFINITY),
    supply: new Float64Array(nodes),
    width: new Float64Array(nodes),
    links,
    length: new Float64Array(links),
    w: new Float64Array(links),
    panel: new Int32Array(links).fill(-1),
    drop: new Float64Array(links),
    columns: makeColumns(links, layers),
    featureNode: new Int32Array(section.features.length).fill(-1),
  }
  let n = 0
  let link = 0
  const addNode = (x: number, panel: number, share: number) => {
    net.x[n] = x
    net.base[n] = ground.base[panel]! + (ground.base[panel + 1]! - ground.base[panel]!) * share
    net.surface[n] = ground.surface[panel]! + (ground.surface[panel + 1]! - ground.surface[panel]!) * share
    if (section.surfaceSeepage) net.upper[n] = Math.max(net.surface[n]!, net.base[n]!)
    n++
  }
  const checkWalls = walls.size > 0
  const checkOthers = others.size > 0
  for (let c = 0; c < count; c++) {
    const xl = cells.x[c]!
    const xr = cells.x[c + 1]!
    const panel = cells.panel[c]!
    const pl = ground.x[panel]!
    const span = ground.x[panel + 1]! - pl
    const share = (xl - pl) / span
    addNode(xl, panel, share)
    const wall = checkWalls && c > 0 ? walls.get(xl) : undefined
    if (wall !== undefined) {
      const feature = section.features[wall]
      if (feature?.kind === 'wall') {
        net.featureNode[wall] = n - 1
        net.length[link] = feature.thickness
        addPlainColumn(net.columns, net.base[n - 1]!, feature.k)
        link++
        addNode(xl, panel, share)
      }
    }
    const other = checkOthers ? others.get(xl) : undefined
    if (other !== undefined) net.featureNode[other] = n - 1
    const end = (xr - pl) / span
    addColumn(net.columns, ground, panel, (share + end) / 2)
    net.length[link] = xr - xl
    net.w[link] = ground.recharge[panel]!
    net.panel[link] = panel
    net.drop[link] = (ground.base[panel]! - ground.base[panel + 1]!) * (end - share)
    link++
  }
  const last = cells.panel[count - 1]!
  addNode(cells.x[count]!, last, 1)
  for (let j = 0; j < links; j++) {
    if (net.panel[j]! < 0) continue
    const half = net.length[j]! / 2
    net.width[j] = net.width[j]! + half
    net.width[j + 1] = net.width[j + 1]! + half
    net.supply[j] = net.supply[j]! + half * net.w[j]!
    net.supply[j + 1] = net.supply[j + 1]! + half * net.w[j]!
  }
  setBanks(net, section)
  setFeatures(net, section)
  return net
}

/** Water that stands directly against the aquifer holds the head; below the base it is a free outfall at the base. */
function hold(net: Net, node: number, level: number) {
  net.held[node] = Math.max(level, net.base[node]!)
}

function setBanks(net: Net, section: Section) {
  for (const [bank, node] of [
    [section.left, 0],
    [section.right, net.nodes - 1],
  ] as const) {
    if (bank.kind === 'inflow') {
      net.sink[node] = SINK.fixedRate
      net.sinkG[node] = -bank.rate
    } else if (bank.kind === 'water' && bank.conductance === null) hold(net, node, bank.stage)
    else if (bank.kind === 'water' && bank.conductance !== null && bank.conductance > 0) {
      net.sink[node] = SINK.water
      net.sinkG[node] = bank.conductance
      net.sinkLevel[node] = bank.stage
      net.sinkBed[node] = perch(bank)
    }
  }
}

function setFeatures(net: Net, section: Section) {
  section.features.forEach((feature, index) => {
    const node = net.featureNode[index]!
    if (node < 0) return
    if (feature.kind === 'trench') {
      net.sink[node] = SINK.fixedRate
      net.sinkG[node] = feature.rate
    } else if (feature.kind === 'ditch') {
      if (feature.conductance === null) hold(net, node, feature.level)
      else if (feature.conductance > 0) {
        net.sink[node] = SINK.water
        net.sinkG[node] = feature.conductance
        net.sinkLevel[node] = feature.level
      }
    } else if (feature.kind === 'drain') {
      if (feature.conductance === null) {
        net.upper[node] = Math.max(net.base[node]!, Math.min(net.upper[node]!, feature.level))
      } else if (feature.conductance > 0) {
        net.sink[node] = SINK.drain
        net.sinkG[node] = feature.conductance
        net.sinkLevel[node] = feature.level
      }
    }
  })
}

/** Flow out of the aquifer at a node's bank or feature, m²/d. */
export function sinkFlow(net: Net, node: number, h: number): number {
  const g = net.sinkG[node]!
  switch (net.sink[node]) {
    case SINK.water:
      return g * (Math.max(h, net.sinkBed[node]!) - net.sinkLevel[node]!)
    case SINK.drain:
      return h > net.sinkLevel[node]! ? g * (h - net.sinkLevel[node]!) : 0
    case SINK.fixedRate:
      return g
    default:
      return 0
  }
}

/** Its slope in h, m/d. */
export function sinkSlope(net: Net, node: number, h: number): number {
  switch (net.sink[node]) {
    case SINK.water:
      return h >= net.sinkBed[node]! ? net.sinkG[node]! : 0
    case SINK.drain:
      return h > net.sinkLevel[node]! ? net.sinkG[node]! : 0
    default:
      return 0
  }
}

/** Slope of the ground surface over a link; 0 for a wall. */
export const linkSurfaceSlope = (net: Net, ground: Ground, link: number): number =>
  net.panel[link]! < 0 ? 0 : surfaceSlope(ground, net.panel[link]!)
