import type { Tool } from '../types'
import { idle } from './idle'

export const ground: Tool = { name: 'ground', start: (surface) => idle(surface, 'ground') }
export const base: Tool = { name: 'base', start: (surface) => idle(surface, 'base') }
