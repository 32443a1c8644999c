import { ruleAt, troubleWith, valueAt } from '~/section'
import { sameMembers, useSheet, useSheetState } from '../../shell/use-sheet'
import type { Sheet } from '../../state'
import { show } from './quantities'
import { QuantityField } from './quantity-field'
import { SourceNote } from './source-note'
import type { Spec } from './specs'

type Held = number | null | undefined
/** Why the section cannot hold this number at one of these paths, in its own words; null when it can. */
function refusal(sheet: Sheet, paths: string[], value: number): string | null {
  const { section } = sheet.get().live
  for (const path of paths) {
    const rule = ruleAt(section, path)
    const trouble = rule && troubleWith(rule, value)
    if (trouble) return trouble
  }
  return null
}
const held = (value: unknown): Held => (typeof value === 'number' || value === null ? value : undefined)

/**
 * One number of one or several picked objects, by its path in the format. While a case is chosen it shows and changes that case's
 * value, says what is drawn, and offers the way back.
 */
export function ValueField({
  spec,
  bases,
  cell,
}: {
  spec: Spec
  bases: string[]
  /** In a table: what the row is called; the label is then for screen readers and the source is left to the particulars. */
  cell?: string
}) {
  const sheet = useSheet()
  const may = useSheetState((state) => state.may)
  const units = useSheetState((state) => state.units)
  const paths = bases.map((base) => `${base}.${spec.field}`)
  const drawn = useSheetState((state) => paths.map((path) => held(valueAt(state.live.section, path))), sameMembers)
  const caseOf = useSheetState((state) => state.live.section.cases.find(({ id }) => id === state.caseId) ?? null)
  const own = paths.filter((path) => caseOf !== null && path in caseOf.set)
  const values = paths.map((path, at) => (caseOf && path in caseOf.set ? held(caseOf.set[path]) : drawn[at]))
  const same = values.every((value) => value === values[0])
  const first = paths[0] ?? ''
  const given = useSheetState((state) => typeof values[0] === 'number' || first in state.live.section.sources)
  return (
    <div className="value-field" data-changed={own.length > 0 || undefined}>
      <QuantityField
        label={cell ? `${cell}: ${spec.label}` : spec.label}
        hideLabel={cell !== undefined}
        bare={cell !== undefined}
        kind={spec.kind}
        units={units}
        value={same ? values[0] : 'several'}
        emptyMeans={spec.empty?.means}
        refuse={(value) => refusal(sheet, paths, value)}
        hint={spec.hint}
        disabled={may === 'read'}
        onCommit={(value) => {
          const written = value === null && spec.empty ? spec.empty.as : value
          const done = sheet.edit(paths.map((path) => ({ do: 'set', path, value: written })))
          return done ? null : 'This section may only be read.'
        }}
      />
      {own.length > 0 && caseOf ? (
        <p className="as-drawn">
          as drawn:{' '}
          {typeof drawn[0] === 'number' ? show(drawn[0], spec.kind, units) : (spec.empty?.means ?? 'not given')}
          {may === 'write' ? (
            <button
              type="button"
              className="link-button"
              aria-label={`${spec.label}: back to as drawn`}
              onClick={() =>
                sheet.edit(own.map((path) => ({ do: 'case-set', case: caseOf.id, path, value: undefined })))
              }
            >
              back
            </button>
          ) : null}
        </p>
      ) : null}
      {cell === undefined &&
      given &&
      paths.length === 1 &&
      spec.field !== 'x' &&
      spec.field !== 'from' &&
      spec.field !== 'to' ? (
        <SourceNote path={first} label={spec.label} />
      ) : null}
    </div>
  )
}
