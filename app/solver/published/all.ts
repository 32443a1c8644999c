import { times } from './times'
import { twoWaters } from './two-waters'
import type { PublishedCase } from './types'
import { zonesAndSlopes } from './zones'

/** Every published case the solver covers. Add a subject as a file of its own (times and ages, spacing …) and list it here. */
export const published: PublishedCase[] = [...twoWaters, ...zonesAndSlopes, ...times]
