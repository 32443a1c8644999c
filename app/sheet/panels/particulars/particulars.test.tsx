import { act, screen, within } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { beforeAll, describe, expect, it } from 'vitest'
import { loadUnits } from '~/section'
import { fakeSheet, LIVE, show } from '../../shell/testing/fake-sheet'
import { Particulars } from './particulars'

const type = async (label: string, text: string) => {
  const field = screen.getByLabelText(label)
  await userEvent.clear(field)
  await userEvent.type(field, `${text}{Enter}`)
}

// The parser of units is a file of its own and takes a moment to come; what is tested here is not how long.
beforeAll(async () => {
  await loadUnits()
}, 30_000)

describe('particulars', () => {
  it('write a typed value to its path, in metres and days', async () => {
    const sheet = fakeSheet({ picked: ['materials.sand'] })
    show(<Particulars />, sheet)
    await type('Conductivity', '2e-4 cm/s')
    await expect.poll(() => sheet.edits.length).toBe(1)
    const [step] = sheet.edits
    expect(step).toHaveLength(1)
    const edit = step?.[0]
    expect(edit).toMatchObject({ do: 'set', path: 'materials.sand.k' })
    if (edit?.do === 'set') expect(edit.value).toBeCloseTo(0.1728, 9)
  })
  it('say why beside the field, and write nothing, when the unit does not fit', async () => {
    const sheet = fakeSheet({ picked: ['left'] })
    show(<Particulars />, sheet)
    await type('Stage', '3 mm/yr')
    expect(await screen.findByRole('alert')).toHaveTextContent(/m|length|elevation/i)
    expect(screen.getByLabelText('Stage')).toHaveAttribute('aria-invalid', 'true')
    expect(screen.getByLabelText('Stage')).toHaveValue('3 mm/yr')
    expect(sheet.edits).toEqual([])
  })
  it('refuse what no ground can be', async () => {
    const sheet = fakeSheet({ picked: ['materials.sand'] })
    show(<Particulars />, sheet)
    await type('Porosity', '1.4')
    expect(await screen.findByRole('alert')).toHaveTextContent('less than 1')
    expect(sheet.edits).toEqual([])
  })
  it('give the old value back on Esc', async () => {
    const sheet = fakeSheet({ picked: ['left'] })
    show(<Particulars />, sheet)
    const field = screen.getByLabelText('Stage')
    await userEvent.clear(field)
    await userEvent.type(field, '99{Escape}')
    expect(field).toHaveValue('9.60 m')
    expect(sheet.edits).toEqual([])
  })
  it('step a level by a centimetre with the arrows', async () => {
    const sheet = fakeSheet({ picked: ['left'] })
    show(<Particulars />, sheet)
    const field = screen.getByLabelText('Stage')
    await userEvent.click(field)
    await userEvent.keyboard('{ArrowUp}')
    await expect.poll(() => sheet.edits.length).toBe(1)
    const edit = sheet.edits[0]?.[0]
    if (edit?.do !== 'set') throw new Error('no set')
    expect(edit.value).toBeCloseTo(9.61, 9)
  })
  it('empty a value that may be empty, and say what that means', async () => {
    const sheet = fakeSheet({ picked: ['right'] })
    show(<Particulars />, sheet)
    const field = screen.getByLabelText('Conductance')
    expect(field).toHaveAttribute('placeholder', 'stands directly against the aquifer')
    await userEvent.clear(field)
    await userEvent.type(field, '{Enter}')
    await expect.poll(() => sheet.edits).toEqual([[{ do: 'set', path: 'right.conductance', value: null }]])
  })
  it('show in a case what is drawn, and the way back to it', async () => {
    const sheet = fakeSheet({ picked: ['left'], caseId: 'wet' })
    show(<Particulars />, sheet)
    expect(screen.getByLabelText('Stage')).toHaveValue('10.20 m')
    expect(screen.getByText(/as drawn: 9\.60 m/)).toBeInTheDocument()
    await userEvent.click(screen.getByRole('button', { name: 'Stage: back to as drawn' }))
    expect(sheet.edits).toEqual([[{ do: 'case-set', case: 'wet', path: 'left.stage', value: undefined }]])
  })
  it('keep where a value comes from', async () => {
    const sheet = fakeSheet({ picked: ['materials.sand'] })
    show(<Particulars />, sheet)
    await userEvent.click(screen.getByRole('button', { name: /Source of Conductivity: slug test P-2/ }))
    const field = screen.getByLabelText('Source of Conductivity')
    await userEvent.clear(field)
    await userEvent.type(field, 'pumping test W-1{Enter}')
    expect(sheet.edits[0]).toEqual([{ do: 'source', path: 'materials.sand.k', text: 'pumping test W-1' }])
  })
  it('change all picked things at once through the field they share', async () => {
    const sheet = fakeSheet({ picked: ['features.d1', 'features.d2'] })
    show(<Particulars />, sheet)
    const field = screen.getByLabelText('Level')
    expect(field).toHaveAttribute('placeholder', 'several')
    await userEvent.type(field, '8.8 m{Enter}')
    await expect
      .poll(() => sheet.edits)
      .toEqual([
        [
          { do: 'set', path: 'features.d1.level', value: 8.8 },
          { do: 'set', path: 'features.d2.level', value: 8.8 },
        ],
      ])
  })
  it('turn a bank into a closed end and keep its name', async () => {
    const sheet = fakeSheet({ picked: ['right'] })
    show(<Particulars />, sheet)
    await userEvent.selectOptions(screen.getByLabelText('It is'), 'closed: no flow')
    expect(sheet.edits).toEqual([
      [{ do: 'set-bank', side: 'right', bank: { kind: 'no-flow', x: 200, name: 'Mill canal' } }],
    ])
  })
  it('move a bank with the ends of ground and base, never past the next vertex', async () => {
    const sheet = fakeSheet({ picked: ['left'] })
    show(<Particulars />, sheet)
    await type('Distance', '60 m')
    expect(await screen.findByRole('alert')).toHaveTextContent('50 m')
    await type('Distance', '-4')
    await expect
      .poll(() => sheet.edits)
      .toEqual([
        [
          { do: 'set', path: 'left.x', value: -4 },
          { do: 'move-vertex', line: 'ground', key: 'g0', to: [-4, 12] },
          { do: 'move-vertex', line: 'base', key: 'b0', to: [-4, 2] },
        ],
      ])
  })
  it('hold a vertex of the ground between its neighbours', async () => {
    const sheet = fakeSheet({ picked: ['ground.v:g1'] })
    show(<Particulars />, sheet)
    await type('Distance', '250')
    expect(await screen.findByRole('alert')).toHaveTextContent('pass its neighbour')
    await type('Elevation', '13.4')
    await expect.poll(() => sheet.edits).toEqual([[{ do: 'move-vertex', line: 'ground', key: 'g1', to: [50, 13.4] }]])
  })
  it('remove and duplicate what may be, and say why not otherwise', async () => {
    const sheet = fakeSheet({ picked: ['materials.silt'] })
    show(<Particulars />, sheet)
    expect(screen.getByRole('button', { name: 'Remove Silt' })).toBeDisabled()
    expect(screen.getByText('1 body is made of it.')).toBeInTheDocument()
    act(() => sheet.set({ picked: ['limits.l1'] }))
    await userEvent.click(screen.getByRole('button', { name: 'Duplicate' }))
    const added = sheet.edits[0]?.[0]
    if (added?.do !== 'add') throw new Error('nothing added')
    expect(added.object).toMatchObject({ name: 'Cellar floor, copy', from: 80, to: 90, level: 10.8 })
    expect(added.object.id).not.toBe('l1')
  })
  it('give nothing to change to those who may only read', () => {
    show(<Particulars />, fakeSheet({ picked: ['left'], may: 'read' }))
    for (const field of screen.getAllByRole('textbox')) expect(field).toBeDisabled()
    expect(screen.queryByRole('button', { name: /Remove|Duplicate/ })).toBeNull()
  })
  it('list the materials when nothing is picked', async () => {
    const sheet = fakeSheet()
    show(<Particulars />, sheet)
    const list = within(screen.getByRole('region', { name: 'Materials' }))
    expect(list.getAllByRole('listitem')).toHaveLength(LIVE.section.materials.length)
    await userEvent.click(list.getByRole('button', { name: /Silt/ }))
    expect(sheet.get().picked).toEqual(['materials.silt'])
  })
})
