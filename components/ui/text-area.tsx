'use client'

import { useId, type ComponentProps, type ReactNode } from 'react'
import type { Density } from './button'
import { describedBy, Labelled } from './labelled'

type Props = ComponentProps<'textarea'> & {
  label: ReactNode
  hint?: ReactNode
  error?: string
  density?: Density
  hideLabel?: boolean
  onText?: (text: string) => void
  wrap?: string
}

export function TextArea({
  label,
  hint,
  error,
  density,
  hideLabel,
  onText,
  onChange,
  wrap,
  className,
  ...rest
}: Props) {
  const made = useId()
  const id = rest.id ?? made
  return (
    <Labelled {...{ id, label, hint, error, density, hideLabel }} className={wrap}>
      <textarea
        rows={3}
        {...rest}
        id={id}
        aria-invalid={error ? true : undefined}
        aria-describedby={describedBy(id, hint, error)}
        onChange={(event) => {
          onChange?.(event)
          onText?.(event.target.value)
        }}
        className={`fld py-2 ${className ?? ''}`}
      />
    </Labelled>
  )
}
