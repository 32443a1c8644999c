import type { Tool } from '../types'
import { idle } from './idle'

export const pick: Tool = { name: 'pick', start: idle }
