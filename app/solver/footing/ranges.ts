/**
 * Usual ranges of hydraulic conductivity by soil and rock, as published. They warn; they never change an input.
 * `basis` says whether the table was read or is remembered: check the edition before quoting it.
 */
export type KRange = {
  soil: string
  words: RegExp
  low: number
  high: number
  source: string
  basis: 'read' | 'from memory'
}

const DAY = 86_400
const DOMENICO = 'Domenico & Schwartz 1990'
const FREEZE = 'Freeze & Cherry 1979, table 2.2 (order of magnitude)'

/** Low and high in m/s as printed; kept in m/d. */
const row = (soil: string, words: RegExp, low: number, high: number, source: string): KRange => ({
  soil,
  words,
  low: low * DAY,
  high: high * DAY,
  source,
  basis: 'from memory',
})

// Order matters: the first row whose words stand in the material's name is taken, so the particular comes before the general.
export const K_RANGES: KRange[] = [
  row('unweathered marine clay', /marine clay/i, 8e-13, 2e-9, DOMENICO),
  row('silty sand', /silty\s+sand|\bsisa\b/i, 1e-7, 1e-3, FREEZE),
  row('till', /\btill\b|boulder clay/i, 1e-12, 2e-6, DOMENICO),
  row('loess', /loess/i, 1e-9, 2e-5, DOMENICO),
  row('gravel', /gravel|shingle/i, 3e-4, 3e-2, DOMENICO),
  row('coarse sand', /coarse\s+sand/i, 9e-7, 6e-3, DOMENICO),
  row('medium sand', /medium\s+sand/i, 9e-7, 5e-4, DOMENICO),
  row('fine sand', /fine\s+sand/i, 2e-7, 2e-4, DOMENICO),
  row('sandstone', /sandstone/i, 3e-10, 6e-6, DOMENICO),
  row('siltstone', /siltstone/i, 1e-11, 1.4e-8, DOMENICO),
  row('sand', /\bsands?\b/i, 1e-6, 1e-2, FREEZE),
  row('silt', /\bsilts?\b/i, 1e-9, 2e-5, DOMENICO),
  row('clay', /\bclays?\b/i, 1e-11, 4.7e-9, DOMENICO),
  row('karst limestone', /karst|reef/i, 1e-6, 2e-2, DOMENICO),
  row('limestone or dolomite', /limestone|dolomite|chalk/i, 1e-9, 6e-6, DOMENICO),
  row('shale', /shale/i, 1e-13, 2e-9, DOMENICO),
  row('permeable basalt', /basalt/i, 4e-7, 2e-2, DOMENICO),
  row('weathered granite', /weathered granite/i, 3.3e-6, 5.2e-5, DOMENICO),
]

/**
 * The usual range for a material by its name, or null when the name says nothing known. "Silty clay" and other mixtures match
 * their last noun; a range is a hint, not a test.
 */
export function usualRange(name: string): KRange | null {
  return K_RANGES.find((range) => range.words.test(name)) ?? null
}
