import type { ListName } from '~/live'
import { valueAt } from '~/section'
import { useSheetState } from '../../shell/use-sheet'
import { specsOf } from '../fields/specs'
import { ValueField } from '../fields/value-field'
import { subjectOf } from '../paths'
import { ConductanceHelper } from './conductance-helper'
import { DateField } from './date-field'
import { Deeds } from './deeds'
import { NameAndNote } from './name-note'

/** Recharge zones, ditches, drains, trenches, walls, observations, limits: a name, numbers, a note. */
export function ObjectParticulars({ path, list, id }: { path: string; list: ListName; id: string }) {
  const section = useSheetState((state) => state.live.section)
  const object = section[list].find((one) => one.id === id)
  if (!object) return <p className="quiet">It is no longer there.</p>
  const { base, specs } = specsOf(section, subjectOf(path))
  const helps = specs.some(({ field }) => field === 'conductance')
  return (
    <div className="particulars">
      <NameAndNote path={path}>
        {specs.map((spec) => (
          <ValueField key={spec.field} spec={spec} bases={[base]} />
        ))}
        {list === 'observations' ? <DateField path={`${path}.date`} /> : null}
        {helps ? <ConductanceHelper path={path} /> : null}
        <Caution list={list} kind={valueAt(section, `${path}.kind`)} />
      </NameAndNote>
      <Deeds path={path} />
    </div>
  )
}

/** Where people or property can be hurt, the words stand beside the numbers. */
function Caution({ list, kind }: { list: ListName; kind: unknown }) {
  const text =
    kind === 'trench'
      ? 'Drawdown by pumping can settle buildings and heave the floor of a dig. A screening estimate is no design.'
      : kind === 'wall'
        ? 'A wall under head can leak or fail by uplift; neither is worked out here.'
        : list === 'limits'
          ? 'A margin from a screening estimate does not make a cellar, a landfill or a dig safe.'
          : null
  return text ? <p className="caution-line">{text}</p> : null
}
