import type { ButtonHTMLAttributes } from 'react'
import { Link, type LinkProps } from 'react-router'

/** One main act a page; danger for what takes something away; plain where the place says enough. */
export type ButtonKind = 'main' | 'danger' | 'plain'

export function Button({
  kind,
  type = 'submit',
  ...rest
}: ButtonHTMLAttributes<HTMLButtonElement> & { kind?: ButtonKind }) {
  return <button type={type} {...rest} data-kind={kind} className="ui-button" />
}

/** Looks like a button, leads somewhere. */
export const LinkButton = ({ kind, ...rest }: LinkProps & { kind?: ButtonKind }) => (
  <Link {...rest} data-kind={kind} className="ui-button" />
)
