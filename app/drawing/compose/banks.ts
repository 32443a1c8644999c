import type { Bank, Section } from '~/section'
import type { World } from '../scene'
import { baseAt, type Context, groundAt } from './context'

/** The two ends: open water with its stage, a closed end, or a given inflow. */
export function composeBanks(context: Context): void {
  for (const side of ['left', 'right'] as const) composeBank(context, side, context.section[side])
}

function composeBank(context: Context, side: 'left' | 'right', bank: Bank): void {
  const { section, items, apron, say, z } = context
  const out = side === 'left' ? -1 : 1
  const x = bank.x
  const far = x + out * apron
  const ground = groundAt(section, x)
  const base = baseAt(section, x)
  const common = { panel: 'section', of: side } as const
  const face: World[] = [
    { x, z: Math.max(ground, bank.kind === 'water' ? bank.stage : ground) },
    { x, z: base },
  ]

  if (bank.kind === 'no-flow') {
    items.push(
      {
        ...common,
        kind: 'path',
        id: `${side}-face`,
        role: 'bank-no-flow',
        layer: 'water',
        points: face,
        closed: false,
        ticks: side,
        label: bank.name ?? `${side} bank, no flow`,
      },
      label(context, side, bank.name ?? 'No flow', x, ground),
    )
    return
  }
  if (bank.kind === 'inflow') {
    items.push({
      ...common,
      kind: 'path',
      id: `${side}-face`,
      role: 'bank-inflow',
      layer: 'water',
      points: face,
      closed: false,
      label: bank.name ?? `${side} bank, given inflow`,
    })
    const end = side === 'left' ? context.samples[0] : context.samples.at(-1)
    const wet = end ? Math.max(end.head, base) : ground
    for (const share of [0.25, 0.5, 0.75])
      items.push({
        ...common,
        kind: 'symbol',
        symbol: 'inflow-arrow',
        id: `${side}-in-${share}`,
        role: 'bank-inflow',
        layer: 'water',
        at: { x, z: base + share * (wet - base) },
        direction: { x: -out * Math.sign(bank.rate || 1), z: 0 },
      })
    items.push(label(context, side, `${bank.name ?? 'Inflow'} ${say(bank.rate, 'flow')}`, x, ground))
    return
  }

  const depth = Math.max(bank.stage - base, 0)
  const floor = bankFloor(section, side, bank.stage)
  const bed = bank.bed ?? floor
  const water: World[] = [
    { x, z: bank.stage },
    { x: far, z: bank.stage },
    { x: far, z: Math.min(bed, bank.stage) },
    { x: x + out * apron * 0.45, z: Math.min(bed, bank.stage) },
    { x, z: Math.min(bed + depth * 0.12, bank.stage) },
  ]
  // Soil under and around the channel is the host's, drawn as the base is: the strip ends at the bank's face.
  items.push(
    {
      ...common,
      kind: 'area',
      id: `${side}-water`,
      role: 'open-water',
      layer: 'water',
      rings: [water],
      hatch: 'none',
      label: bank.name ?? `${side} bank`,
    },
    { ...common, kind: 'path', id: `${side}-face`, role: 'ground-edge', layer: 'water', points: face, closed: false },
    {
      ...common,
      kind: 'path',
      id: `${side}-stage`,
      role: 'stage',
      layer: 'water',
      points: [
        { x, z: bank.stage },
        { x: far, z: bank.stage },
      ],
      closed: false,
    },
    {
      ...common,
      kind: 'symbol',
      symbol: 'stage',
      id: `${side}-mark`,
      role: 'stage',
      layer: 'water',
      at: { x: (x + far) / 2, z: bank.stage },
    },
    {
      ...common,
      kind: 'text',
      id: `${side}-level`,
      role: 'text-water',
      layer: 'results',
      at: { x: (x + far) / 2, z: bank.stage },
      shift: { dx: 0, dy: -3.6 },
      text: say(bank.stage, 'elevation', false),
      size: 2.5,
      weight: 600,
      anchor: 'middle',
      base: 'bottom',
      priority: 9,
    },
  )
  if (bank.conductance !== null)
    items.push({
      ...common,
      kind: 'path',
      id: `${side}-bed`,
      role: 'perched',
      layer: 'water',
      points: [
        { x: x + out * apron * 0.08, z: bank.stage },
        { x: x + out * apron * 0.08, z: Math.max(bed, base) },
      ],
      closed: false,
    })
  if (bank.name)
    items.push({
      ...common,
      kind: 'text',
      id: `${side}-name`,
      role: 'text',
      layer: 'results',
      at: { x: side === 'left' ? far : far, z: Math.max(z.min, Math.min(bed, bank.stage)) },
      shift: { dx: side === 'left' ? 0.8 : -0.8, dy: 1 },
      text: bank.name,
      size: 1.8,
      weight: 500,
      anchor: side === 'left' ? 'start' : 'end',
      base: 'top',
      priority: 4,
    })
}

/** Where the drawn channel ends below: a third of the depth, for the eye only; the water stands against the whole face. */
export function bankFloor(section: Section, side: 'left' | 'right', stage: number): number {
  const base = baseAt(section, section[side].x)
  return base + 0.4 * Math.max(stage - base, 0)
}

const label = ({ apron }: Context, side: 'left' | 'right', text: string, x: number, ground: number) =>
  ({
    panel: 'section',
    of: side,
    kind: 'text',
    id: `${side}-name`,
    role: 'text',
    layer: 'results',
    at: { x: x + (side === 'left' ? -0.9 : 0.9) * apron, z: ground },
    shift: { dx: 0, dy: -2 },
    text,
    size: 1.8,
    weight: 500,
    anchor: side === 'left' ? 'start' : 'end',
    base: 'bottom',
    priority: 6,
  }) as const
