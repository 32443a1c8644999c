import { screen, within } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { describe, expect, it } from 'vitest'
import { fakeSheet, SOLVED, show } from '../shell/testing/fake-sheet'
import { entriesOf, Ledger } from './ledger'

const rowOf = (name: RegExp) => {
  const row = screen.getByRole('rowheader', { name }).closest('tr')
  if (!row) throw new Error(`no row ${name}`)
  return within(row)
}

describe('the ledger', () => {
  it('counts what comes in as plus and what goes out as minus, and says to whom', () => {
    show(<Ledger />, fakeSheet())
    expect(rowOf(/Pasture/).getByText('+200')).toBeInTheDocument()
    expect(rowOf(/To Fallow Beck/).getByText('−50')).toBeInTheDocument()
    expect(rowOf(/To Mill canal/).getByText('−150')).toBeInTheDocument()
    expect(screen.getByText('4e-9')).toBeInTheDocument()
  })
  it('turns the words when a bank feeds the strip', () => {
    const fed = { ...SOLVED, exchanges: [{ of: 'left', label: 'Fallow Beck', rate: -0.03 }] }
    show(<Ledger />, fakeSheet({ solution: fed }))
    expect(rowOf(/From Fallow Beck/).getByText('+30')).toBeInTheDocument()
  })
  it('shows flow per metre of bank on demand', async () => {
    show(<Ledger />, fakeSheet())
    await userEvent.click(screen.getByRole('button', { name: 'm³/d per km' }))
    expect(rowOf(/Pasture/).getByText('+0.2')).toBeInTheDocument()
  })
  it('keeps walls out of the balance: what crosses them stays in the strip', () => {
    const walled = {
      ...SOLVED,
      exchanges: [...SOLVED.exchanges, { of: 'features.w1', label: 'Sheet wall', rate: 0, across: -0.02 }],
    }
    expect(entriesOf(walled).map(({ of }) => of)).not.toContain('features.w1')
    show(<Ledger />, fakeSheet({ solution: walled }))
    expect(screen.getByText('Through Sheet wall')).toBeInTheDocument()
    expect(screen.getByText('20 to the left')).toBeInTheDocument()
  })
  it('adds up what seeps out, and puts recharge first', () => {
    const wet = {
      ...SOLVED,
      seepage: [
        { from: 40, to: 50, rate: 0.02 },
        { from: 70, to: 75, rate: 0.03 },
      ],
      exchanges: [
        { of: 'seepage.0', label: 'Seepage at the ground', rate: 0.02 },
        { of: 'seepage.1', label: 'Seepage at the ground', rate: 0.03 },
        ...SOLVED.exchanges.toReversed(),
      ],
    }
    expect(entriesOf(wet).map(({ label }) => label)).toEqual([
      'Pasture',
      'To Mill canal',
      'To Fallow Beck',
      'Seeps out at the ground',
    ])
    show(<Ledger />, fakeSheet({ solution: wet }))
    expect(rowOf(/Seeps out/).getByText('−50')).toBeInTheDocument()
  })
  it('leads from a line to what it is about', async () => {
    const sheet = fakeSheet()
    show(<Ledger />, sheet)
    await userEvent.click(screen.getByRole('button', { name: 'Pasture' }))
    expect(sheet.get().picked).toEqual(['recharge.r1'])
  })
  it('says nothing when there is no answer', () => {
    show(
      <Ledger />,
      fakeSheet({ solution: { status: 'unsolved', caseId: null, reason: [], mend: 'Give a stage.', warnings: [] } }),
    )
    expect(screen.queryByRole('table')).toBeNull()
  })
})
