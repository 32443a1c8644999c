import { useState } from 'react'
import { valueAt } from '~/section'
import { useSheet, useSheetState } from '../../shell/use-sheet'
import { conductanceOf, ERNST } from '../conductance'
import { plain, show, useUnits } from '../fields/quantities'
import { QuantityField } from '../fields/quantity-field'

/** Works the conductance out from the bed, and writes it with where it came from. */
export function ConductanceHelper({ path }: { path: string }) {
  const sheet = useSheet()
  const units = useUnits()
  const may = useSheetState((state) => state.may)
  const live = useSheetState((state) => state.live)
  const solution = useSheetState((state) => state.solution)
  const [perimeter, setPerimeter] = useState(3)
  const [thickness, setThickness] = useState(0.3)
  const [k, setK] = useState(0.05)
  const [partly, setPartly] = useState(true)
  if (may === 'read') return null
  const { section } = live
  const bank = path === 'left' || path === 'right'
  const x = bank ? section[path].x : valueAt(section, `${path}.x`)
  const host = section.materials.find(({ id }) => id === section.host)
  const depth = typeof x === 'number' && solution.status === 'solved' ? thicknessAt(solution.profile, x) : null
  const radial = partly && host && depth && depth > 0 ? { depth, k: host.k, anisotropy: host.anisotropy ?? 1 } : null
  const result = conductanceOf({ perimeter, thickness, k }, radial, bank ? 1 : 2)
  const keep = (set: (value: number) => void) => (value: number | null) => {
    if (value !== null) set(value)
    return null
  }
  const use = () => {
    const told = `bed ${plain(thickness)} m of ${plain(k)} m/d, wetted perimeter ${plain(perimeter)} m${result.radial > 0 ? '; radial term Ernst 1962' : ''}`
    sheet.edit([
      { do: 'set', path: `${path}.conductance`, value: result.g },
      { do: 'source', path: `${path}.conductance`, text: told },
    ])
  }
  return (
    <details className="helper">
      <summary>Work the conductance out from the bed</summary>
      <QuantityField
        label="Wetted perimeter"
        kind="length"
        units={units}
        value={perimeter}
        refuse={(value) => (value > 0 ? null : 'The wetted perimeter must be more than 0.')}
        onCommit={keep(setPerimeter)}
      />
      <QuantityField
        label="Bed thickness"
        kind="length"
        units={units}
        value={thickness}
        refuse={(value) => (value >= 0 ? null : 'The bed cannot be thinner than 0.')}
        onCommit={keep(setThickness)}
      />
      <QuantityField
        label="Bed conductivity"
        kind="conductivity"
        units={units}
        value={k}
        refuse={(value) => (value > 0 ? null : 'The conductivity of the bed must be more than 0.')}
        onCommit={keep(setK)}
      />
      <label className="check">
        <input type="checkbox" checked={partly} onChange={(event) => setPartly(event.target.checked)} />
        It does not reach the base: the flow bends towards it
      </label>
      <p className="helper-answer">
        G = {result.g === null ? 'none: stands directly against the aquifer' : show(result.g, 'conductance', units)}
        <button type="button" className="button small" onClick={use}>
          Use it
        </button>
      </p>
      <p className="quiet">
        Bed {plain(result.bed)} d/m, bending {plain(result.radial)} d/m.{' '}
        {radial ? `${ERNST}; ${show(radial.depth, 'length', units)} of saturated ground.` : ''}
        {bank ? ' A bank takes water from one side: half of the perimeter counts.' : ''}
      </p>
    </details>
  )
}

/** Saturated thickness at the node nearest to x, m. */
function thicknessAt(profile: { x: Float64Array; saturated: Float64Array }, x: number): number | null {
  let best: number | null = null
  let distance = Number.POSITIVE_INFINITY
  profile.x.forEach((at, index) => {
    if (Math.abs(at - x) >= distance) return
    distance = Math.abs(at - x)
    best = profile.saturated[index] ?? null
  })
  return best
}
