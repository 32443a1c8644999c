import type { At, Press, State, Surface, Tool } from './types'

/** Runs one tool's state chart: hands it what happens and walks to the state it answers. */
export type Machine = {
  readonly state: State
  use(tool: Tool): void
  down(at: At): void
  move(at: At): void
  up(at: At): void
  /** The second press of a double click: a plain press where the state knows no other meaning. */
  double(at: At): void
  doubleUp(at: At): void
  /** True when the tool took the key. */
  key(press: Press): boolean
  /** Escape, a second finger, a lost pointer: whatever was going on leaves nothing behind. */
  cancel(): boolean
}

export function createMachine(surface: Surface, tool: Tool, changed: (state: State) => void = () => {}): Machine {
  let current = tool
  let state = tool.start(surface)
  // A state that puts another tool in hand is left to finish first.
  let inside = false
  let waiting: Tool | null = null

  function walk(handler: () => State | undefined): boolean {
    inside = true
    let next: State | undefined
    try {
      next = handler()
      if (next && next !== state) {
        state.exit?.()
        state = next
        state.enter?.()
        tell()
      }
    } finally {
      inside = false
      const tool = waiting
      waiting = null
      if (tool) take(tool)
    }
    return next !== undefined
  }
  function take(next: Tool) {
    if (next === current) return
    state.cancel?.()
    state.exit?.()
    surface.show(null)
    current = next
    state = next.start(surface)
    state.enter?.()
    tell()
  }
  function tell() {
    const hint = state.hint ?? null
    if (surface.sheet.get().hint !== hint) surface.sheet.set({ hint })
    changed(state)
  }
  state.enter?.()
  tell()

  return {
    get state() {
      return state
    },
    use(next) {
      if (inside) waiting = next
      else take(next)
    },
    down: (at) => void walk(() => state.down?.(at)),
    move: (at) => void walk(() => state.move?.(at)),
    up: (at) => void walk(() => state.up?.(at)),
    double: (at) => void walk(() => (state.double ? state.double(at) : state.down?.(at))),
    doubleUp: (at) => void walk(() => state.doubleUp?.(at)),
    key: (press) => walk(() => state.key?.(press)),
    cancel: () => walk(() => state.cancel?.()),
  }
}
