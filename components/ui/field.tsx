'use client'

import { useId, type ComponentProps, type ReactNode } from 'react'
import type { Density } from './button'
import { describedBy, Labelled } from './labelled'

export type FieldProps = ComponentProps<'input'> & {
  label: ReactNode
  hint?: ReactNode
  /** A sentence; the text stays as it was typed. */
  error?: string
  density?: Density
  aside?: ReactNode
  hideLabel?: boolean
  unit?: ReactNode
  /** What stands inside the field at its right end, such as a button that shows a password. */
  end?: ReactNode
  onText?: (text: string) => void
  /** Class of the whole field, for its width; `className` is the input's own. */
  wrap?: string
}

export function Field({
  label,
  hint,
  error,
  density,
  aside,
  hideLabel,
  unit,
  end,
  onText,
  onChange,
  wrap,
  className,
  ...rest
}: FieldProps) {
  const made = useId()
  const id = rest.id ?? made
  const input = {
    autoComplete: 'off',
    ...rest,
    id,
    'aria-invalid': error ? true : undefined,
    'aria-describedby': describedBy(id, hint, error),
    onChange: (event: Parameters<NonNullable<FieldProps['onChange']>>[0]) => {
      onChange?.(event)
      onText?.(event.target.value)
    },
  } as const
  return (
    <Labelled {...{ id, label, hint, error, density, aside, hideLabel }} className={wrap}>
      {unit || end ? (
        <div className="fld flex items-center gap-2">
          <input {...input} className={`fld-in ${className ?? ''}`} />
          {unit ? <span className="shrink-0 text-soft">{unit}</span> : null}
          {end}
        </div>
      ) : (
        <input {...input} className={`fld ${className ?? ''}`} />
      )}
    </Labelled>
  )
}
