'use client'

import { useId, type ComponentProps, type ReactNode } from 'react'
import type { Density } from './button'

type Props = Omit<ComponentProps<'input'>, 'type'> & {
  label: ReactNode
  hint?: ReactNode
  density?: Density
  onSet?: (checked: boolean) => void
}

export function Checkbox({ label, hint, density, onSet, onChange, ...rest }: Props) {
  const hintId = useId()
  return (
    <label
      data-density={density}
      className="flex min-h-[var(--hit)] items-center gap-[0.6em] text-[length:var(--control-type)]"
    >
      <input
        {...rest}
        type="checkbox"
        aria-describedby={hint ? hintId : undefined}
        onChange={(event) => {
          onChange?.(event)
          onSet?.(event.target.checked)
        }}
        className="tick"
      />
      <span>
        {label}
        {hint ? (
          <span id={hintId} className="block text-[length:var(--note-type)] text-soft">
            {hint}
          </span>
        ) : null}
      </span>
    </label>
  )
}
