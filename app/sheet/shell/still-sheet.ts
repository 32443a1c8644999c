import type { LiveSection } from '~/live'
import { gatherProblems, readingAt, solveHere } from '../compute'
import type { LinkState, Sheet, SheetState } from '../state'
import type { First } from './surround'

/**
 * The sheet before its live store is there: on the server, and in the browser until the connection's code has come. It shows the
 * stored section and its answer, lets cases and readings be looked at, and takes no edits.
 */
export type StillSheet = Sheet & { hearLink(link: LinkState): void }

export function createStillSheet(first: First): StillSheet {
  const listeners = new Set<() => void>()
  let state = firstState(first)
  const put = (next: SheetState) => {
    state = next
    for (const listener of listeners) listener()
  }
  return {
    get: () => state,
    stored: () => state.live,
    subscribe(listener) {
      listeners.add(listener)
      return () => listeners.delete(listener)
    },
    set(change) {
      const next = { ...state, ...change }
      if (change.caseId !== undefined && change.caseId !== state.caseId)
        Object.assign(next, answered(state.live, change.caseId))
      if (change.reading !== undefined || next.solution !== state.solution)
        next.read = readingAt(next.solution, next.reading)
      put(next)
    },
    say(text, tone = 'plain') {
      put({ ...state, says: { text, tone, n: (state.says?.n ?? 0) + 1 } })
    },
    hearLink: (link) => put({ ...state, link }),
    edit: () => false,
    gesture: { active: false, start() {}, show() {}, finish: () => false, cancel() {} },
    undo() {},
    redo() {},
  }
}

/** The state the page opens with; the same on the server and in the browser, so that both draw the same page. */
export function firstState(first: First): SheetState {
  const { live, caseId } = first
  return {
    sectionId: first.sectionId,
    live,
    ...answered(live, caseId),
    caseId,
    tool: 'pick',
    picked: [],
    reading: null,
    read: null,
    view: null,
    units: 'si',
    snap: true,
    grid: true,
    showArrows: true,
    showFlowLines: false,
    showMarkup: true,
    theme: 'light',
    may: first.may,
    acts: first.acts,
    link: { kind: 'connecting' },
    peers: [],
    following: null,
    canUndo: false,
    canRedo: false,
    layerId: null,
    presenting: false,
    hint: null,
    says: null,
  }
}

function answered(live: LiveSection, caseId: string | null): Pick<SheetState, 'solution' | 'footing' | 'problems'> {
  const answer = solveHere(live.section, caseId)
  return { solution: answer.solution, footing: answer.footing, problems: gatherProblems(live, answer) }
}
