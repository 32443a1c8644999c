import type { Edit } from '~/live'
import type { Command, Desk } from './types'

/** As drawn, then each case in its order, and round again. */
function step({ sheet }: Desk, way: 1 | -1) {
  const { live, caseId } = sheet.get()
  const all: (string | null)[] = [null, ...live.section.cases.map((one) => one.id)]
  const at = Math.max(0, all.indexOf(caseId))
  sheet.set({ caseId: all[(at + way + all.length) % all.length] ?? null })
}

/** What a case can leave out: bodies, recharge, features, observations and limits. */
const LEAVABLE = /^(bodies|recharge|features|observations|limits)\.([^.]+)$/

export const CASES: Command[] = [
  {
    id: 'next-case',
    label: 'Next case',
    group: 'case',
    keys: ['PageDown', '.'],
    enabled: (state) => state.live.section.cases.length > 0,
    run: (desk) => step(desk, 1),
  },
  {
    id: 'previous-case',
    label: 'Case before',
    group: 'case',
    keys: ['PageUp', ','],
    enabled: (state) => state.live.section.cases.length > 0,
    run: (desk) => step(desk, -1),
  },
  {
    id: 'leave-out',
    label: 'Leave what is picked out of this case',
    group: 'case',
    keys: ['X'],
    enabled: (state) =>
      state.may === 'write' && state.caseId !== null && state.picked.some((path) => LEAVABLE.test(path)),
    run: ({ sheet }) => {
      const { caseId, picked } = sheet.get()
      if (caseId === null) return
      const edits = picked.flatMap((path): Edit[] => {
        const id = LEAVABLE.exec(path)?.[2]
        return id === undefined ? [] : [{ do: 'case-off', case: caseId, id, off: true }]
      })
      if (sheet.edit(edits)) sheet.set({ picked: [] })
    },
  },
]
