/** What a section may hold at most, and where physical sense ends. SI: metres and days. */
export const LIMITS = {
  /** Any x or elevation, ± m. */
  coordinate: 1e6,
  /** Length of the strip, m. */
  strip: { min: 0.01, max: 1e6 },
  /** Two vertices of a line, two features, or a feature and a bank, stand at least so far apart, m. */
  apart: 1e-6,
  /** Smallest area of a body, m². */
  area: 1e-6,
  /** Vertices of ground or base; of an outline; of all together. */
  line: 5000,
  outline: 2000,
  vertices: 20_000,
  /** Objects of one list. */
  list: 2000,
  cases: 100,
  /** Changed values of one case; objects left out of one case. */
  set: 1000,
  sources: 5000,
  /** Problems told at once. */
  problems: 200,
} as const

/** Slack for comparing elevations that were worked out along two ways, m. */
export const SLACK = 1e-9
