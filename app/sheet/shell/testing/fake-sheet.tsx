import { render } from '@testing-library/react'
import type { ReactNode } from 'react'
import { createMemoryRouter, RouterProvider } from 'react-router'
import type { Edit, LiveSection } from '~/live'
import type { Section } from '~/section'
import { type Solved, solveSteady } from '~/solver'
import type { Sheet, SheetState } from '../../state'
import { SheetProvider } from '../use-sheet'

/** A small strip with one of everything that can be picked. */
export const STRIP: Section = {
  format: 'doab.section',
  version: 1,
  title: 'Mill meadow',
  datum: 'm above site datum',
  ground: [
    [0, 12],
    [50, 13],
    [200, 11.5],
  ],
  base: [
    [0, 2],
    [200, 2],
  ],
  left: { kind: 'water', x: 0, name: 'Fallow Beck', stage: 9.6, conductance: null, bed: null },
  right: { kind: 'water', x: 200, name: 'Mill canal', stage: 8, conductance: 0.5, bed: null },
  materials: [
    { id: 'sand', name: 'Fine sand', k: 8, porosity: 0.28 },
    { id: 'silt', name: 'Silt', k: 0.6 },
  ],
  host: 'sand',
  bodies: [
    {
      id: 'b1',
      name: 'Oxbow',
      material: 'silt',
      outline: [
        [80, 2],
        [120, 2],
        [100, 6],
      ],
    },
  ],
  recharge: [{ id: 'r1', name: 'Pasture', from: 0, to: 200, rate: 0.001 }],
  features: [
    { id: 'd1', kind: 'ditch', name: 'Field ditch', x: 60, level: 9, conductance: null },
    { id: 'd2', kind: 'ditch', name: 'Far ditch', x: 150, level: 8.5, conductance: null },
  ],
  observations: [{ id: 'o1', name: 'P-1', x: 90, head: 9.4 }],
  limits: [{ id: 'l1', name: 'Cellar floor', from: 70, to: 80, level: 10.8, clearance: 0.5 }],
  cases: [{ id: 'wet', name: 'Wet spring', off: [], set: { 'left.stage': 10.2 } }],
  sources: { 'materials.sand.k': 'slug test P-2' },
  surfaceSeepage: true,
}

export const LIVE: LiveSection = {
  section: STRIP,
  keys: { ground: ['g0', 'g1', 'g2'], base: ['b0', 'b1'], bodies: { b1: ['k0', 'k1', 'k2'] } },
  markup: { layers: [], marks: [] },
  problems: [],
}

const row = (...values: number[]) => Float64Array.from(values)

function solved(): Solved {
  const answer = solveSteady(STRIP)
  if (answer.status !== 'solved') throw new Error(answer.mend)
  return answer
}

/** An answer with figures put in by hand: panels show what they are given and work nothing out. */
export const SOLVED: Solved = {
  ...solved(),
  method: { kind: 'exact', reason: 'solved exactly: flat base, vertical bands' },
  caseId: null,
  profile: {
    x: row(0, 200),
    head: row(9.6, 8.2),
    flow: row(-0.05, 0.15),
    base: row(2, 2),
    ground: row(12, 11.5),
    saturated: row(7.6, 6.2),
    transmissivity: row(60.8, 49.6),
  },
  left: 0,
  right: 200,
  highest: { x: 40, to: 40, head: 9.93 },
  divides: [{ kind: 'divide', from: 40, to: 40, head: 9.93 }],
  exchanges: [
    { of: 'recharge.r1', label: 'Pasture', rate: 0.2 },
    { of: 'left', label: 'Fallow Beck', rate: 0.05 },
    { of: 'right', label: 'Mill canal', rate: 0.15 },
  ],
  balance: { recharge: 0.2, in: 0.2, out: 0.2, residual: 8e-10, relative: 4e-9 },
  seepage: [],
  dry: [],
  limits: [{ id: 'l1', name: 'Cellar floor', margin: 0.37, at: 80, holds: true }],
  misfits: [{ id: 'o1', name: 'P-1', x: 90, observed: 9.4, computed: 9.55, residual: -0.15, sd: null }],
  straight: { left: 9.6, right: 8.2, worst: 0.64, at: 90 },
  error: { head: 0, flow: 0, nodes: 2, refinements: 0 },
  warnings: [],
}

export type FakeSheet = Sheet & { edits: Edit[][]; said: string[] }

/** A sheet that keeps what it is asked to do and takes every edit. */
export function fakeSheet(change: Partial<SheetState> = {}): FakeSheet {
  const listeners = new Set<() => void>()
  let state: SheetState = {
    sectionId: 'section-1',
    live: LIVE,
    solution: SOLVED,
    footing: [],
    problems: [],
    caseId: null,
    tool: 'pick',
    picked: [],
    reading: null,
    read: null,
    view: null,
    units: 'si',
    snap: true,
    grid: true,
    showArrows: true,
    showFlowLines: false,
    showMarkup: true,
    theme: 'light',
    may: 'write',
    acts: ['section.see', 'section.edit', 'link.see', 'link.make'],
    link: { kind: 'stored' },
    peers: [],
    following: null,
    canUndo: false,
    canRedo: false,
    layerId: null,
    presenting: false,
    ...change,
  }
  const edits: Edit[][] = []
  const said: string[] = []
  return {
    edits,
    said,
    get: () => state,
    stored: () => state.live,
    subscribe(listener) {
      listeners.add(listener)
      return () => listeners.delete(listener)
    },
    set(next) {
      state = { ...state, ...next }
      for (const listener of listeners) listener()
    },
    say: (text) => said.push(text),
    edit(step) {
      if (state.may === 'read') return false
      edits.push(step)
      return true
    },
    gesture: { active: false, start() {}, show() {}, finish: () => false, cancel() {} },
    undo() {},
    redo() {},
  }
}

/** Draws a part of the sheet's room around a fake sheet, with a router for its links. */
export function show(part: ReactNode, sheet: Sheet) {
  const router = createMemoryRouter([{ path: '*', element: <SheetProvider sheet={sheet}>{part}</SheetProvider> }])
  return render(<RouterProvider router={router} />)
}
