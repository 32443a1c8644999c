import { palette } from '~/drawing'

export { peerInk } from './peer-inks'

/** Inks of what lies over the drawing while one works on it: the drawing's own colours in other roles. Never exported. */
export type OverInks = {
  paper: string
  ink: string
  pick: string
  snap: string
  /** Slip with numbers: dark on paper, light at night. */
  slip: string
  slipText: string
}
export function overInks(theme: 'light' | 'dark'): OverInks {
  const { sheet, ink, water, rechargeText } = palette(theme)
  return { paper: sheet, ink, pick: water, snap: rechargeText, slip: ink, slipText: sheet }
}
