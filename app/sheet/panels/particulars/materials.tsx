import type { Material } from '~/section'
import { useSheet, useSheetState } from '../../shell/use-sheet'
import { Box, VerdictMark } from '../box'
import { show, useUnits } from '../fields/quantities'
import { MATERIAL_SPECS } from '../fields/specs'
import { ValueField } from '../fields/value-field'
import { freshId } from '../ids'
import { Deeds } from './deeds'
import { NameAndNote } from './name-note'

/** The numbers of a material, with what is usual for ground of that name. */
export function MaterialFields({ id }: { id: string }) {
  const section = useSheetState((state) => state.live.section)
  const material = section.materials.find((one) => one.id === id)
  if (!material) return <p className="quiet">This material is no longer in the list.</p>
  const uses = (section.host === id ? 1 : 0) + section.bodies.filter((body) => body.material === id).length
  return (
    <>
      {MATERIAL_SPECS.map((spec) => (
        <div key={spec.field}>
          <ValueField spec={spec} bases={[`materials.${id}`]} />
          {spec.field === 'k' ? <UsualRange id={id} /> : null}
        </div>
      ))}
      {uses > 1 ? (
        <p className="quiet">
          {uses} places are made of {material.name ?? id}; all of them change.
        </p>
      ) : null}
    </>
  )
}

/** The footing has compared it with published ranges already, where the name says what ground it is. */
function UsualRange({ id }: { id: string }) {
  const line = useSheetState((state) => state.footing.find(({ key }) => key === `range.${id}`) ?? null)
  if (!line) return null
  return (
    <p className="usual">
      <VerdictMark verdict={line.verdict} word={line.verdict === 'holds' ? 'usual' : 'unusual'} /> {line.says}
      <small> {line.source}</small>
    </p>
  )
}

export function MaterialParticulars({ id }: { id: string }) {
  return (
    <div className="particulars">
      <NameAndNote path={`materials.${id}`}>
        <MaterialFields id={id} />
      </NameAndNote>
      <Deeds path={`materials.${id}`} />
    </div>
  )
}

export function newMaterial(materials: readonly Material[]): Material {
  return { id: freshId('mat', materials), name: `Material ${materials.length + 1}`, k: 1 }
}

/** The list of materials; one is opened by picking it. */
export function Materials() {
  const sheet = useSheet()
  const units = useUnits()
  const may = useSheetState((state) => state.may)
  const materials = useSheetState((state) => state.live.section.materials)
  const host = useSheetState((state) => state.live.section.host)
  const add = () => {
    const object = newMaterial(materials)
    if (sheet.edit([{ do: 'add', list: 'materials', object }])) sheet.set({ picked: [`materials.${object.id}`] })
  }
  return (
    <Box title="Materials" remark="K">
      <ul className="material-list">
        {materials.map((one) => (
          <li key={one.id}>
            <button type="button" onClick={() => sheet.set({ picked: [`materials.${one.id}`] })}>
              <span>
                {one.name ?? one.id}
                {one.id === host ? <small> the ground</small> : null}
              </span>
              <span className="number">{show(one.k, 'conductivity', units)}</span>
            </button>
          </li>
        ))}
      </ul>
      {may === 'write' ? (
        <button type="button" className="button small" onClick={add}>
          Add a material
        </button>
      ) : null}
    </Box>
  )
}
