import type { Tool } from '../types'
import { idle } from './idle'

export const body: Tool = { name: 'body', start: idle }
