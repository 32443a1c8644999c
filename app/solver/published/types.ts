/** One number of a published or derived example: theirs as printed, ours as the solver gives it for the same section. */
export type Compared = { name: string; unit: string; theirs: number; tolerance: number; ours: number }

/**
 * A worked example as data with its source. `kind`: published = the source prints the answer; exercise = it prints the problem
 * only; derived = its formula, numbers ours. `fromMemory`: the source was not seen when the value was written down.
 */
export type PublishedCase = {
  id: string
  title: string
  source: string
  kind: 'published' | 'exercise' | 'derived'
  fromMemory: boolean
  compare: () => Compared[]
}

/** Title of the test of a case: says so where a value is from memory. */
export const caseTitle = ({ id, title, fromMemory }: PublishedCase): string =>
  `${id} ${title}${fromMemory ? ' (value from memory)' : ''}`
