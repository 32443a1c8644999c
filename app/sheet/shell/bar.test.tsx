import { screen } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { describe, expect, it } from 'vitest'
import { CaseTabs } from './case-tabs'
import { downloadAddress } from './download-menu'
import { initials } from './people'
import { fakeSheet, show } from './testing/fake-sheet'
import { TitleField } from './title-field'
import { ToolRail } from './tool-rail'

describe('the bar and the rail', () => {
  it('switch between the drawing and its cases', async () => {
    const sheet = fakeSheet()
    show(<CaseTabs />, sheet)
    expect(screen.getByRole('button', { name: 'As drawn' })).toHaveAttribute('aria-pressed', 'true')
    await userEvent.click(screen.getByRole('button', { name: 'Wet spring' }))
    expect(sheet.get().caseId).toBe('wet')
    expect(screen.getByRole('button', { name: 'Wet spring' })).toHaveAttribute('aria-pressed', 'true')
  })
  it('add a case and go to it', async () => {
    const sheet = fakeSheet()
    show(<CaseTabs />, sheet)
    await userEvent.click(screen.getByRole('button', { name: 'Add a case' }))
    const edit = sheet.edits[0]?.[0]
    if (edit?.do !== 'add') throw new Error('no case added')
    expect(edit).toMatchObject({ list: 'cases', object: { name: 'Case 2', off: [], set: {} } })
    expect(sheet.get().caseId).toBe(edit.object.id)
  })
  it('keep a new title on Enter and the old one on Esc', async () => {
    const sheet = fakeSheet()
    show(<TitleField />, sheet)
    const field = screen.getByRole('textbox', { name: 'Title of the section' })
    await userEvent.clear(field)
    await userEvent.type(field, 'Nothing{Escape}')
    expect(sheet.edits).toEqual([])
    await userEvent.clear(field)
    await userEvent.type(field, 'Lower meadow{Enter}')
    expect(sheet.edits).toEqual([[{ do: 'set', path: 'title', value: 'Lower meadow' }]])
  })
  it('offer readers no title to change, no case to add and no tool that draws', () => {
    const sheet = fakeSheet({ may: 'read' })
    show(
      <>
        <TitleField />
        <CaseTabs />
        <ToolRail />
      </>,
      sheet,
    )
    expect(screen.queryByRole('textbox')).toBeNull()
    expect(screen.queryByRole('button', { name: 'Add a case' })).toBeNull()
    expect(screen.getByRole('toolbar').querySelectorAll('button')).toHaveLength(2)
  })
  it('take one stop of the Tab key for all tools; arrows go along', async () => {
    const sheet = fakeSheet()
    show(<ToolRail />, sheet)
    await userEvent.tab()
    expect(screen.getByRole('button', { name: 'pick' })).toHaveFocus()
    await userEvent.keyboard('{ArrowRight}{ArrowRight}{Enter}')
    expect(sheet.get().tool).toBe('ground')
  })
  it('send a link holder’s token and the case along with a download', () => {
    expect(
      downloadAddress('sheet.svg', { sectionId: 's1', token: null, caseId: null }, { paper: 'A3', scale: '' }),
    ).toBe('/api/sections/s1/sheet.svg?paper=A3')
    expect(downloadAddress('profile.csv', { sectionId: 's1', token: 'a b', caseId: 'wet' })).toBe(
      '/api/sections/s1/profile.csv?link=a+b&case=wet',
    )
  })
  it('shorten names to initials', () => {
    expect(['Ines Marr', 'Tomas de la Oake', 'Ada', ''].map(initials)).toEqual(['IM', 'TO', 'A', '?'])
  })
})
