import type { Tool } from '../types'
import { idle } from './idle'

export const recharge: Tool = { name: 'recharge', start: (surface) => idle(surface, 'recharge') }
export const limit: Tool = { name: 'limit', start: (surface) => idle(surface, 'limit') }
export const dimension: Tool = { name: 'dimension', start: (surface) => idle(surface, 'dimension') }
