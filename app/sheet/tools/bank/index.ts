import type { Tool } from '../types'
import { idle } from './idle'

export const bank: Tool = { name: 'bank', start: idle }
