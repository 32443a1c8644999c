import { beforeEach, describe, expect, it } from 'vitest'
import type { Plot } from '~/drawing'
import { paint } from './painter'

/** A drawing context that writes down what is asked of it. */
function recording() {
  const log: string[] = []
  const state: Record<string, unknown> = { globalAlpha: 1 }
  const ctx = new Proxy(state, {
    get: (_, name: string) =>
      name === 'getTransform'
        ? () => ({ a: 1 })
        : name in state
          ? state[name]
          : (...given: unknown[]) => {
              const what = given.map((one) => (one instanceof FakePath ? one.d : String(one)))
              const ink =
                name === 'fill' || name === 'fillText'
                  ? ` ${state.fillStyle}`
                  : name === 'stroke'
                    ? ` ${state.strokeStyle}`
                    : ''
              log.push(`${name}(${what.join(', ')})${ink}${state.globalAlpha === 1 ? '' : ` @${state.globalAlpha}`}`)
            },
    set: (_, name: string, value) => {
      state[name] = value
      return true
    },
  })
  return { ctx: ctx as unknown as CanvasRenderingContext2D, log, state }
}
class FakePath {
  constructor(public d: string) {}
}
beforeEach(() => {
  Object.assign(globalThis, { Path2D: FakePath })
})

const of = { of: 'ground', role: 'ground', layer: 'ground' } as const

describe('paint', () => {
  it('fills before it strokes and leaves the opacity as it was', () => {
    const { ctx, log, state } = recording()
    paint(ctx, [
      { kind: 'path', id: 'a', ...of, d: 'M0 0H9', ink: { stroke: 'black', width: 2, fill: 'white', opacity: 0.5 } },
    ])
    expect(log).toEqual(['fill(M0 0H9, nonzero) white @0.5', 'setLineDash() @0.5', 'stroke(M0 0H9) black @0.5'])
    expect(state.globalAlpha).toBe(1)
  })

  it('keeps hatch marks inside their outline, and clips balanced', () => {
    const { ctx, log } = recording()
    const plots: Plot[] = [
      { kind: 'clip-push', id: 'strip', d: 'CLIP' },
      {
        kind: 'hatch',
        id: 'b',
        ...of,
        hatch: 'silt',
        clip: 'OUTLINE',
        fill: 'tan',
        ink: { stroke: 'brown', width: 1 },
        marks: 'MARKS',
        dots: '',
      },
      { kind: 'clip-pop', id: 'strip' },
    ]
    paint(ctx, plots)
    expect(log).toEqual([
      'save()',
      'clip(CLIP)',
      'fill(OUTLINE, evenodd) tan',
      'save()',
      'clip(OUTLINE, evenodd)',
      'setLineDash()',
      'stroke(MARKS) brown',
      'restore()',
      'restore()',
    ])
  })

  it('writes text over its halo, in the font of its weight, turned where it is turned', () => {
    const { ctx, log, state } = recording()
    paint(ctx, [
      {
        kind: 'text',
        id: 't',
        ...of,
        x: 10,
        y: 20,
        text: '9.60',
        size: 12,
        weight: 600,
        family: 'sans',
        anchor: 'middle',
        fill: 'teal',
        halo: 2,
        haloColour: 'paper',
        rotate: -90,
      },
    ])
    expect(log).toEqual([
      'save()',
      'translate(10, 20)',
      `rotate(${-Math.PI / 2})`,
      'setLineDash()',
      'strokeText(9.60, 0, 0)',
      'fillText(9.60, 0, 0) teal',
      'restore()',
    ])
    expect(state.font).toMatch(/^600 12px "Work Sans"/)
    expect(state.textAlign).toBe('center')
  })

  it('draws no line where the ink has none', () => {
    const { ctx, log } = recording()
    paint(ctx, [{ kind: 'path', id: 'a', ...of, d: 'M0 0H9', ink: { fill: 'white' } }])
    expect(log).toEqual(['fill(M0 0H9, nonzero) white'])
  })
})
