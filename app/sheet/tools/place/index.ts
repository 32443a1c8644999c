import type { Tool } from '../types'
import { idle } from './idle'

export const ditch: Tool = { name: 'ditch', start: (surface) => idle(surface, 'ditch') }
export const drain: Tool = { name: 'drain', start: (surface) => idle(surface, 'drain') }
export const trench: Tool = { name: 'trench', start: (surface) => idle(surface, 'trench') }
export const wall: Tool = { name: 'wall', start: (surface) => idle(surface, 'wall') }
export const observation: Tool = { name: 'observation', start: (surface) => idle(surface, 'observation') }
