/** People's inks, by their number: told apart by hue and by the name beside the pointer. */
const PEERS = {
  light: ['#7B3F6C', '#1F6A78', '#8A5A0E', '#3F6B46', '#A8382B', '#4A4F8C', '#7A5230', '#2F6F5E'],
  dark: ['#D79AC6', '#7CC4CF', '#E0B062', '#93C79B', '#EE8B7E', '#A9AEE6', '#D2A47C', '#86CDB9'],
} as const
export const peerInk = (theme: 'light' | 'dark', ink: number): string => {
  const inks = PEERS[theme]
  return inks[((ink % inks.length) + inks.length) % inks.length] ?? inks[0]
}
