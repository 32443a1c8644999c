/** Inks of what lies over the drawing while one works on it. Never exported, so not part of the drawing's own styles. */
export type OverInks = {
  paper: string
  ink: string
  soft: string
  pick: string
  snap: string
  warn: string
  /** Readout slip: dark on paper, light at night. */
  slip: string
  slipText: string
}
export const OVER_INKS: Record<'light' | 'dark', OverInks> = {
  light: {
    paper: '#FCFAF4',
    ink: '#1D2B33',
    soft: '#5B666B',
    pick: '#1F6A78',
    snap: '#8A5A0E',
    warn: '#A8382B',
    slip: '#1D2B33',
    slipText: '#FCFAF4',
  },
  dark: {
    paper: '#161E22',
    ink: '#E9E4D6',
    soft: '#A3ABA9',
    pick: '#7CC4CF',
    snap: '#E0B062',
    warn: '#EE8B7E',
    slip: '#E9E4D6',
    slipText: '#161E22',
  },
}

/** People's inks, by their number: told apart by hue and by the name beside the pointer. */
const PEERS = {
  light: ['#7B3F6C', '#1F6A78', '#8A5A0E', '#3F6B46', '#A8382B', '#4A4F8C', '#7A5230', '#2F6F5E'],
  dark: ['#D79AC6', '#7CC4CF', '#E0B062', '#93C79B', '#EE8B7E', '#A9AEE6', '#D2A47C', '#86CDB9'],
} as const
export const peerInk = (theme: 'light' | 'dark', ink: number): string => {
  const inks = PEERS[theme]
  return inks[((ink % inks.length) + inks.length) % inks.length] ?? inks[0]
}
