import { ShellSymbol, type ShellSymbolName } from './symbols'

/** A drawn symbol to press; its words are for screen readers and the pointer that rests on it. */
export function IconButton(props: {
  name: ShellSymbolName
  label: string
  disabled?: boolean
  pressed?: boolean
  onPress: () => void
}) {
  return (
    <button
      type="button"
      className="icon-button"
      aria-label={props.label}
      title={props.label}
      disabled={props.disabled}
      aria-pressed={props.pressed}
      onClick={props.onPress}
    >
      <ShellSymbol name={props.name} />
    </button>
  )
}
