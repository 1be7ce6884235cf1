import Link from 'next/link'
import type { ComponentProps } from 'react'
import type { ButtonKind, Density } from './button'

type Props = ComponentProps<typeof Link> & { kind?: ButtonKind; density?: Density }

/** A link that looks as a button does: for acts that lead to another page. */
export function LinkButton({ kind = 'secondary', density, className, ...rest }: Props) {
  return <Link {...rest} data-kind={kind} data-density={density} className={`btn ${className ?? ''}`} />
}
