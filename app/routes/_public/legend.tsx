import type { ReactNode } from 'react'

const pen = { fill: 'none', strokeWidth: 2, strokeLinecap: 'round', strokeLinejoin: 'round' } as const
const WATER = 'var(--water)'
const LAND = 'var(--land)'

type Entry = { title: string; words: string; symbol: ReactNode }

/** What Doab does, as the legend of its own sheet: a drawn symbol, a name, a sentence. */
export const LEGEND: Entry[] = [
  {
    title: 'Two pencils, one sheet',
    words:
      'Pointer, selection and every edit of your colleague are there at once. Each undoes their own work only. Off the network you draw on; it merges when you are back.',
    symbol: (
      <g {...pen}>
        <path d="M6 34C18 22 26 38 36 26S52 18 58 20" stroke={LAND} />
        <path d="M20 6l4 13 3-5 6-2Z" fill={WATER} stroke={WATER} />
        <path d="M44 28l4 13 3-5 6-2Z" fill="var(--recharge)" stroke="var(--recharge)" />
      </g>
    ),
  },
  {
    title: 'The drawing is the calculation',
    words:
      'Drag a bank, a layer of silt, a drain: water table, divide, seepage and discharge follow your hand, frame by frame, for everybody who looks on.',
    symbol: (
      <g {...pen}>
        <path d="M4 12C18 6 44 6 60 14" stroke={LAND} strokeWidth={3} />
        <path d="M4 32C20 20 40 20 60 34" stroke={WATER} />
        <path d="M27 14h10l-5 8Z" stroke={WATER} fill="var(--sheet)" />
        <path d="M20 40h-10m4-3l-4 3 4 3M44 40h10m-4-3l4 3-4 3" stroke={WATER} />
      </g>
    ),
  },
  {
    title: 'Values as you have them',
    words:
      '“2e-4 cm/s”, “300 mm/yr”, “12 in/yr”: typed as they stand in the log, shown in your units, each with a note of where it comes from.',
    symbol: (
      <g {...pen}>
        <path d="M4 12h56v22H4Z" stroke="var(--ink)" strokeWidth={1.6} />
        <text x="9" y="28" fontSize="14" fontWeight="600" fill="var(--ink)">
          2e-4
        </text>
        <path d="M49 17v12" stroke={WATER} />
        <path d="M4 42h30" stroke="var(--recharge)" strokeDasharray="3 5" />
      </g>
    ),
  },
  {
    title: 'What would change',
    words:
      'Wet spring, drain installed, canal drawn down: cases are named sets of changed values on the same ground. Switch and compare.',
    symbol: (
      <g {...pen}>
        <path d="M4 40C20 32 44 30 60 40" stroke={WATER} />
        <path d="M4 30C20 18 44 16 60 30" stroke={WATER} strokeDasharray="5 4" />
        <path d="M4 20C20 4 44 2 60 20" stroke={WATER} strokeDasharray="1 5" />
      </g>
    ),
  },
  {
    title: 'It says what it stands on',
    words: 'Every answer comes with the water balance and with the assumptions that hold, strain or fail, and where.',
    symbol: (
      <g {...pen}>
        <path d="M6 13l4 4 8-9" stroke="var(--holds)" />
        <path d="M6 29q3-5 6 0t6 0" stroke="var(--recharge)" />
        <path d="M7 38l8 8m0-8l-8 8" stroke="var(--trouble)" />
        <path d="M28 13h30M28 29h22M28 42h26" stroke="var(--soft)" />
      </g>
    ),
  },
  {
    title: 'Out of the door',
    words:
      'A drawing true to scale with title block and legend to download; a read-only link for the client, with an end date, withdrawn with one press.',
    symbol: (
      <g {...pen}>
        <path d="M8 5h40v38H8Z" stroke="var(--ink)" strokeWidth={1.6} />
        <path d="M26 36h22M26 36v7M36 36v7" stroke="var(--ink)" strokeWidth={1.6} />
        <path d="M13 24C22 16 32 16 43 25" stroke={WATER} />
        <path d="M50 20h11m-4-4l4 4-4 4" stroke="var(--trouble)" />
      </g>
    ),
  },
]

export function Legend() {
  return (
    <ul className="front-legend">
      {LEGEND.map(({ title, words, symbol }) => (
        <li key={title}>
          <svg viewBox="0 0 64 48" aria-hidden="true">
            {symbol}
          </svg>
          <h2>{title}</h2>
          <p>{words}</p>
        </li>
      ))}
    </ul>
  )
}
