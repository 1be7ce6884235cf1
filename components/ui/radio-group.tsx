'use client'

import { useId, type ReactNode } from 'react'
import type { Density } from './button'

type Option = { value: string; label: ReactNode; hint?: ReactNode; isOff?: boolean }

type Props = {
  label: ReactNode
  name?: string
  options: Option[]
  value: string | null
  onPick: (value: string) => void
  hint?: ReactNode
  error?: string
  density?: Density
  hideLabel?: boolean
  /** `ledger` puts each choice on its own hairline. */
  layout?: 'row' | 'ledger'
}

export function RadioGroup({
  label,
  name,
  options,
  value,
  onPick,
  hint,
  error,
  density,
  hideLabel,
  layout = 'row',
}: Props) {
  const id = useId()
  return (
    <fieldset
      data-density={density}
      aria-describedby={error || hint ? `${id}-note` : undefined}
      className="min-w-0"
    >
      <legend className={hideLabel ? 'sr-only' : 'text-[length:var(--label-type)] font-600'}>{label}</legend>
      <div className={layout === 'row' ? 'flex flex-wrap gap-x-6' : 'flex flex-col divide-y divide-hair'}>
        {options.map((option) => (
          <label
            key={option.value}
            className="flex min-h-[var(--hit)] items-center gap-[0.6em] text-[length:var(--control-type)]"
          >
            <input
              type="radio"
              name={name ?? id}
              value={option.value}
              checked={value === option.value}
              disabled={option.isOff}
              onChange={() => onPick(option.value)}
              className="tick"
            />
            <span className={value === option.value && layout === 'ledger' ? 'flex-1 font-700' : 'flex-1'}>
              {option.label}
            </span>
            {option.hint ? (
              <span className="text-[length:var(--note-type)] text-soft">{option.hint}</span>
            ) : null}
          </label>
        ))}
      </div>
      {error || hint ? (
        <p
          id={`${id}-note`}
          role={error ? 'alert' : undefined}
          className={`text-[length:var(--note-type)] ${error ? 'text-alarm' : 'text-soft'}`}
        >
          {error ?? hint}
        </p>
      ) : null}
    </fieldset>
  )
}
