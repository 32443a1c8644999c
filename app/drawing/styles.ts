import type { Ink } from './plot'
import type { Role } from './scene'

export type Theme = 'light' | 'dark' | 'print'

/** Inks of PRODUCT.md "Look", tuned so that every text has a contrast of 4.5 on its paper. */
export type Palette = {
  paper: string
  sheet: string
  ink: string
  soft: string
  rule: string
  ground: string
  soil: string
  base: string
  baseFill: string
  water: string
  waterTint: string
  openWater: string
  recharge: string
  rechargeText: string
  divide: string
  trouble: string
  troubleTint: string
  holds: string
  body: string
  bodyEdge: string
  highlight: string
}
const LIGHT: Palette = {
  paper: '#F6F2E7',
  sheet: '#FCFAF4',
  ink: '#1D2B33',
  soft: '#5A605F',
  rule: '#E4DFCF',
  ground: '#3E4A2E',
  soil: '#C9BFA5',
  base: '#5E4B3C',
  baseFill: '#D9CDBB',
  water: '#1F6A78',
  waterTint: '#CFE3E2',
  openWater: '#9CC6C8',
  recharge: '#B3781A',
  rechargeText: '#8A5A0E',
  divide: '#7B3F6C',
  trouble: '#A8382B',
  troubleTint: '#F3DCD5',
  holds: '#3F6B46',
  body: '#CFC3AE',
  bodyEdge: '#4B4234',
  highlight: '#F2D36B',
}
const DARK: Palette = {
  paper: '#12191D',
  sheet: '#182126',
  ink: '#ECE7D9',
  soft: '#A9AFAB',
  rule: '#27323A',
  ground: '#A9B78F',
  soil: '#4A5048',
  base: '#C9AD94',
  baseFill: '#3A322B',
  water: '#6FBAC6',
  waterTint: '#1D3E46',
  openWater: '#2B5A64',
  recharge: '#D9A048',
  rechargeText: '#E2B164',
  divide: '#CF93BF',
  trouble: '#EE8B7C',
  troubleTint: '#43241F',
  holds: '#8CC196',
  body: '#454036',
  bodyEdge: '#B5A88E',
  highlight: '#8A7420',
}
/** Reads in black and white: darker lines, lighter fills. */
const PRINT: Palette = {
  ...LIGHT,
  paper: '#FFFFFF',
  sheet: '#FFFFFF',
  rule: '#E2E2E2',
  soft: '#4D5354',
  soil: '#B9B4A6',
  waterTint: '#E0EEEE',
  openWater: '#BBD9DB',
  body: '#E4DED1',
  baseFill: '#E7E0D5',
}
export const palette = (theme: Theme): Palette => (theme === 'dark' ? DARK : theme === 'print' ? PRINT : LIGHT)

/** Widths in paper mm, dashes in paper mm. */
type Style = {
  stroke?: keyof Palette
  width?: number
  dash?: number[]
  fill?: keyof Palette
  opacity?: number
  cap?: Ink['cap']
}

const STYLES: Record<Role, Style> = {
  paper: { fill: 'sheet' },
  frame: { stroke: 'ink', width: 0.35 },
  grid: { stroke: 'rule', width: 0.18 },
  axis: { stroke: 'soft', width: 0.18 },
  ruler: { fill: 'soft' },
  'title-block': { stroke: 'ink', width: 0.25 },
  caution: { fill: 'soft' },
  legend: { fill: 'ink' },
  ground: { stroke: 'ground', width: 0.7, cap: 'round' },
  'ground-edge': { stroke: 'ink', width: 0.3 },
  soil: { stroke: 'soil', width: 0.22 },
  base: { stroke: 'base', width: 0.45, cap: 'round' },
  'base-fill': { stroke: 'base', width: 0.2, fill: 'baseFill' },
  body: { stroke: 'bodyEdge', width: 0.2, fill: 'body' },
  'body-edge': { stroke: 'bodyEdge', width: 0.25 },
  'open-water': { stroke: 'ink', width: 0.25, fill: 'openWater' },
  stage: { stroke: 'water', width: 0.4, fill: 'sheet' },
  'water-table': { stroke: 'water', width: 0.6, cap: 'round' },
  saturated: { fill: 'waterTint', opacity: 0.62 },
  perched: { stroke: 'water', width: 0.3, dash: [1.2, 0.8] },
  recharge: { stroke: 'recharge', width: 0.35, fill: 'recharge' },
  'recharge-loss': { stroke: 'recharge', width: 0.35, dash: [1.2, 0.7], fill: 'recharge' },
  ditch: { stroke: 'ink', width: 0.35, fill: 'openWater' },
  drain: { stroke: 'ink', width: 0.35, fill: 'sheet' },
  trench: { stroke: 'ink', width: 0.35, fill: 'sheet' },
  wall: { stroke: 'ink', width: 0.25, fill: 'ink' },
  'bank-no-flow': { stroke: 'ink', width: 0.4 },
  'bank-inflow': { stroke: 'water', width: 0.4, fill: 'water' },
  arrow: { stroke: 'water', width: 0.35, fill: 'water' },
  'flow-line': { stroke: 'water', width: 0.18, opacity: 0.8 },
  divide: { stroke: 'divide', width: 0.35, dash: [2.2, 0.8, 0.5, 0.8] },
  'straight-line': { stroke: 'soft', width: 0.22, dash: [1.1, 0.9] },
  seepage: { stroke: 'water', width: 1.2, opacity: 0.55, cap: 'round' },
  dry: { stroke: 'trouble', width: 0.7, dash: [1, 1] },
  'strip-line': { stroke: 'ink', width: 0.38 },
  'strip-fill': { fill: 'waterTint', opacity: 0.6 },
  'strip-zero': { stroke: 'soft', width: 0.2 },
  'strip-frame': { stroke: 'rule', width: 0.25 },
  observation: { stroke: 'ink', width: 0.3, fill: 'sheet' },
  limit: { stroke: 'ink', width: 0.45 },
  'limit-broken': { stroke: 'trouble', width: 0.55, fill: 'troubleTint' },
  'limit-clear': { stroke: 'holds', width: 0.22, dash: [1, 0.8] },
  'limit-holds': { stroke: 'holds', width: 0.5 },
  note: { stroke: 'ink', width: 0.3, fill: 'ink' },
  dimension: { stroke: 'ink', width: 0.2, fill: 'ink' },
  pen: { stroke: 'ink', width: 0.5 },
  highlight: { fill: 'highlight', opacity: 0.45 },
  text: { fill: 'ink' },
  'text-soft': { fill: 'soft' },
  'text-water': { fill: 'water' },
  'text-recharge': { fill: 'rechargeText' },
  'text-divide': { fill: 'divide' },
  'text-trouble': { fill: 'trouble' },
  problem: { stroke: 'trouble', width: 0.4, fill: 'troubleTint' },
}

/** Ink of a role in a theme; `unit` = device units per paper millimetre. */
export function inkOf(role: Role, theme: Theme, unit: number): Ink {
  const style = STYLES[role]
  const colours = palette(theme)
  return {
    ...(style.stroke && { stroke: colours[style.stroke], width: (style.width ?? 0.25) * unit }),
    ...(style.dash && { dash: style.dash.map((part) => part * unit) }),
    ...(style.fill && { fill: colours[style.fill] }),
    ...(style.opacity !== undefined && { opacity: style.opacity }),
    ...(style.cap && { cap: style.cap }),
    join: 'round',
  }
}
export const ROLES = Object.keys(STYLES)
