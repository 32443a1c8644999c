import '@testing-library/jest-dom/vitest'
import { cleanup } from '@testing-library/react'
import { afterEach, vi } from 'vitest'

afterEach(cleanup)

// jsdom draws nothing and says so on every canvas; Konva only needs something that answers.
const context = new Proxy(
  {},
  {
    get: (_, name) => {
      if (name === 'measureText') return (text: string) => ({ width: text.length * 6 })
      if (name === 'getImageData') return () => ({ data: new Uint8ClampedArray(4) })
      if (name === 'createLinearGradient' || name === 'createPattern') return () => ({ addColorStop: () => {} })
      return () => {}
    },
    set: () => true,
  },
)
HTMLCanvasElement.prototype.getContext = vi.fn(() => context) as unknown as HTMLCanvasElement['getContext']

if (!('ResizeObserver' in globalThis)) {
  class Quiet {
    observe() {}
    unobserve() {}
    disconnect() {}
  }
  Object.assign(globalThis, { ResizeObserver: Quiet })
}
if (!window.matchMedia)
  window.matchMedia = (query: string) =>
    ({ matches: false, media: query, addEventListener() {}, removeEventListener() {} }) as unknown as MediaQueryList
