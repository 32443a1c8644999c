import { screen, within } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { describe, expect, it } from 'vitest'
import type { FootingLine } from '~/solver'
import { fakeSheet, LIVE, SOLVED, show } from '../shell/testing/fake-sheet'
import { Answer } from './answer'
import { Footing } from './footing'
import { Limits } from './limits'
import { MarkupLayers } from './markup-layers'
import { Problems } from './problems'

const line = (key: string, verdict: FootingLine['verdict']): FootingLine => ({
  key,
  assumes: `Assumption ${key}`,
  value: 0.036,
  unit: '',
  bound: 0.1,
  source: 'common practice',
  verdict,
  says: `What follows from ${key}.`,
})

describe('the answer', () => {
  it('tells how it was found and where the water parts', () => {
    show(<Answer />, fakeSheet())
    expect(screen.getByText(/Solved exactly: flat base, vertical bands/)).toBeInTheDocument()
    expect(screen.getByText('Divide').parentElement).toHaveTextContent('40.0 m')
    expect(screen.getByText('Own error').parentElement).toHaveTextContent('round-off only')
  })
  it('says plainly that there is none, why, and what would mend it', async () => {
    const sheet = fakeSheet({
      solution: {
        status: 'unsolved',
        caseId: null,
        reason: [{ path: 'features.d1', message: 'The ditch is asked for more than can come.', place: { x: 60 } }],
        mend: 'Pump less, or give a bank water.',
        canGive: { of: 'features.d1', rate: 0.25 },
        warnings: [],
      },
    })
    show(<Answer />, sheet)
    expect(screen.getByText('Pump less, or give a bank water.')).toBeInTheDocument()
    expect(screen.getByText(/The most the strip can give to Field ditch is 0\.25 m²\/d/)).toBeInTheDocument()
    await userEvent.click(screen.getByRole('button', { name: 'The ditch is asked for more than can come.' }))
    expect(sheet.get()).toMatchObject({ picked: ['features.d1'], reading: 60 })
  })
})

describe('footing, limits and problems', () => {
  it('put what fails first and write the verdict out', () => {
    show(<Footing />, fakeSheet({ footing: [line('a', 'holds'), line('b', 'fails'), line('c', 'doubtful')] }))
    const rows = screen.getAllByRole('listitem')
    expect(rows.map((row) => within(row).getByText(/^(holds|doubtful|fails)$/).textContent)).toEqual([
      'fails',
      'doubtful',
      'holds',
    ])
    expect(screen.getByText('1 of 3 hold')).toBeInTheDocument()
  })
  it('say by how much a limit is broken, with the caution beside it', () => {
    const broken = { ...SOLVED, limits: [{ id: 'l1', name: 'Cellar floor', margin: -0.04, at: 75, holds: false }] }
    show(<Limits />, fakeSheet({ solution: broken }))
    expect(screen.getByText('0.04 m too high')).toBeInTheDocument()
    expect(screen.getByText('broken')).toBeInTheDocument()
    expect(screen.getByText(/licensed professional/)).toBeInTheDocument()
  })
  it('lead from a problem to the vertex it is about', async () => {
    const sheet = fakeSheet({
      problems: [
        { path: 'bodies.b1.outline.2', message: 'The outline crosses itself. Move this vertex.', place: { x: 100 } },
      ],
      view: { x0: 0, x1: 50, zMid: 5, exaggeration: 8 },
    })
    show(<Problems />, sheet)
    await userEvent.click(screen.getByRole('button', { name: /crosses itself/ }))
    expect(sheet.get().picked).toEqual(['bodies.b1.v:k2'])
    expect(sheet.get().view).toMatchObject({ x0: 75, x1: 125 })
  })
})

describe('mark-up layers', () => {
  it('start with today’s date and can be hidden and locked', async () => {
    const layer = { id: 'm1', name: 'Meeting', date: '2026-11-20', hidden: false, locked: false, order: 'a' }
    const sheet = fakeSheet({ live: { ...LIVE, markup: { layers: [layer], marks: [] } } })
    show(<MarkupLayers />, sheet)
    await userEvent.click(screen.getByRole('button', { name: 'Hide Meeting, 2026-11-20' }))
    await userEvent.click(screen.getByRole('button', { name: 'Lock Meeting, 2026-11-20' }))
    await userEvent.click(screen.getByRole('button', { name: 'New layer of today' }))
    expect(sheet.edits.slice(0, 2)).toEqual([
      [{ do: 'set-layer', id: 'm1', change: { hidden: true } }],
      [{ do: 'set-layer', id: 'm1', change: { locked: true } }],
    ])
    const added = sheet.edits[2]?.[0]
    if (added?.do !== 'add-layer') throw new Error('no layer')
    expect(added.layer.date).toMatch(/^\d{4}-\d\d-\d\d$/)
    expect(sheet.get().layerId).toBe(added.layer.id)
  })
})
