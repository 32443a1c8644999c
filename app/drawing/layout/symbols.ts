import type { SymbolName } from '../scene'
import { fixed } from './path'

/** A symbol as paths around a spot: `line` is stroked, `solid` filled with the role's ink, `face` filled and stroked. */
export type Drawn = { line?: string; solid?: string; face?: string }

/** `u` device units per mm; `dir` a unit vector in device terms (y down); `scale` 0 … 1. */
export function drawSymbol(
  symbol: SymbolName,
  x: number,
  y: number,
  u: number,
  dir: { x: number; y: number },
  scale: number,
): Drawn {
  const p = (dx: number, dy: number) => `${fixed(x + dx * u)} ${fixed(y + dy * u)}`
  const circle = (dx: number, dy: number, r: number) =>
    `M${p(dx - r, dy)}a${fixed(r * u)} ${fixed(r * u)} 0 1 0 ${fixed(2 * r * u)} 0a${fixed(r * u)} ${fixed(r * u)} 0 1 0 ${fixed(-2 * r * u)} 0Z`
  /** A point `along` the direction and `across` it, mm. */
  const v = (along: number, across: number) => p(dir.x * along - dir.y * across, dir.y * along + dir.x * across)
  switch (symbol) {
    case 'stage':
    case 'water-table':
      return {
        face: `M${p(-1.5, -2.5)}L${p(1.5, -2.5)}L${p(0, -0.15)}Z`,
        line: `M${p(-1.1, 0.9)}L${p(1.1, 0.9)}M${p(-0.55, 1.6)}L${p(0.55, 1.6)}`,
      }
    case 'recharge-arrow':
      return { line: `M${p(0, 0.7)}L${p(0, 3.4)}`, solid: `M${p(-0.9, 2.9)}L${p(0, 4.5)}L${p(0.9, 2.9)}Z` }
    case 'loss-arrow':
      return { line: `M${p(0, 4.4)}L${p(0, 1.8)}`, solid: `M${p(-0.9, 2.1)}L${p(0, 0.5)}L${p(0.9, 2.1)}Z` }
    case 'inflow-arrow':
    case 'flow-arrow': {
      const long = symbol === 'inflow-arrow' ? 6 : scale === 0 ? 0 : 2.6 + 5.4 * scale
      const tail = symbol === 'inflow-arrow' ? -long : -long / 2
      const tip = symbol === 'inflow-arrow' ? 0 : long / 2
      return {
        line: long > 0 ? `M${v(tail, 0)}L${v(tip - 1.2, 0)}` : undefined,
        solid: `M${v(tip, 0)}L${v(tip - 1.9, 0.75)}L${v(tip - 1.9, -0.75)}Z`,
      }
    }
    case 'drain':
      return { face: circle(0, 0, 1.25), line: `M${p(-0.7, 0)}L${p(0.7, 0)}` }
    case 'ditch':
      return {
        face: `M${p(-1.7, 0)}L${p(1.7, 0)}L${p(0.9, 1.8)}L${p(-0.9, 1.8)}Z`,
        line: `M${p(-2.9, -2.4)}L${p(-1.7, 0)}M${p(2.9, -2.4)}L${p(1.7, 0)}`,
      }
    case 'trench':
      return {
        face: circle(0, -2, 1.3),
        line: `M${p(0, -1.2)}L${p(0, -2.9)}M${p(-0.6, -2.3)}L${p(0, -2.95)}L${p(0.6, -2.3)}M${p(-0.9, 0)}L${p(0.9, 0)}`,
      }
    case 'observation':
      return { face: circle(0, 0, 1.05) }
    case 'spring':
      return {
        line: `M${p(-0.4, -0.6)}c${fixed(0.2 * u)} ${fixed(-1.2 * u)} ${fixed(1.5 * u)} ${fixed(-1.2 * u)} ${fixed(1.7 * u)} 0M${p(0.4, -1.6)}c${fixed(0.2 * u)} ${fixed(-1.4 * u)} ${fixed(1.9 * u)} ${fixed(-1.4 * u)} ${fixed(2.1 * u)} 0`,
      }
    case 'problem':
      return {
        face: `M${p(0, -2)}L${p(2, 1.5)}L${p(-2, 1.5)}Z`,
        line: `M${p(0, -0.8)}L${p(0, 0.5)}M${p(0, 0.95)}L${p(0, 1.05)}`,
      }
    case 'holds':
      return { line: `M${p(-0.9, 0)}L${p(-0.25, 0.75)}L${p(1, -0.95)}` }
    case 'broken':
      return { line: `M${p(-0.8, -0.8)}L${p(0.8, 0.8)}M${p(-0.8, 0.8)}L${p(0.8, -0.8)}` }
    default:
      return symbol satisfies never
  }
}
