import { useId } from 'react'

export function SelectField<T extends string>(props: {
  label: string
  hideLabel?: boolean
  value: T | 'several'
  options: readonly (readonly [value: T, label: string])[]
  disabled?: boolean
  onChange: (value: T) => void
}) {
  const id = useId()
  return (
    <div className="field">
      <label className={props.hideLabel ? 'sr-only' : 'field-label'} htmlFor={id}>
        {props.label}
      </label>
      <select
        id={id}
        className="text-input"
        value={props.value}
        disabled={props.disabled}
        onChange={(event) => {
          const chosen = props.options.find(([value]) => value === event.target.value)
          if (chosen) props.onChange(chosen[0])
        }}
      >
        {props.value === 'several' ? <option value="several">several</option> : null}
        {props.options.map(([value, label]) => (
          <option key={value} value={value}>
            {label}
          </option>
        ))}
      </select>
    </div>
  )
}
