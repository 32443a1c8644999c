import { useState } from 'react'
import type { Exchange, Solved } from '~/solver'
import { sameMembers, useSheet, useSheetState } from '../shell/use-sheet'
import { Box, Line } from './box'
import { show, useUnits } from './fields/quantities'
import { goTo } from './go-to'

export type Entry = {
  of: string
  label: string
  /** m²/d, positive into the strip. */
  rate: number
  ink: 'recharge' | 'water' | 'works' | 'seepage'
  state?: string
}

const inkOf = (of: string): Entry['ink'] =>
  of.startsWith('recharge')
    ? 'recharge'
    : of.startsWith('seepage')
      ? 'seepage'
      : of.startsWith('features')
        ? 'works'
        : 'water'

const ORDER: Entry['ink'][] = ['recharge', 'water', 'works', 'seepage']

/**
 * The ledger's lines: what comes in counts plus, what goes out minus. Walls pass water on and stand apart; what seeps out at the
 * ground is one line, its reaches stand in the answer.
 */
export function entriesOf(solution: Solved): Entry[] {
  const entries: Entry[] = []
  for (const { of, label, rate, across, state } of solution.exchanges) {
    if (across !== undefined) continue
    const into = of.startsWith('recharge') ? rate : -rate
    const ink = inkOf(of)
    const seeps = ink === 'seepage' ? entries.find((entry) => entry.ink === 'seepage') : undefined
    if (seeps) seeps.rate += into
    else entries.push({ of, label: worded(ink, label, into), rate: into, ink, state })
  }
  return entries.sort((a, b) => ORDER.indexOf(a.ink) - ORDER.indexOf(b.ink))
}

function worded(ink: Entry['ink'], label: string, into: number): string {
  if (ink === 'recharge') return label
  if (ink === 'seepage') return 'Seeps out at the ground'
  return into > 0 ? `From ${label}` : `To ${label}`
}

const isWall = (exchange: Exchange): exchange is Exchange & { across: number } => exchange.across !== undefined

/** The water balance: where water comes from, where it goes, and how well the two agree. */
export function Ledger() {
  const sheet = useSheet()
  const units = useUnits()
  const solution = useSheetState((state) => state.solution)
  const names = useSheetState((state) => [state.live.section.left.name, state.live.section.right.name], sameMembers)
  const [per, setPer] = useState<'flow' | 'km-flow'>('km-flow')
  if (solution.status !== 'solved') return null
  const entries = entriesOf(solution).map((entry) => ({ ...entry, label: named(entry, names) }))
  const largest = Math.max(1e-12, ...entries.map(({ rate }) => Math.abs(rate)))
  const { balance } = solution
  return (
    <Box
      title="Ledger"
      remark={
        <button
          type="button"
          className="link-button"
          title="Change between flow per metre and per kilometre of bank"
          onClick={() => setPer(per === 'flow' ? 'km-flow' : 'flow')}
        >
          {show.unit(per, units)}
        </button>
      }
    >
      <table className="ledger">
        <caption className="sr-only">
          Water balance, {show.unit(per, units)}; plus is into the strip, minus out of it
        </caption>
        <colgroup>
          <col className="ledger-label" />
          <col />
          <col className="ledger-rate" />
        </colgroup>
        <thead className="sr-only">
          <tr>
            <th scope="col">Water</th>
            <th scope="col">Share</th>
            <th scope="col">Rate</th>
          </tr>
        </thead>
        <tbody>
          {entries.map((entry) => (
            <tr key={entry.of}>
              <th scope="row">
                <button
                  type="button"
                  className="plain-link"
                  onClick={() => goTo(sheet, { path: entry.of, place: placeOf(solution, entry) })}
                >
                  {entry.label}
                </button>
                {entry.state ? <small> {entry.state}</small> : null}
              </th>
              <td className="bar-cell" aria-hidden="true">
                <span
                  className="bar"
                  data-ink={entry.ink}
                  data-way={entry.rate >= 0 ? 'in' : 'out'}
                  style={{ width: `${(Math.abs(entry.rate) / largest) * 100}%` }}
                />
              </td>
              <td className="number">{show.signed(entry.rate, per, units)}</td>
            </tr>
          ))}
        </tbody>
      </table>
      <dl className="lines">
        {solution.exchanges.filter(isWall).map((wall) => (
          <Line key={wall.of} label={`Through ${wall.label}`} tone="soft">
            {show(Math.abs(wall.across), per, units, false)} {wall.across >= 0 ? 'to the right' : 'to the left'}
          </Line>
        ))}
        <Line label="In and out">
          {show(balance.in, per, units, false)} · {show(balance.out, per, units, false)}
        </Line>
        <Line label="Closes to" tone={balance.relative <= 1e-6 ? 'good' : 'bad'}>
          {balance.relative === 0 ? '0' : balance.relative.toExponential(0)}
        </Line>
      </dl>
    </Box>
  )
}

function named(entry: Entry, [left, right]: (string | undefined)[]): string {
  if (entry.of !== 'left' && entry.of !== 'right') return entry.label
  const name = (entry.of === 'left' ? left : right) ?? `${entry.of} bank`
  return entry.rate > 0 ? `From ${name}` : `To ${name}`
}

/** Seepage is no object to pick: its first reach is shown instead. */
const placeOf = (solution: Solved, { ink }: Entry) => {
  const reach = ink === 'seepage' ? solution.seepage[0] : undefined
  return reach ? { x: reach.from, to: reach.to } : undefined
}
