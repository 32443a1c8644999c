import { renderToString } from 'react-dom/server'
import { createMemoryRouter, RouterProvider } from 'react-router'
import { describe, expect, it } from 'vitest'
import { type First, SheetPage } from './sheet'
import { LIVE } from './shell/testing/fake-sheet'

const first: First = {
  sectionId: 's1',
  site: { id: 'site', name: 'Mill valley' },
  token: null,
  live: LIVE,
  svg: '<svg viewBox="0 0 10 10"><path id="result.water-table" d="M0 5H10"/></svg>',
  epoch: 1,
  acts: ['section.see', 'section.edit', 'section.export'],
  may: 'write',
  userId: 'u1',
  caseId: null,
}

/** The page as it leaves the server, before any script has run. */
function page(change: Partial<First> = {}): Document {
  const router = createMemoryRouter([{ path: '/', element: <SheetPage first={{ ...first, ...change }} /> }])
  return new DOMParser().parseFromString(renderToString(<RouterProvider router={router} />), 'text/html')
}

describe('the first view, from the server', () => {
  it('has title, drawing, readings and ledger', () => {
    const { body } = page()
    expect(body.querySelector<HTMLInputElement>('h1 input')?.value).toBe('Mill meadow')
    expect(body.querySelector('.first-drawing svg')).not.toBeNull()
    expect(body.textContent).toContain('Readings at the highest point')
    expect(body.textContent).toMatch(/Water table\s*\d+\.\d\d m/)
    expect(body.textContent).toContain('Pasture')
    expect(body.textContent).toContain('+200')
  })
  it('shows the case that was asked for', () => {
    const drawn = page().body.textContent ?? ''
    const wet = page({ caseId: 'wet' }).body
    expect(wet.querySelector('.case-tabs [aria-pressed="true"]')?.textContent).toBe('Wet spring')
    expect(wet.textContent).not.toBe(drawn)
  })
  it('does not claim that anything is stored before the connection stands', () => {
    expect(page().body.querySelector('.stored-light')?.textContent).toMatch(/^connecting/)
  })
  it('gives the holder of a link no way to change anything and no way into the practice', () => {
    const { body } = page({ token: 'abc', may: 'read', userId: null, acts: ['section.see', 'section.export'] })
    expect(body.querySelector('h1')?.textContent).toBe('Mill meadow')
    expect(body.querySelector('input:not([disabled]), textarea')).toBeNull()
    expect(body.querySelectorAll('[role="toolbar"] button')).toHaveLength(2)
    expect(body.querySelector('a[href^="/sites"], a[href="/home"]')).toBeNull()
    expect(body.textContent).toContain('no substitute for site investigation')
  })
})
