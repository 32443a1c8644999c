import { useEffect, useMemo, useState } from 'react'
import type { Section } from '~/section'
import { type Solution, solveSteady } from '~/solver'
import { useSheet, useSheetState } from '../shell/use-sheet'
import type { UnitSet } from '../state'
import { Box } from './box'
import { show, useUnits } from './fields/quantities'

type Column = { id: string | null; name: string; solution: Solution }

/** Answers of every case; the section is the key, so that choosing a case solves nothing anew. */
const known = new WeakMap<Section, Column[]>()
function columnsOf(section: Section): Column[] {
  const before = known.get(section)
  if (before) return before
  const columns = [
    { id: null, name: 'As drawn', solution: solveSteady(section, { caseId: null }) },
    ...section.cases.map(({ id, name }) => ({ id, name: name ?? id, solution: solveSteady(section, { caseId: id }) })),
  ]
  known.set(section, columns)
  return columns
}

/** The value once it has not changed for a moment. Solving every case on every frame of a drag would cost the drag its frames. */
function useSettled<T>(value: T): T {
  const [settled, setSettled] = useState(value)
  useEffect(() => {
    const timer = setTimeout(() => setSettled(value), SETTLE)
    return () => clearTimeout(timer)
  }, [value])
  return settled
}
const SETTLE = 250

/** The key readings of all cases side by side. */
export function CompareCases() {
  const sheet = useSheet()
  const units = useUnits()
  const current = useSheetState((state) => state.caseId)
  const section = useSettled(useSheetState((state) => state.live.section))
  const columns = useMemo(() => columnsOf(section), [section])
  const limits = section.limits
  return (
    <Box title="Side by side" folded={false}>
      <div className="scroll-x">
        <table className="figures compare">
          <caption className="sr-only">Key readings of all cases</caption>
          <thead>
            <tr>
              <th scope="col">
                <span className="sr-only">Reading</span>
              </th>
              {columns.map(({ id, name }) => (
                <th scope="col" key={id ?? ''} data-current={id === current || undefined}>
                  <button type="button" className="plain-link" onClick={() => sheet.set({ caseId: id })}>
                    {name}
                  </button>
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            <Row label="Highest water" columns={columns} cell={(s) => show(s.highest.head, 'elevation', units)} />
            <Row
              label="Divide"
              columns={columns}
              cell={(s) => {
                const divide = s.divides.find(({ kind }) => kind === 'divide')
                return divide ? show(divide.from, 'distance', units) : 'none'
              }}
            />
            <Row label={`Out ${section.left.name ?? 'left'}`} columns={columns} cell={(s) => rate(s, 'left', units)} />
            <Row
              label={`Out ${section.right.name ?? 'right'}`}
              columns={columns}
              cell={(s) => rate(s, 'right', units)}
            />
            <Row
              label="Seeps out"
              columns={columns}
              cell={(s) =>
                s.seepage.length === 0
                  ? 'nothing'
                  : show(
                      s.seepage.reduce((sum, reach) => sum + reach.rate, 0),
                      'flow',
                      units,
                    )
              }
            />
            {limits.map(({ id, name }) => (
              <Row
                key={id}
                label={`${name ?? id}, to spare`}
                columns={columns}
                cell={(s) => {
                  const limit = s.limits.find((one) => one.id === id)
                  return limit ? show.signed(limit.margin, 'length', units) : 'left out'
                }}
                bad={(s) => s.limits.some((one) => one.id === id && !one.holds)}
              />
            ))}
          </tbody>
        </table>
      </div>
    </Box>
  )
}

type Solved = Extract<Solution, { status: 'solved' }>
const rate = (solution: Solved, of: string, units: UnitSet) => {
  const found = solution.exchanges.find((one) => one.of === of)
  return found ? show.signed(found.rate, 'flow', units) : '0'
}

function Row(props: {
  label: string
  columns: Column[]
  cell: (solved: Solved) => string
  bad?: (solved: Solved) => boolean
}) {
  return (
    <tr>
      <th scope="row">{props.label}</th>
      {props.columns.map(({ id, solution }) => (
        <td key={id ?? ''} data-tone={solution.status === 'solved' && props.bad?.(solution) ? 'bad' : undefined}>
          {solution.status === 'solved' ? props.cell(solution) : 'no answer'}
        </td>
      ))}
    </tr>
  )
}
