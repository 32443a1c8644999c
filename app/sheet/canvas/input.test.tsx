import { afterEach, describe, expect, it } from 'vitest'
import type { Machine } from '../tools/machine'
import type { At } from '../tools/types'
import { listen } from './input'

function setUp(options: { space?: boolean; penMode?: boolean; wheelZooms?: boolean } = {}) {
  const element = document.createElement('div')
  document.body.append(element)
  const told: string[] = []
  let pen = options.penMode ?? false
  const say = (word: string) => (at: At) => void told.push(`${word} ${at.px},${at.py}`)
  const machine: Machine = {
    state: { name: 'fake' },
    use() {},
    down: say('down'),
    move: say('move'),
    up: say('up'),
    double: say('double'),
    doubleUp: say('doubleUp'),
    key: () => false,
    cancel() {
      told.push('cancel')
      return true
    },
  }
  const stop = listen({
    element,
    machine: () => machine,
    locate: (event) => ({
      px: event.clientX,
      py: event.clientY,
      x: event.clientX,
      z: event.clientY,
      panel: 'section',
      kind:
        'pointerType' in event && event.pointerType === 'touch'
          ? 'touch'
          : 'pointerType' in event && event.pointerType === 'pen'
            ? 'pen'
            : 'mouse',
      shift: event.shiftKey,
      alt: event.altKey,
      ctrl: event.ctrlKey,
      pressure: 0.5,
    }),
    pan: (dx, dy) => void told.push(`pan ${dx},${dy}`),
    zoom: (factor, px, py) => void told.push(`zoom ${factor.toFixed(2)} at ${px},${py}`),
    wheelZooms: () => options.wheelZooms ?? false,
    penMode: () => pen,
    setPenMode: () => {
      pen = true
    },
    hover() {},
    spaceHeld: () => options.space ?? false,
    cursor() {},
  })
  const fire = (type: string, x: number, y: number, how: PointerEventInit = {}) =>
    element.dispatchEvent(
      new PointerEvent(type, {
        clientX: x,
        clientY: y,
        pointerId: 1,
        button: 0,
        bubbles: true,
        cancelable: true,
        ...how,
      }),
    )
  const wheel = (init: WheelEventInit) =>
    element.dispatchEvent(new WheelEvent('wheel', { cancelable: true, clientX: 5, clientY: 6, ...init }))
  return { told, fire, wheel, stop, element }
}
const touch = (pointerId: number): PointerEventInit => ({ pointerType: 'touch', pointerId })
afterEach(() => {
  document.body.innerHTML = ''
})

describe('input', () => {
  it('hands a press to the tool', () => {
    const { told, fire } = setUp()
    fire('pointerdown', 10, 10)
    fire('pointermove', 20, 12)
    fire('pointerup', 20, 12)
    expect(told).toEqual(['down 10,10', 'move 20,12', 'up 20,12'])
  })

  it('gives the press back when a second finger comes down, then moves and zooms the sheet', () => {
    const { told, fire } = setUp()
    fire('pointerdown', 100, 100, touch(1))
    fire('pointermove', 105, 100, touch(1))
    fire('pointerdown', 200, 100, touch(2))
    fire('pointermove', 295, 100, touch(2))
    fire('pointerup', 295, 100, touch(2))
    fire('pointerup', 105, 100, touch(1))
    expect(told).toEqual(['down 100,100', 'move 105,100', 'cancel', 'pan 47.5,0', 'zoom 0.50 at 200,100'])
  })

  it('moves the sheet with Space or the middle button', () => {
    const one = setUp({ space: true })
    one.fire('pointerdown', 10, 10)
    one.fire('pointermove', 25, 14)
    one.fire('pointerup', 25, 14)
    expect(one.told).toEqual(['pan 15,4'])
    const other = setUp()
    other.fire('pointerdown', 10, 10, { button: 1 })
    other.fire('pointermove', 12, 10)
    expect(other.told).toEqual(['pan 2,0'])
  })

  it('lets a resting palm draw nothing once a pen has been used', () => {
    const { told, fire } = setUp()
    const pen: PointerEventInit = { pointerType: 'pen', pointerId: 9 }
    fire('pointerdown', 50, 50, pen)
    fire('pointerdown', 90, 90, touch(2))
    fire('pointermove', 95, 95, touch(2))
    fire('pointermove', 60, 50, pen)
    fire('pointerup', 60, 50, pen)
    fire('pointerup', 95, 95, touch(2))
    expect(told.filter((line) => !line.includes('95'))).toEqual(['down 50,50', 'move 60,50', 'up 60,50'])
    expect(told.some((line) => line.startsWith('down 90'))).toBe(false)
    told.length = 0
    fire('pointerdown', 90, 90, touch(2))
    fire('pointermove', 80, 90, touch(2))
    expect(told).toEqual(['pan -10,0'])
  })

  it('cancels what was going on when the pointer is lost', () => {
    const { told, fire } = setUp()
    fire('pointerdown', 10, 10)
    fire('pointercancel', 0, 0)
    expect(told).toEqual(['down 10,10', 'cancel'])
  })

  it('tells a double click from two clicks', () => {
    const { told, fire } = setUp()
    fire('pointerdown', 10, 10)
    fire('pointerup', 10, 10)
    fire('pointerdown', 11, 10)
    fire('pointerup', 11, 10)
    fire('pointerdown', 40, 10)
    expect(told).toEqual(['down 10,10', 'up 10,10', 'double 11,10', 'up 11,10', 'doubleUp 11,10', 'down 40,10'])
  })

  it('moves the sheet by the wheel, zooms with Ctrl, or the other way round by choice', () => {
    const { told, wheel } = setUp()
    wheel({ deltaY: 100 })
    wheel({ deltaY: 100, shiftKey: true })
    wheel({ deltaY: -100, ctrlKey: true })
    expect(told).toEqual(['pan 0,-100', 'pan -100,0', 'zoom 0.84 at 5,6'])
    const zooming = setUp({ wheelZooms: true })
    zooming.wheel({ deltaY: 100 })
    expect(zooming.told).toEqual(['zoom 1.20 at 5,6'])
  })

  it('stops listening', () => {
    const { told, fire, stop } = setUp()
    stop()
    fire('pointerdown', 10, 10)
    expect(told).toEqual([])
  })
})
