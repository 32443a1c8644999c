import { useSheet, useSheetState } from '../../shell/use-sheet'
import { useCaseValue } from './in-case'
import { SelectField } from './select-field'

/** Which material something is made of; a case may have its own. */
export function MaterialChoice({ path, label, hideLabel }: { path: string; label: string; hideLabel?: boolean }) {
  const sheet = useSheet()
  const may = useSheetState((state) => state.may)
  const materials = useSheetState((state) => state.live.section.materials)
  const { value, drawn, own, caseId } = useCaseValue(path)
  return (
    <div className="value-field" data-changed={own || undefined}>
      <SelectField
        label={label}
        hideLabel={hideLabel}
        value={typeof value === 'string' ? value : ''}
        disabled={may === 'read'}
        options={materials.map((one) => [one.id, one.name ?? one.id] as const)}
        onChange={(material) => sheet.edit([{ do: 'set', path, value: material }])}
      />
      {own && caseId !== null ? (
        <p className="as-drawn">
          as drawn: {materials.find(({ id }) => id === drawn)?.name ?? String(drawn)}
          {may === 'write' ? (
            <button
              type="button"
              className="link-button"
              aria-label={`${label}: back to as drawn`}
              onClick={() => sheet.edit([{ do: 'case-set', case: caseId, path, value: undefined }])}
            >
              back
            </button>
          ) : null}
        </p>
      ) : null}
    </div>
  )
}
