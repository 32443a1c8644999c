import type { Tool } from '../types'
import { idle } from './idle'

export const eraser: Tool = { name: 'eraser', start: idle }
