import type { Spot, Surface } from './types'

/** "x 118.0 m   z 9.79 m". */
export const spotLine = (surface: Surface, { x, z }: Spot) => `x ${surface.length(x)}  z ${surface.length(z)}`

/** Length along the slope and the slope itself of a stretch being drawn. */
export function stretchLine(surface: Surface, a: Spot, b: Spot): string {
  const dx = b.x - a.x
  const dz = b.z - a.z
  const long = surface.length(Math.hypot(dx, dz))
  if (Math.abs(dx) < 1e-9) return `${long} upright`
  const slope = dz / Math.abs(dx)
  const ratio =
    Math.abs(slope) < 1e-6
      ? 'level'
      : `1 in ${Number((1 / Math.abs(slope)).toPrecision(3))} ${slope > 0 ? 'up' : 'down'}`
  return `${long}  ${ratio}`
}

/** How far something has been dragged. */
export const shiftLine = (surface: Surface, by: Spot) =>
  `Δx ${signed(surface.length(by.x))}  Δz ${signed(surface.length(by.z))}`
const signed = (text: string) => (/^[−-]/.test(text) ? text : `+${text}`)
