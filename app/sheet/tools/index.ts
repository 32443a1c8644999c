import type { ToolName } from '../state'
import { bank } from './bank'
import { body } from './body'
import { eraser } from './eraser'
import { hand } from './hand'
import { highlight, pen } from './ink'
import { base, ground } from './line'
import { note } from './note'
import { pick } from './pick'
import { ditch, drain, observation, trench, wall } from './place'
import { dimension, limit, recharge } from './span'
import type { Tool } from './types'

export const TOOLS: Record<ToolName, Tool> = {
  pick,
  hand,
  ground,
  base,
  bank,
  body,
  recharge,
  ditch,
  drain,
  trench,
  wall,
  observation,
  limit,
  note,
  dimension,
  pen,
  highlight,
  eraser,
}
