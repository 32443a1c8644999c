import type { Tool } from '../types'
import { idle } from './idle'

export const hand: Tool = { name: 'hand', start: idle }
