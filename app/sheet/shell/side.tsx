import { useEffect, useState } from 'react'
import { Answer } from '../panels/answer'
import { CasePanel } from '../panels/cases'
import { Footing } from '../panels/footing'
import { Ledger } from '../panels/ledger'
import { Limits } from '../panels/limits'
import { MarkupLayers } from '../panels/markup-layers'
import { Observations } from '../panels/observations'
import { Particulars } from '../panels/particulars/particulars'
import { Problems } from '../panels/problems'
import { Readings } from '../panels/readings'
import { ShellSymbol } from './symbols'
import { sameMembers, useSheetState } from './use-sheet'

const GROUPS = [
  ['values', 'Particulars'],
  ['answer', 'Answer'],
  ['footing', 'Footing'],
  ['cases', 'Cases'],
  ['marks', 'Mark-up'],
] as const
type Group = (typeof GROUPS)[number][0]

/**
 * Beside the drawing on a wide screen, one below the other; on a tablet one group at a time; on a phone a sheet that rises from
 * the bottom. Which it is, is for the style sheet to say, so that the server's page is right before any script.
 */
export function Side({ table }: { table: boolean }) {
  const [group, setGroup] = useState<Group>('answer')
  const [open, setOpen] = useState(false)
  const picked = useSheetState((state) => state.picked, sameMembers)
  const may = useSheetState((state) => state.may)
  const trouble = useSheetState((state) => state.problems.length)
  const shown = GROUPS.filter(
    ([name]) =>
      !(table && name === 'cases') && (may === 'write' || (name !== 'marks' && name !== 'values') || picked.length > 0),
  )
  useEffect(() => {
    if (picked.length > 0) setGroup('values')
  }, [picked])
  return (
    <aside className="side" data-group={group} data-open={open || undefined} aria-label="Values and answers">
      <div className="side-tabs">
        {shown.map(([name, label]) => (
          <button
            key={name}
            type="button"
            aria-pressed={group === name}
            onClick={() => {
              setOpen(!(open && group === name))
              setGroup(name)
            }}
          >
            {label}
            {name === 'footing' && trouble > 0 ? <span className="count">{trouble}</span> : null}
          </button>
        ))}
        <button
          type="button"
          className="side-rise"
          aria-expanded={open}
          aria-label={open ? 'Lower the panel' : 'Raise the panel'}
          onClick={() => setOpen(!open)}
        >
          <ShellSymbol name={open ? 'down' : 'up'} />
        </button>
      </div>
      <div className="side-scroll">
        {/* Readers see the values of what they pick; everything else they read in the table. */}
        <div className="side-group" data-name="values">
          {may === 'write' || picked.length > 0 ? <Particulars /> : null}
        </div>
        <div className="side-group" data-name="answer">
          <Readings />
          <Ledger />
          <Answer />
          <Limits />
          <Observations />
        </div>
        <div className="side-group" data-name="footing">
          <Problems />
          <Footing />
        </div>
        {/* The table has the cases itself. */}
        <div className="side-group" data-name="cases">
          {table ? null : <CasePanel />}
        </div>
        <div className="side-group" data-name="marks">
          <MarkupLayers />
        </div>
      </div>
    </aside>
  )
}
