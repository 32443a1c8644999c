import type { Tool } from '../types'
import { idle } from './idle'

export const pen: Tool = { name: 'pen', start: (surface) => idle(surface, 'pen') }
export const highlight: Tool = { name: 'highlight', start: (surface) => idle(surface, 'highlight') }
