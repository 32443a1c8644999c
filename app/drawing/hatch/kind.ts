import type { Hatch } from '../scene'

// The last noun names the soil ("silty sand" is a sand); words are looked for in this order.
const WORDS: [RegExp, Hatch][] = [
  [/\bpeat|\bmud\b|organic (soil|clay|silt)/i, 'peat'],
  [/\btill\b|boulder clay/i, 'till'],
  [/sandstone/i, 'sandstone'],
  [/limestone|chalk|dolomite/i, 'limestone'],
  [/rock|granite|basalt|shale|siltstone/i, 'rock'],
  [/\bfill\b|made ground|rubble/i, 'fill'],
  [/gravel|shingle|cobble/i, 'gravel'],
  [/loam|loess/i, 'loam'],
  [/clay/i, 'clay'],
  [/silt(?!y)/i, 'silt'],
  [/sand/i, 'sand'],
  [/silt/i, 'silt'],
]

/** Hatch of a material by its name; sand where the name says nothing. */
export function hatchOf(name: string | undefined): Hatch {
  return WORDS.find(([words]) => words.test(name ?? ''))?.[1] ?? 'sand'
}
