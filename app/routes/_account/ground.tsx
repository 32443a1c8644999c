// The strip of ground beside the account forms. An ornament, but its water table is a true one: flow between two fixed
// stages over a level base with even recharge, h² = hL² − (hL² − hR²)·x/L + (w/K)·x·(L − x).

const W = 720
const H = 900
const BASE = 770
const LEFT = 92
const RIGHT = 640
const STAGE_LEFT = 232
const STAGE_RIGHT = 168
const RECHARGE = 0.19

const span = RIGHT - LEFT
const head = (x: number) => {
  const d = x - LEFT
  const slope = (STAGE_LEFT ** 2 - STAGE_RIGHT ** 2) / span
  return Math.sqrt(STAGE_LEFT ** 2 - slope * d + RECHARGE * d * (span - d))
}
const waterAt = (x: number) => BASE - head(Math.min(RIGHT, Math.max(LEFT, x)))
const groundAt = (x: number) => 452 - 34 * Math.sin((x - 60) / 190) - 10 * Math.sin(x / 61)
const baseAt = (x: number) => BASE + 9 * Math.sin(x / 97)

const range = (from: number, to: number, step: number) =>
  Array.from({ length: Math.floor((to - from) / step) + 1 }, (_, i) => from + i * step)
const line = (f: (x: number) => number, from: number, to: number) =>
  range(from, to, 4)
    .map((x) => `${x} ${f(x).toFixed(1)}`)
    .join('L')

const table = line(waterAt, LEFT, RIGHT)
const base = line(baseAt, 0, W)
const land = line(groundAt, LEFT, RIGHT)
// Where the table is highest the water parts: left of it flows left.
const divide = range(LEFT, RIGHT, 1).reduce((best, x) => (waterAt(x) < waterAt(best) ? x : best), LEFT)
const arrows = range(LEFT + 56, RIGHT - 50, 62).flatMap((x) =>
  [0.28, 0.58, 0.84].map((share) => {
    const y = waterAt(x) + share * (baseAt(x) - waterAt(x))
    const length = Math.max(-38, Math.min(38, (x - divide) / 7))
    return { x, y, length }
  }),
)
const rain = range(LEFT + 40, RIGHT - 30, 52)
const turf = range(LEFT + 8, RIGHT - 4, 19)
const hatch = range(-200, W, 17)
const sand = range(LEFT + 14, RIGHT - 10, 23).flatMap((x, i) =>
  range(0, 11, 1).map((k) => ({ x: x + (k % 2) * 11, y: 404 + k * 36 + ((i * 7) % 5) })),
)

/** `wide`: cropped to the strip itself, for a frame that is broader than high. */
export function Ground({ wide = false }: { wide?: boolean }) {
  return (
    <svg
      viewBox={wide ? `0 270 ${W} 560` : `0 0 ${W} ${H}`}
      preserveAspectRatio={wide ? 'xMidYMid meet' : 'xMidYMax slice'}
      aria-hidden="true"
    >
      <path d={`M${table}L${RIGHT} ${H}L${LEFT} ${H}Z`} fill="var(--water-tint)" opacity="0.75" />
      <path d={`M0 ${BASE - STAGE_LEFT}H${LEFT}V${BASE - 70}L60 ${BASE - 36}H0Z`} fill="var(--water)" opacity="0.42" />
      <path
        d={`M${W} ${BASE - STAGE_RIGHT}H${RIGHT}V${BASE - 74}L${RIGHT + 34} ${BASE - 44}H${W}Z`}
        fill="var(--water)"
        opacity="0.42"
      />
      <g fill="var(--land)" opacity="0.4">
        {sand
          .filter(({ x, y }) => y > groundAt(x) + 14 && y < baseAt(x) - 8)
          .map(({ x, y }) => (
            <circle key={`${x} ${y}`} cx={x} cy={y} r="1" />
          ))}
      </g>
      <path d={`M${base}V${H}H0Z`} fill="var(--base-fill)" />
      <clipPath id="account-base">
        <path d={`M${base}V${H}H0Z`} />
      </clipPath>
      <path
        d={hatch.map((x) => `M${x} ${H}l170 -170`).join('')}
        stroke="var(--base)"
        strokeWidth="0.9"
        opacity="0.45"
        clipPath="url(#account-base)"
      />
      <path d={`M${base}`} fill="none" stroke="var(--base)" strokeWidth="2.4" />
      <g fill="none" stroke="var(--land)">
        <path
          d={`M0 ${BASE - 36}H60L${LEFT} ${BASE - 70}V${groundAt(LEFT)}L${land}V${BASE - 74}L${RIGHT + 34} ${BASE - 44}H${W}`}
          strokeWidth="1.4"
        />
        <path d={`M${land}`} strokeWidth="4" strokeLinejoin="round" />
        <path d={turf.map((x) => `M${x} ${groundAt(x).toFixed(1)}l-8 10`).join('')} strokeWidth="1.2" />
      </g>
      <g fill="none" stroke="var(--water)">
        <path d={`M0 ${BASE - STAGE_LEFT}H${LEFT}L${table}L${W} ${BASE - STAGE_RIGHT}`} strokeWidth="3" />
        {arrows
          .filter(({ length }) => Math.abs(length) > 7)
          .map(({ x, y, length }) => {
            const tip = Math.sign(length)
            return (
              <path
                key={`${x} ${y}`}
                d={`M${x} ${y.toFixed(1)}h${length.toFixed(1)}m${-6 * tip} -4l${6 * tip} 4l${-6 * tip} 4`}
                strokeWidth="1.6"
                strokeLinecap="round"
                strokeLinejoin="round"
              />
            )
          })}
        {[42, divide, 684].map((x) => (
          <path
            key={x}
            d={`M${x - 9} ${waterAt(x) - 17}h18l-9 15Zm2 22h14m-11 5h8`}
            fill="var(--sheet)"
            strokeWidth="1.8"
            strokeLinejoin="round"
          />
        ))}
      </g>
      <path
        d={`${rain.map((x) => `M${x} 316v34m-5 -7l5 7l5 -7`).join('')}M${LEFT + 10} 308V300H${RIGHT - 10}v8`}
        fill="none"
        stroke="var(--recharge)"
        strokeWidth="1.7"
        strokeLinejoin="round"
      />
    </svg>
  )
}
