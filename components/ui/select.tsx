'use client'

import { useId, type ComponentProps, type ReactNode } from 'react'
import type { Density } from './button'
import { describedBy, Labelled } from './labelled'

type Option = { value: string; label: string; isOff?: boolean }

type Props = ComponentProps<'select'> & {
  label: ReactNode
  options: Option[]
  /** Text of the empty first choice; without it the first option is taken. */
  empty?: string
  hint?: ReactNode
  error?: string
  density?: Density
  hideLabel?: boolean
  onPick?: (value: string) => void
  wrap?: string
}

/** The system's own list: it works with a glove, a keyboard and a screen reader. */
export function Select({
  label,
  options,
  empty,
  hint,
  error,
  density,
  hideLabel,
  onPick,
  onChange,
  wrap,
  className,
  ...rest
}: Props) {
  const made = useId()
  const id = rest.id ?? made
  return (
    <Labelled {...{ id, label, hint, error, density, hideLabel }} className={wrap}>
      <div className="relative">
        <select
          {...rest}
          id={id}
          aria-invalid={error ? true : undefined}
          aria-describedby={describedBy(id, hint, error)}
          onChange={(event) => {
            onChange?.(event)
            onPick?.(event.target.value)
          }}
          className={`fld ${className ?? ''}`}
        >
          {empty === undefined ? null : <option value="">{empty}</option>}
          {options.map((option) => (
            <option key={option.value} value={option.value} disabled={option.isOff}>
              {option.label}
            </option>
          ))}
        </select>
        <svg
          viewBox="0 0 12 8"
          aria-hidden
          className="pointer-events-none absolute right-3 top-1/2 h-2 w-3 -translate-y-1/2"
        >
          <path d="M1 1L6 6L11 1" fill="none" stroke="var(--ink)" strokeWidth="2" />
        </svg>
      </div>
    </Labelled>
  )
}
