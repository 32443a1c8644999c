import type { Tool } from '../types'
import { idle } from './idle'

export const note: Tool = { name: 'note', start: idle }
