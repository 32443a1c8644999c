import { screen, within } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { beforeAll, describe, expect, it } from 'vitest'
import { loadUnits } from '~/section'
import { fakeSheet, STRIP, show } from '../../shell/testing/fake-sheet'
import { LIMIT_SPECS } from '../fields/specs'
import { ObjectTable } from './object-table'
import { VertexTable } from './vertex-table'

// The parser of units is a file of its own and takes a moment to come; what is tested here is not how long.
beforeAll(async () => {
  await loadUnits()
}, 30_000)

describe('the table view', () => {
  it('names every cell for a screen reader and writes what is typed in it', async () => {
    const sheet = fakeSheet()
    show(<VertexTable line="ground" />, sheet)
    const cell = screen.getByLabelText('Ground line, vertex 2: elevation')
    expect(cell).toHaveValue('13.00')
    await userEvent.clear(cell)
    await userEvent.type(cell, '13.5{Enter}')
    await expect.poll(() => sheet.edits).toEqual([[{ do: 'move-vertex', line: 'ground', key: 'g1', to: [50, 13.5] }]])
  })
  it('is walked with Tab alone', async () => {
    show(<VertexTable line="base" />, fakeSheet())
    await userEvent.tab()
    expect(screen.getByLabelText('Base, vertex 1: elevation')).toHaveFocus()
    await userEvent.tab()
    expect(screen.getByRole('button', { name: 'Add a vertex after vertex 1 of Base' })).toHaveFocus()
  })
  it('puts a new vertex halfway to the next and says so', async () => {
    const sheet = fakeSheet()
    show(<VertexTable line="ground" />, sheet)
    await userEvent.click(screen.getByRole('button', { name: 'Add a vertex after vertex 1 of Ground line' }))
    const edit = sheet.edits[0]?.[0]
    expect(edit).toMatchObject({ do: 'insert-vertex', line: 'ground', at: [25, 12.5], after: 'g0' })
    expect(sheet.said).toEqual(['A vertex was added to Ground line, halfway to the next.'])
  })
  it('keeps the ends of a line, which stand at the banks', () => {
    show(<VertexTable line="ground" />, fakeSheet())
    expect(screen.getByRole('button', { name: 'Remove vertex 1 of Ground line' })).toBeDisabled()
    expect(screen.getByRole('button', { name: 'Remove vertex 2 of Ground line' })).toBeEnabled()
    expect(screen.getByLabelText('Ground line, vertex 3: distance')).toBeDisabled()
  })
  it('adds and removes rows of a list', async () => {
    const sheet = fakeSheet()
    const fresh = { id: 'l2', from: 10, to: 20, level: 11, clearance: 0.5 }
    show(
      <ObjectTable
        caption="Limits"
        one="Limit"
        list="limits"
        objects={STRIP.limits}
        specs={LIMIT_SPECS}
        fresh={() => fresh}
      />,
      sheet,
    )
    const table = within(screen.getByRole('table', { name: 'Limits' }))
    expect(table.getByLabelText('Cellar floor: Level')).toHaveValue('10.80')
    await userEvent.click(screen.getByRole('button', { name: 'Add limit' }))
    await userEvent.click(table.getByRole('button', { name: 'Remove Cellar floor' }))
    expect(sheet.edits).toEqual([
      [{ do: 'add', list: 'limits', object: fresh }],
      [{ do: 'remove', list: 'limits', id: 'l1' }],
    ])
    expect(sheet.said).toEqual(['Limit was added.', 'Cellar floor is gone.'])
  })
})
