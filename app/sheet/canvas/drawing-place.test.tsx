import { render, screen } from '@testing-library/react'
import { renderToString } from 'react-dom/server'
import { afterEach, describe, expect, it, vi } from 'vitest'
import type { OpenSheet } from '../sheet-store'

const canvas = vi.hoisted(() => ({ broken: false, ready: null as (() => void) | null }))
vi.mock('./sheet-canvas.client', () => ({
  default: ({ onReady }: { onReady(): void }) => {
    if (canvas.broken) throw new Error('no canvas here')
    canvas.ready = onReady
    return <p>canvas</p>
  },
}))
const { DrawingPlace } = await import('./drawing-place')

const said: string[] = []
const sheet = { say: (text: string) => said.push(text) } as unknown as OpenSheet
const place = <DrawingPlace sheet={sheet} first={<p>as the server drew it</p>} />
afterEach(() => {
  canvas.broken = false
  said.length = 0
})

describe('DrawingPlace', () => {
  it('shows the server’s drawing on the server and until the canvas has painted', async () => {
    expect(renderToString(place)).toContain('as the server drew it')
    expect(renderToString(place)).not.toContain('canvas</p>')
    render(place)
    await screen.findByText('canvas')
    expect(screen.getByText('as the server drew it')).toBeTruthy()
    canvas.ready?.()
    await vi.waitFor(() => expect(screen.queryByText('as the server drew it')).toBeNull())
  })

  it('keeps the server’s drawing and says so when the canvas cannot start', async () => {
    canvas.broken = true
    const quiet = vi.spyOn(console, 'error').mockImplementation(() => {})
    render(place)
    await vi.waitFor(() => expect(said[0]).toMatch(/could not be started/))
    expect(screen.getAllByText('as the server drew it').length).toBeGreaterThan(0)
    quiet.mockRestore()
  })
})
